"""A shaft bent along its length, by adding up the slope metre by metre."""

import numpy as np

__all__ = ["centreline", "kink_by_trial"]


def centreline(*, curvature, first_journal, second_journal, start, end, steps=200_001):
    """Positions and offsets of a shaft whose curvature is known, seen from its journals."""
    places = np.linspace(start, end, steps)
    step = places[1] - places[0]
    slope = np.cumsum(curvature(places)) * step
    offset = np.cumsum(slope) * step
    at_first, at_second = np.interp([first_journal, second_journal], places, offset)
    share = (places - first_journal) / (second_journal - first_journal)
    return places, offset - (at_first + (at_second - at_first) * share)


def kink_by_trial(*, positions, changes, spreads, step=0.0005):
    """Best place of one bend: for each trial place, two straight lines joined there.

    The unknowns are the offsets at the two ends and at the bend, in each of two planes.
    """
    best = (np.inf, None, None)
    low, high = min(positions), max(positions)
    for place in np.arange(sorted(positions)[1], sorted(positions)[-2] + step / 2, step):
        rows = []
        for position in positions:
            if position <= place:
                share = (position - low) / (place - low)
                rows.append([1 - share, share, 0])
            else:
                share = (position - place) / (high - place)
                rows.append([0, 1 - share, share])
        design = np.array(rows) / np.array(spreads)[:, None]
        target = np.array(changes) / np.array(spreads)
        knots, *_ = np.linalg.lstsq(design.astype(complex), target, rcond=None)
        squares = np.sum(np.abs(target - design @ knots) ** 2)
        if squares < best[0]:
            slope_before = (knots[1] - knots[0]) / (place - low)
            slope_after = (knots[2] - knots[1]) / (high - place)
            best = (squares, place, slope_before - slope_after)
    return best
