"""A draw-up through the one door: recorded, mounted, drawn up again, and judged from the record."""

import msgspec

from models.acts import Acts
from models.assess import assess
from models.job import DrawUp
from models.record.store import Store
from models.record.verify import verify
from models.rules.progress import Act
from models.rules.rule import Verdict
from tests.assess.test_draw_up import MOUNT, OPENED, drawn, job_with


def test_a_hub_is_drawn_up_too_little_then_enough_and_both_stay(tmp_path):
    job = job_with()
    with Store.open(tmp_path) as store:
        acts = Acts(store)
        acts.bring_in(job, by=OPENED.by, act_id="in")
        acts.record(job.number, msgspec.structs.replace(OPENED, out_of_order="told afterwards"))
        acts.record(job.number, drawn(up=(3.5, 3.6)))
        acts.record(job.number, MOUNT)
        between = assess(acts.read(job.number))
        acts.record(job.number, drawn("e", 9))
        read = acts.read(job.number)
        with store.reading() as session:
            assert verify(session).is_whole

    after = assess(read)
    assert between.next.act is Act.DRAW_UP
    assert between.attempt("hub", 1).home("hub") is Verdict.OUTSIDE
    assert after.next.act is Act.SETTLE
    assert [one.id for one in read.entries if isinstance(one, DrawUp)] == ["d", "e"]
