"""What each kind of part looks like from the side: cut areas, seen edges and silhouette."""

from __future__ import annotations

import itertools
from dataclasses import dataclass

from reports.sheet.elements import Point
from reports.sheet.pictures import Facing, PartKind, PartOutline

__all__ = ["PartShape", "shape_of"]

_CURVE_POINTS = 14


@dataclass(frozen=True, slots=True, kw_only=True)
class PartShape:
    """A part in its own plane: distance along the rotor and radius [m].

    Attributes
    ----------
    cut : tuple
        Closed areas of the half in section [m].
    seen : tuple
        Lines seen behind the cut, such as a blade's edges [m].
    silhouette : tuple
        Closed outline of the half seen from outside, down to the axis [m].
    edges : tuple
        Lines seen on it from outside, each from the axis outwards [m].
    """

    cut: tuple[tuple[Point, ...], ...]
    seen: tuple[tuple[Point, ...], ...]
    silhouette: tuple[Point, ...]
    edges: tuple[tuple[Point, ...], ...]


def shape_of(*, part: PartOutline) -> PartShape:
    """Draw a part in its own plane.

    Parameters
    ----------
    part : PartOutline
        Its kind and sizes.

    Returns
    -------
    PartShape
        Areas and lines in distance along the rotor and radius [m].

    Raises
    ------
    ValueError
        If the part has no length, or its outer diameter is not above its bore.

    Notes
    -----
    Ends, bore and outer diameter are to scale. What lies between, an impeller's curves or a
    disc's web, is a usual shape: the record does not know it and nothing is read from it.

    Examples
    --------
    >>> sleeve = PartOutline(key="a", name="a", kind=PartKind.SLEEVE, start=1.0, end=2.0,
    ...                      bore_diameter=0.2, outer_diameter=0.4)
    >>> shape_of(part=sleeve).cut
    (((1.0, 0.1), (1.0, 0.2), (2.0, 0.2), (2.0, 0.1)),)
    """
    if part.end <= part.start:
        raise ValueError(f"{part.name}: its end must lie beyond its start")
    if part.outer_diameter <= part.bore_diameter:
        raise ValueError(f"{part.name}: its outer diameter must be above its bore")
    if part.kind is PartKind.IMPELLER:
        return _impeller(part)
    return _stepped(part, _STEPS[part.kind](part))


def _along(part: PartOutline, share: float) -> float:
    length = part.end - part.start
    if part.facing is Facing.DRIVE_END:
        return part.start + share * length
    return part.end - share * length


def _curve(first: Point, leaving: Point, arriving: Point, last: Point) -> tuple[Point, ...]:
    points = []
    for index in range(_CURVE_POINTS + 1):
        t = index / _CURVE_POINTS
        weights = ((1 - t) ** 3, 3 * t * (1 - t) ** 2, 3 * t * t * (1 - t), t**3)
        corners = (first, leaving, arriving, last)
        points.append(
            (
                sum(weight * corner[0] for weight, corner in zip(weights, corners, strict=True)),
                sum(weight * corner[1] for weight, corner in zip(weights, corners, strict=True)),
            )
        )
    return tuple(points)


def _hub_radius(part: PartOutline, usual: float) -> float:
    bore, outer = part.bore_diameter / 2.0, part.outer_diameter / 2.0
    wanted = part.hub_diameter / 2.0 if part.hub_diameter else usual * bore
    return min(max(wanted, bore + 0.04 * (outer - bore)), bore + 0.8 * (outer - bore))


