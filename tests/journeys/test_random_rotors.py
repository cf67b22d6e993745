"""Rotors of known truth through the whole line: readings, job file, check, change of the mount."""

import subprocess
from pathlib import Path

import pytest

from models.rules.rule import Verdict
from tests.journeys.random_rotors import Rotor, judged, make

WHOLE = 1000
SLICE = 24


def slice_of_this_commit() -> int:
    """Choose which seeds this run takes, by the commit that it tests."""
    place = Path(__file__).resolve().parent
    named = subprocess.run(
        ["git", "rev-parse", "--short=6", "HEAD"],
        cwd=place, capture_output=True, text=True, check=False,
    ).stdout.strip()  # fmt: skip
    return int(named or "0", 16) % (WHOLE // SLICE) * SLICE


def inside(rotor: Rotor) -> list[bool]:
    """Whether each station's change lies within its stated expanded uncertainty of the truth."""
    (attempt,) = judged(rotor).attempts
    found = []
    for change in attempt.changes:
        if change.is_journal or change.change is None:
            continue
        truth = rotor.truth[change.key]
        assert change.expanded_uncertainty is not None
        # The stated uncertainty is that of a component: the error is taken along the truth.
        error = change.change - truth
        along = (error * truth.conjugate()).real / abs(truth)
        found.append(abs(2.0 * along) <= change.expanded_uncertainty)
    return found


def coverage(seeds: range) -> tuple[float, int]:
    found = [one for seed in seeds for one in inside(make(seed))]
    return sum(found) / len(found), len(found)


def test_changes_are_found_within_their_uncertainty_at_the_stated_rate() -> None:
    start = slice_of_this_commit()

    share, stations = coverage(range(start, start + SLICE))

    # k = 2 states 95 %; of some 150 stations no fewer than 90 % may be inside.
    assert stations > 100
    assert share >= 0.90, share


@pytest.mark.whole
def test_a_thousand_rotors_are_found_within_their_uncertainty(
    capsys: pytest.CaptureFixture[str],
) -> None:
    share, stations = coverage(range(WHOLE))

    with capsys.disabled():
        print(  # noqa: T201  (the figure is what the whole set is run for)
            f"\n{stations} stations of {WHOLE} rotors: {100 * share:.2f} % within k = 2"
        )
    assert share >= 0.945, share


def test_a_verdict_of_a_random_rotor_never_contradicts_the_truth_by_more_than_is_stated() -> None:
    start = slice_of_this_commit()
    for seed in range(start, start + SLICE):
        rotor = make(seed)
        (attempt,) = judged(rotor).attempts
        for finding in attempt.of("runout-changed"):
            truth = 2.0 * abs(rotor.truth[str(finding.subject.station)])
            limit = float(finding.inputs["limit"] or 0.0)
            # The error of a length is at most that of the vector: three standard ones in two axes.
            room = 2.0 * float(finding.inputs["expanded_uncertainty"] or 0.0)
            if finding.verdict is Verdict.WITHIN:
                assert truth <= limit + room, (seed, finding.message)
            elif finding.verdict is Verdict.OUTSIDE:
                assert truth >= limit - room, (seed, finding.message)


def test_the_truth_and_the_readings_do_not_share_a_seed() -> None:
    assert make(1).truth != make(2).truth
