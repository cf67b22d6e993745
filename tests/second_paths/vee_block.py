"""A lobed disc laid in a V and turned, found by letting it touch both flanks."""

import math

import numpy as np

__all__ = ["shown_size"]


def shown_size(*, included_angle, lobes, radius=1.0, size=1e-5, turns=360, points=7200):
    """How many times the lobes' size a flat tip above the block sees, with its sign."""
    around = np.linspace(0.0, 2.0 * math.pi, points, endpoint=False)
    half = included_angle / 2.0
    # The flanks' outward normals, as seen from the disc, point down to either side.
    flanks = [(math.cos(half), -math.sin(half)), (-math.cos(half), -math.sin(half))]
    heights = []
    turned = np.linspace(0.0, 2.0 * math.pi, turns, endpoint=False)
    for turn in turned:
        shape = radius + size * np.cos(lobes * (around - math.pi / 2 - turn))
        x, y = shape * np.cos(around), shape * np.sin(around)
        reach = [np.max(x * side + y * down) for side, down in flanks]
        centre = np.linalg.solve(np.array(flanks), [radius - one for one in reach])
        heights.append(centre[1] + np.max(y))
    return 2.0 * np.mean(np.array(heights) * np.cos(lobes * turned)) / size