def _impeller(part: PartOutline) -> PartShape:
    bore, outer = part.bore_diameter / 2.0, part.outer_diameter / 2.0
    hub = _hub_radius(part, 1.1)
    rise = outer - hub
    eye = hub + 0.36 * rise
    ring = 0.055 * rise

    def placed(points: tuple[Point, ...]) -> tuple[Point, ...]:
        return tuple((_along(part, share), radius) for share, radius in points)

    floor = _curve((0.0, hub), (0.34, hub + 0.03 * rise), (0.62, hub + 0.40 * rise), (0.64, outer))
    back = _curve(
        (0.84, outer),
        (0.86, hub + 0.55 * rise),
        (0.86, hub + 0.12 * rise),
        (1.0, hub + 0.02 * rise),
    )
    roof = _curve((0.0, eye), (0.27, eye), (0.47, eye + 0.45 * (outer - eye)), (0.50, outer))
    cover = _curve(
        (0.39, outer),
        (0.37, eye + ring + 0.45 * (outer - eye)),
        (0.25, eye + 2.2 * ring),
        (0.13, eye + 1.6 * ring),
    )
    lip = ((0.13, eye + ring), (0.0, eye + ring))
    disc_area = ((0.0, bore), *floor, *back, (1.0, bore))
    cover_area = (*roof, *cover, *lip)
    blade = (roof[3], floor[4])
    exit_edge = ((0.50, outer), (0.64, outer))
    outside = ((0.0, 0.0), *reversed(lip), *reversed(cover), *back, (1.0, 0.0))
    edges = tuple(((share, 0.0), (share, outer)) for share in (0.39, 0.50, 0.64, 0.84))
    return PartShape(
        cut=(placed(disc_area), placed(cover_area)),
        seen=(placed(blade), placed(exit_edge)),
        silhouette=placed(outside),
        edges=tuple(placed(edge) for edge in edges),
    )


Steps = tuple[tuple[float, float, float], ...]


def _plain(part: PartOutline) -> Steps:
    return ((0.0, 1.0, part.outer_diameter / 2.0),)


def _relieved(part: PartOutline) -> Steps:
    outer, bore = part.outer_diameter / 2.0, part.bore_diameter / 2.0
    neck = bore + 0.72 * (outer - bore)
    return ((0.0, 0.06, neck), (0.06, 0.94, outer), (0.94, 1.0, neck))


def _nut(part: PartOutline) -> Steps:
    outer, bore = part.outer_diameter / 2.0, part.bore_diameter / 2.0
    return ((0.0, 0.75, outer), (0.75, 1.0, bore + 0.75 * (outer - bore)))


def _collar(part: PartOutline) -> Steps:
    return ((0.0, 0.42, part.outer_diameter / 2.0), (0.42, 1.0, _hub_radius(part, 1.25)))


def _coupling_hub(part: PartOutline) -> Steps:
    return ((0.0, 0.22, part.outer_diameter / 2.0), (0.22, 1.0, _hub_radius(part, 1.35)))


def _disc(part: PartOutline) -> Steps:
    if part.hub_diameter is None:
        return _plain(part)
    hub, outer = _hub_radius(part, 1.3), part.outer_diameter / 2.0
    return ((0.0, 0.28, hub), (0.28, 0.72, outer), (0.72, 1.0, hub))


def _wheel(part: PartOutline) -> Steps:
    outer, hub = part.outer_diameter / 2.0, _hub_radius(part, 1.35)
    rim = hub + 0.62 * (outer - hub)
    return (
        (0.0, 0.22, hub),
        (0.22, 0.32, rim),
        (0.32, 0.68, outer),
        (0.68, 0.78, rim),
        (0.78, 1.0, hub),
    )


_STEPS = {
    PartKind.SLEEVE: _plain,
    PartKind.RING: _plain,
    PartKind.DISC: _disc,
    PartKind.DRUM: _relieved,
    PartKind.COLLAR: _collar,
    PartKind.HUB: _coupling_hub,
    PartKind.NUT: _nut,
    PartKind.WHEEL: _wheel,
}


def _stepped(part: PartOutline, steps: Steps) -> PartShape:
    bore = part.bore_diameter / 2.0
    profile: list[Point] = []
    for begin, finish, radius in steps:
        profile += [(_along(part, begin), radius), (_along(part, finish), radius)]
    first, last = _along(part, 0.0), _along(part, 1.0)
    edges = tuple(
        ((_along(part, after[0]), 0.0), (_along(part, after[0]), min(before[2], after[2])))
        for before, after in itertools.pairwise(steps)
    )
    return PartShape(
        cut=(((first, bore), *profile, (last, bore)),),
        seen=(),
        silhouette=((first, 0.0), *profile, (last, 0.0)),
        edges=edges,
    )
