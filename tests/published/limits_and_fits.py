"""Published limits of size, as printed in their sources."""

from typing import NamedTuple

__all__ = ["FORCE_FITS", "INTERFERENCES", "LIMITS", "ForceRow", "InterferenceRow", "LimitRow"]


class LimitRow(NamedTuple):
    """Limits of one designation over one step of diameters."""

    source: str
    over: int
    """In mm."""
    to: int
    """In mm, itself included."""
    designation: str
    least: str
    """In µm, from the nominal diameter."""
    greatest: str


class InterferenceRow(NamedTuple):
    """Least and greatest interference of a fit over one step of diameters."""

    source: str
    over: int
    to: int
    hole: str
    shaft: str
    least: str
    greatest: str


class ForceRow(NamedTuple):
    """A force fit in thousandths of an inch."""

    source: str
    over: float
    """In inches."""
    to: float
    force_class: str
    least: str
    greatest: str
    shaft_least: str | None
    shaft_greatest: str | None


_SHAFTS = "Narayana et al., Machine Drawing, tables 15.2 and 15.3, with IT6 of ISO 286"
_HOLES = "ISO 286-1 table 1 as reproduced on a public page"
_NAMES = ("H7", "H6", "n6", "p6", "r6", "s6", "u6")

_PRINTED = {
    (50, 65): "0/30 0/19 20/39 32/51 41/60 53/72 87/106",
    (65, 80): "0/30 0/19 20/39 32/51 43/62 59/78 102/121",
    (80, 100): "0/35 0/22 23/45 37/59 51/73 71/93 124/146",
    (100, 120): "0/35 0/22 23/45 37/59 54/76 79/101 144/166",
    (120, 140): "0/40 0/25 27/52 43/68 63/88 92/117 170/195",
    (140, 160): "0/40 0/25 27/52 43/68 65/90 100/125 190/215",
    (180, 200): "0/46 0/29 31/60 50/79 77/106 122/151 236/265",
    (200, 225): "0/46 0/29 31/60 50/79 80/109 130/159 258/287",
    (225, 250): "0/46 0/29 31/60 50/79 84/113 140/169 284/313",
    (280, 315): "0/52 0/32 34/66 56/88 98/130 170/202 350/382",
}

LIMITS = [
    LimitRow(_HOLES if name[0] == "H" else _SHAFTS, over, to, name, *pair.split("/"))
    for (over, to), line in _PRINTED.items()
    for name, pair in zip(_NAMES, line.split(), strict=True)
] + [
    LimitRow("Bhandari, Design of Machine Elements, example 3.3", 49, 50, "H7", "0", "25"),
    LimitRow("Bhandari, Design of Machine Elements, example 3.3", 49, 50, "s6", "43", "59"),
    LimitRow("Shigley solutions, problem 3-64", 39, 40, "s6", "43", "59"),
    LimitRow("Shigley solutions, problem 3-64", 39, 40, "H7", "0", "25"),
    LimitRow("h6 as printed on a public page", 50, 80, "h6", "-19", "0"),
    LimitRow("h6 as printed on a public page", 80, 120, "h6", "-22", "0"),
    LimitRow("h6 as printed on a public page", 120, 180, "h6", "-25", "0"),
    LimitRow("h6 as printed on a public page", 180, 250, "h6", "-29", "0"),
    LimitRow("h6 as printed on a public page", 250, 315, "h6", "-32", "0"),
]

_BY_HAND = "by hand: difference of the printed limits"
_FITS = {
    (50, 65): "23/72 57/106",
    (65, 80): "29/78 72/121",
    (80, 100): "36/93 89/146",
    (100, 120): "44/101 109/166",
    (120, 140): "52/117 130/195",
    (140, 160): "60/125 150/215",
    (180, 200): "76/151 190/265",
    (200, 225): "84/159 212/287",
    (225, 250): "94/169 238/313",
    (280, 315): "118/202 298/382",
}
INTERFERENCES = [
    InterferenceRow(_BY_HAND, over, to, "H7", shaft, *pair.split("/"))
    for (over, to), line in _FITS.items()
    for shaft, pair in zip(("s6", "u6"), line.split(), strict=True)
]

_27 = "Machinery's Handbook, 27th ed., table 11, p. 663 (ANSI B4.1-1967)"
_31 = "Machinery's Handbook, 31st ed., table 11 (ANSI B4.1-1967)"
# The five classes' interference, then the shaft's limits in class FN2 as the table prints them.
_FORCE = {
    (_27, 1.97, 2.56): "0.6-1.8 0.8-2.7 1.3-3.2 2.3-4.2 3.2-6.2 2.0-2.7",
    (_27, 2.56, 3.15): "0.7-1.9 1.0-2.9 1.8-3.7 2.8-4.7 4.2-7.2 2.2-2.9",
    (_27, 3.15, 3.94): "0.9-2.4 1.4-3.7 2.1-4.4 3.6-5.9 4.8-8.4 2.8-3.7",
    (_31, 4.73, 5.52): "1.2-2.9 1.9-4.5 3.4-6.0 5.4-8.0 7.5-11.6 3.5-4.5",
    (_31, 5.52, 6.30): "1.5-3.2 2.4-5.0 3.4-6.0 5.4-8.0 9.5-13.6 4.0-5.0",
    (_31, 7.09, 7.88): "1.8-3.8 3.2-6.2 5.2-8.2 7.2-10.2 11.2-15.8 5.0-6.2",
    (_31, 7.88, 8.86): "2.3-4.3 3.2-6.2 5.2-8.2 8.2-11.2 13.2-17.8 5.0-6.2",
    (_31, 9.85, 11.03): "2.8-4.9 4.0-7.2 7.0-10.2 10.0-13.2 15.0-20.0 6.0-7.2",
}


def _force_rows() -> list[ForceRow]:
    rows = []
    for (source, over, to), line in _FORCE.items():
        *classes, shaft = (pair.split("-") for pair in line.split())
        for number, (least, greatest) in enumerate(classes, start=1):
            of_shaft = shaft if number == 2 else (None, None)
            rows.append(ForceRow(source, over, to, f"FN{number}", least, greatest, *of_shaft))
    return rows


FORCE_FITS = _force_rows()
