"""The next step of the demo job through real widgets, the program killed all along the way."""

import os
import re
import subprocess
import sys
from pathlib import Path

import pytest

from models import jobfile
from models.acts import Acts
from models.assess import assess
from models.record.store import Store
from models.record.verify import verify
from models.rules.rule import Verdict
from sample_data.next_steps import next_attempts
from tests.journeys.test_random_rotors import slice_of_this_commit

ROOT = Path(__file__).resolve().parents[2]


def work_killed_every(moves: int, folder: Path, home: Path) -> int:
    """Let a technician finish the step, killed after so many moves each time; count the killed."""
    done = subprocess.run(
        [sys.executable, "-m", "tests.journeys.killed_bench", str(folder), str(moves)],
        cwd=ROOT,
        env={
            **os.environ,
            "QT_QPA_PLATFORM": "offscreen",
            "OPENBLAS_NUM_THREADS": "1",
            "HOME": str(home),
            "XDG_CONFIG_HOME": str(home),
        },
        capture_output=True,
        text=True,
        timeout=900,
        check=False,
    )
    assert done.returncode == 0, done.stdout + done.stderr
    found = re.search(r"(\d+) killed", done.stdout)
    assert found is not None
    return int(found.group(1))


def holds(folder: Path) -> None:
    """Demand that everything ended as the truth behind the readings says, and nothing was lost."""
    first, second = next_attempts()
    with Store.open(folder) as store:
        with store.reading() as session:
            assert verify(session).is_whole
        job = Acts(store).read("26-0417")
    view = assess(job)
    exported = assess(jobfile.loads(jobfile.dumps(job)))
    assert [(one.finding.rule.id, one.finding.message) for one in exported.findings] == [
        (one.finding.rule.id, one.finding.message) for one in view.findings
    ]
    failed, held = view.attempts_at(second.step)
    assert (failed.number, held.number) == (first.number, second.number) == (1, 2)
    assert failed.settled is not None
    assert failed.settled.outcome == "removed"
    assert failed.verdict_of("runout-changed") is Verdict.OUTSIDE
    assert held.settled is not None
    assert held.settled.outcome == "within limits"
    assert held.verdict_of("runout-changed") is Verdict.WITHIN
    outside = 0
    for told, attempt in ((first, failed), (second, held)):
        assert attempt.judged is not None
        typed = {one.station: list(one.typed) for one in attempt.judged.entry.stations}
        assert typed == {one["station"]: one["typed"] for one in told.after["stations"]}
        for change in attempt.changes:
            if change.change is None or change.is_journal:
                continue
            truth = told.true_changes[change.key]
            error = change.change - truth
            assert change.expanded_uncertainty is not None
            # Where the work ends, the whole vector lies within what is stated. One of eighteen
            # components outside k = 2 is what k = 2 means; none may lie outside k = 3.
            if attempt is held:
                assert 2.0 * abs(error) <= change.expanded_uncertainty, change
            along = abs((error * truth.conjugate()).real) / abs(truth)
            outside += 2.0 * along > change.expanded_uncertainty
            assert 2.0 * along <= 1.5 * change.expanded_uncertainty, change
    assert outside <= 1


def test_a_step_is_finished_by_a_program_that_is_killed_again_and_again(tmp_path: Path) -> None:
    shop, home = tmp_path / "shop", tmp_path / "home"
    shop.mkdir()
    home.mkdir()

    # Which moves are the last of a life changes with the commit; the whole set kills after each.
    killed = work_killed_every(10 + slice_of_this_commit() % 5, shop, home)

    assert killed > 20
    holds(shop)


@pytest.mark.whole
def test_a_step_is_finished_by_a_program_that_is_killed_after_every_move(tmp_path: Path) -> None:
    shop, home = tmp_path / "shop", tmp_path / "home"
    shop.mkdir()
    home.mkdir()

    killed = work_killed_every(1, shop, home)

    assert killed > 300
    holds(shop)
