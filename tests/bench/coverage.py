"""How often the truth lies within the stated uncertainty, by component and by amount.

Run it as `python -m tests.bench.coverage [ROTORS]`; it asserts nothing. Each station's error is
taken along the true change and across it, as both are stated to have the same uncertainty. Stations
of one rotor share their journals' errors, so the interval is found by drawing whole rotors anew.
"""

import math
import sys
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.assess import assess
from tests.journeys.random_rotors import make

# Share of a normal error within twice its standard uncertainty.
_NORMAL_WITHIN_TWO = math.erf(2.0 / math.sqrt(2.0))
_DRAWS = 2000
# Mean, offset and ovality of a turn.
_FITTED = 5
# Amounts of the true change as a total, in micrometres.
_BANDS = ((0.0, 5.0), (5.0, 15.0), (15.0, 40.0), (40.0, math.inf))


@dataclass(frozen=True)
class Errors:
    """Errors over stated standard uncertainty, one row a station."""

    rotor: npt.NDArray[np.int64]
    tir: npt.NDArray[np.float64]
    along: npt.NDArray[np.float64]
    across: npt.NDArray[np.float64]


def errors(rotors: int) -> Errors:
    """Judge random rotors and compare each change with its truth."""
    rows = []
    for seed in range(rotors):
        rotor = make(seed)
        (attempt,) = assess(rotor.job).attempts
        for change in attempt.changes:
            if change.is_journal or change.change is None or change.expanded_uncertainty is None:
                continue
            truth = rotor.truth[change.key]
            turned = (change.change - truth) * truth.conjugate() / abs(truth)
            # The expanded uncertainty is that of a total, four times a component's standard one.
            standard = change.expanded_uncertainty / 4.0
            rows.append((seed, 2e6 * abs(truth), turned.real / standard, turned.imag / standard))
    table = np.array(rows)
    return Errors(table[:, 0].astype(np.int64), table[:, 1], table[:, 2], table[:, 3])


def expected(freedom: int) -> float:
    """Foresee the share for normal errors, by drawing: why it lies above the normal one.

    A station's variance is the greater of what its residuals say, with so many degrees of freedom,
    and the instrument's own, which is the true one here. A change counts two readings of its own
    and, half way between the journals, a quarter of each of their four.
    """
    random = np.random.default_rng(1)
    weights = np.array([1.0, 1.0, 0.25, 0.25, 0.25, 0.25])
    told = np.maximum(random.chisquare(freedom, (200_000, weights.size)) / freedom, 1.0)
    stated = np.sqrt(told @ weights / weights.sum())
    error = random.standard_normal(stated.size)
    return within(error / stated)


def within(values: npt.NDArray[np.float64]) -> float:
    """Give the share within twice the standard uncertainty."""
    return float((np.abs(values) <= 2.0).mean())


def interval(values: npt.NDArray[np.float64], rotor: npt.NDArray[np.int64]) -> tuple[float, float]:
    """Give a 95 % interval of that share, whole rotors drawn anew."""
    inside = (np.abs(values) <= 2.0).astype(np.float64)
    hits = np.bincount(rotor, weights=inside)
    counts = np.bincount(rotor)
    random = np.random.default_rng(20261201)
    drawn = random.integers(0, hits.size, (_DRAWS, hits.size))
    shares = hits[drawn].sum(axis=1) / counts[drawn].sum(axis=1)
    low, high = np.percentile(shares, [2.5, 97.5])
    return float(low), float(high)


def _line(name: str, values: npt.NDArray[np.float64], rotor: npt.NDArray[np.int64]) -> str:
    low, high = interval(values, rotor)
    return (
        f"{name:34} {values.size:6} {100 * within(values):6.2f} % "
        f"({100 * low:.2f} to {100 * high:.2f})   spread {float(values.std()):.3f} of the stated"
    )


def main() -> None:
    """Print a line for each component and amount."""
    rotors = int(sys.argv[1]) if len(sys.argv) > 1 else 1000
    found = errors(rotors)
    say = sys.stdout.write
    say(f"{rotors} rotors; a normal error lies within k = 2 in {100 * _NORMAL_WITHIN_TWO:.2f} %\n")
    freedom = len(make(0).job.plan.runout.marks) - _FITTED
    say(
        f"an uncertainty never below the instrument's, with {freedom} degrees of freedom: "
        f"{100 * expected(freedom):.2f} %\n"
    )
    say(_line("along the true change", found.along, found.rotor) + "\n")
    say(_line("across the true change", found.across, found.rotor) + "\n")
    for low, high in _BANDS:
        here = (found.tir >= low) & (found.tir < high)
        for name, values in (("along", found.along), ("across", found.across)):
            words = f"{name}, true total {low:g} to {high:g} µm"
            _, renumbered = np.unique(found.rotor[here], return_inverse=True)
            say(_line(words, values[here], renumbered) + "\n")


if __name__ == "__main__":
    main()
