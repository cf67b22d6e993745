"""What the eye makes of two colours: contrast, difference, and the eyes that miss a receptor."""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

Components = NDArray[np.float64]

# Machado, Oliveira and Fernandes 2009, full strength; the matrices from memory.
MISSING_RECEPTOR = {
    "normal": np.eye(3),
    "protan": np.array(
        [
            [0.152286, 1.052583, -0.204868],
            [0.114503, 0.786281, 0.099216],
            [-0.003882, -0.048116, 1.051998],
        ]
    ),
    "deutan": np.array(
        [
            [0.367322, 0.860646, -0.227968],
            [0.280085, 0.672501, 0.047413],
            [-0.011820, 0.042940, 0.968881],
        ]
    ),
    "tritan": np.array(
        [
            [1.255528, -0.076749, -0.178779],
            [-0.078411, 0.930809, 0.147602],
            [0.004733, 0.691367, 0.303900],
        ]
    ),
}


def linear_components(code: str) -> Components:
    coded = np.array([int(code[first : first + 2], 16) / 255.0 for first in (1, 3, 5)])
    return np.where(coded <= 0.04045, coded / 12.92, ((coded + 0.055) / 1.055) ** 2.4)


def contrast_ratio(first: str, second: str) -> float:
    weights = np.array([0.2126, 0.7152, 0.0722])
    luminances = sorted(float(weights @ linear_components(code)) for code in (first, second))
    return (luminances[1] + 0.05) / (luminances[0] + 0.05)


def lightness_and_chroma(linear: Components) -> Components:
    to_xyz = np.array(
        [
            [0.4124564, 0.3575761, 0.1804375],
            [0.2126729, 0.7151522, 0.0721750],
            [0.0193339, 0.1191920, 0.9503041],
        ]
    )
    ratio = to_xyz @ linear / np.array([0.95047, 1.0, 1.08883])
    bent = np.where(ratio > (6 / 29) ** 3, np.cbrt(ratio), ratio / (3 * (6 / 29) ** 2) + 4 / 29)
    return np.array([116 * bent[1] - 16, 500 * (bent[0] - bent[1]), 200 * (bent[1] - bent[2])])


def colour_difference(first: Components, second: Components) -> float:
    """CIEDE2000 between two L*a*b* triples, after Sharma, Wu and Dalal 2005."""
    l1, a1, b1 = (float(value) for value in first)
    l2, a2, b2 = (float(value) for value in second)
    mean_chroma = (math.hypot(a1, b1) + math.hypot(a2, b2)) / 2
    share = 0.5 * (1 - math.sqrt(mean_chroma**7 / (mean_chroma**7 + 25.0**7)))
    a1, a2 = a1 * (1 + share), a2 * (1 + share)
    c1, c2 = math.hypot(a1, b1), math.hypot(a2, b2)
    h1 = math.degrees(math.atan2(b1, a1)) % 360 if c1 else 0.0
    h2 = math.degrees(math.atan2(b2, a2)) % 360 if c2 else 0.0
    turn = 0.0 if c1 * c2 == 0 else (h2 - h1 + 180) % 360 - 180
    hue = 2 * math.sqrt(c1 * c2) * math.sin(math.radians(turn / 2))
    light, chroma = (l1 + l2) / 2, (c1 + c2) / 2
    if c1 * c2 == 0:
        middle = h1 + h2
    elif abs(h1 - h2) <= 180:
        middle = (h1 + h2) / 2
    else:
        middle = (h1 + h2 + 360) / 2 if h1 + h2 < 360 else (h1 + h2 - 360) / 2
    tilt = (
        1
        - 0.17 * math.cos(math.radians(middle - 30))
        + 0.24 * math.cos(math.radians(2 * middle))
        + 0.32 * math.cos(math.radians(3 * middle + 6))
        - 0.20 * math.cos(math.radians(4 * middle - 63))
    )
    in_light = (l2 - l1) / (1 + 0.015 * (light - 50) ** 2 / math.sqrt(20 + (light - 50) ** 2))
    in_chroma = (c2 - c1) / (1 + 0.045 * chroma)
    in_hue = hue / (1 + 0.015 * chroma * tilt)
    rotation = (
        -2
        * math.sqrt(chroma**7 / (chroma**7 + 25.0**7))
        * math.sin(math.radians(60 * math.exp(-(((middle - 275) / 25) ** 2))))
    )
    return math.sqrt(in_light**2 + in_chroma**2 + in_hue**2 + rotation * in_chroma * in_hue)


def seen_difference(first: str, second: str, receptor: str) -> float:
    seen = [
        lightness_and_chroma(
            np.clip(MISSING_RECEPTOR[receptor] @ linear_components(code), 0.0, 1.0)
        )
        for code in (first, second)
    ]
    return colour_difference(*seen)
