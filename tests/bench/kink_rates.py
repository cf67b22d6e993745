"""How often noise alone looks like a kink, or a second one; run by hand, prints shares.

`python -m tests.bench.kink_rates`
"""

import sys

import numpy as np

from models.engineering.bow import fit_one_kink, fit_two_kinks, kink_shape

__all__ = ["chance_improvements", "main"]

MICRON = 1e-6


def chance_improvements(*, surveys, seed, bend=0.0):
    """Improvements by a first and by a second kink over surveys that have one bend or none."""
    source = np.random.default_rng(seed)
    first, second = [], []
    for _ in range(surveys):
        count = int(source.integers(8, 15))
        positions = np.sort(source.uniform(0.0, 2.0, size=count))
        spreads = source.uniform(0.4, 0.8, size=count) * MICRON
        noise = (source.normal(size=count) + 1j * source.normal(size=count)) * spreads
        shape = kink_shape(
            positions=positions,
            kink_position=float(source.uniform(positions[1], positions[-2])),
            first_journal=float(positions[0]),
            second_journal=float(positions[-1]),
        )
        survey = {
            "positions": positions,
            "changes": noise + bend * np.exp(1j * source.uniform(0, 6.28)) * shape,
            "uncertainties": spreads,
            "first_journal_position": float(positions[0]),
            "second_journal_position": float(positions[-1]),
        }
        first.append(fit_one_kink(**survey).improvement)
        second.append(fit_two_kinks(**survey).improvement)
    return np.array(first), np.array(second)


def main(surveys=2000):
    for name, bend in (("no bend", 0.0), ("one bend of 60 µrad", 60e-6)):
        first, second = chance_improvements(surveys=surveys, seed=11, bend=bend)
        for kink, found in (("first", first), ("second", second)):
            shares = ", ".join(f"{level}: {np.mean(found > level):.2%}" for level in (10, 12, 14))
            top = np.percentile(found, 99)
            sys.stdout.write(f"{name}, {kink} kink beyond {shares}; 99th percentile {top:.1f}\n")


if __name__ == "__main__":
    main()
