"""Materials that the shop answers for: who may keep one, and that each version stays."""

import msgspec
import pytest

from models.acts import Acts, NotAllowedError
from models.job import Person
from models.record.errors import ActDiffersError
from models.record.store import Store
from models.record.verify import verify
from models.units import Ratio
from tests.record.a_job import FORGING

EVA = Person(key="eva", name="Eva Ott", initials="EO", role="engineer")


@pytest.fixture
def store(tmp_path):
    with Store.open(tmp_path) as opened:
        yield opened


def test_a_material_is_kept_and_its_next_version_takes_its_place(store):
    acts = Acts(store)
    newer = msgspec.structs.replace(FORGING, source="certificate 18")

    first = acts.keep_material(FORGING, person=EVA, act_id="one")
    second = acts.keep_material(newer, person=EVA, act_id="two")

    assert acts.materials() == (newer,)
    assert second.sequence == first.sequence + 1
    with store.reading() as session:
        kept = session.connection().exec_driver_sql(
            "SELECT source FROM shop_material ORDER BY sequence"
        )
        assert kept.scalars().all() == ["certificate 17", "certificate 18"]
        assert verify(session).is_whole


def test_the_same_act_again_keeps_nothing_twice(store):
    acts = Acts(store)
    once = acts.keep_material(FORGING, person=EVA, act_id="one")

    again = acts.keep_material(FORGING, person=EVA, act_id="one")

    assert (again.sequence, acts.materials()) == (once.sequence, (FORGING,))
    with pytest.raises(ActDiffersError):
        acts.keep_material(FORGING, person=msgspec.structs.replace(EVA, key="ivo"), act_id="one")


def test_a_technician_does_not_answer_for_numbers(store):
    tom = msgspec.structs.replace(EVA, key="tom", name="Tom Eck", role="technician")

    with pytest.raises(NotAllowedError, match="Tom Eck is technician") as refused:
        Acts(store).keep_material(FORGING, person=tom, act_id="one")

    assert refused.value.name == "role-may-not-keep"
    assert Acts(store).materials() == ()


def test_numbers_that_no_material_has_are_refused_with_the_number(store):
    wrong = msgspec.structs.replace(FORGING, poisson=Ratio.read("0.9"))

    with pytest.raises(NotAllowedError, match=r"“own forging” cannot be kept: .*0\.9") as refused:
        Acts(store).keep_material(wrong, person=EVA, act_id="one")

    assert refused.value.name == "not-a-material"
