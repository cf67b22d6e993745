"""A stepped shaft on two rigid bearings as a beam: its sag and its first critical speed.

Slender-beam theory: flexibility by virtual work, mass by cubic elements; neither shear nor the
springs of real bearings.
"""

import itertools
import math
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_positive
from models.engineering.shaft import STANDARD_GRAVITY, AddedMass, StepSection

__all__ = [
    "CriticalSpeed",
    "StaticDeflection",
    "first_critical_speed",
    "static_deflection",
]

_Array = npt.NDArray[np.float64]
_SAME_PLACE = 1e-9
_SAMPLES_PER_ELEMENT = 9
_FEWEST_ELEMENTS = 8
_REFINEMENTS = (1, 2, 4, 8, 16)


@dataclass(frozen=True, eq=False)
class StaticDeflection:
    """The sag of a shaft at rest under its own weight and that of its parts."""

    positions: _Array
    """Axial positions from one end of the shaft to the other, [m]"""
    deflections: _Array
    """Deflection at each, positive downwards, from the line through the bearings, [m]"""
    greatest: float
    """Deflection farthest from zero, with its sign, [m]"""
    greatest_position: float
    """Axial position of it, [m]"""


@dataclass(frozen=True)
class CriticalSpeed:
    """A first critical speed with what shows that the mesh no longer matters."""

    speed: float
    """First critical speed, [rad/s]"""
    element_count: int
    """Number of beam elements of the last calculation, [-]"""
    change_on_refinement: float
    """Relative change from half as many elements in each interval, [-]"""


@dataclass(frozen=True, eq=False)
class _Mesh:
    nodes: _Array
    stiffness: _Array
    mass_per_length: _Array


def _ordered(sections: list[StepSection]) -> list[StepSection]:
    if not sections:
        raise OutOfRangeError("sections", len(sections), "hold at least one section")
    ordered = sorted(sections, key=lambda section: section.start)
    for before, after in itertools.pairwise(ordered):
        if abs(after.start - before.end) > _SAME_PLACE:
            raise OutOfRangeError(
                "sections", after.start, f"follow each other without gap, here at {before.end!r}"
            )
    return ordered


def _demand_on_shaft(name: str, position: float, sections: list[StepSection]) -> None:
    demand_finite(name, position)
    start, end = sections[0].start, sections[-1].end
    if not start - _SAME_PLACE <= position <= end + _SAME_PLACE:
        raise OutOfRangeError(name, position, f"lie on the shaft, from {start!r} to {end!r}")


def _stations(
    sections: list[StepSection], added_masses: list[AddedMass], bearings: tuple[float, float]
) -> _Array:
    places = [sections[0].start, *(section.end for section in sections)]
    places += [part.position for part in added_masses]
    places += list(bearings)
    clipped = np.clip(np.sort(np.array(places)), sections[0].start, sections[-1].end)
    apart = np.concatenate(([True], np.diff(clipped) > _SAME_PLACE))
    return np.asarray(clipped[apart], dtype=np.float64)


def _mesh(sections: list[StepSection], stations: _Array, refinement: int) -> _Mesh:
    lengths = np.diff(stations)
    longest = (stations[-1] - stations[0]) / _FEWEST_ELEMENTS
    counts = refinement * np.ceil(lengths / longest).astype(int)
    pieces = [
        start + length * np.arange(count) / count
        for start, length, count in zip(stations, lengths, counts, strict=False)
    ]
    nodes = np.append(np.concatenate(pieces), stations[-1])
    middles = (nodes[:-1] + nodes[1:]) / 2.0
    ends = np.array([section.end for section in sections])
    owner = np.minimum(np.searchsorted(ends, middles), len(sections) - 1)
    stiffness = np.array([section.bending_stiffness for section in sections])
    mass_per_length = np.array([section.mass_per_length for section in sections])
    return _Mesh(nodes=nodes, stiffness=stiffness[owner], mass_per_length=mass_per_length[owner])


def _flexibility_root(mesh: _Mesh, bearings: tuple[float, float]) -> _Array:
    """Matrix whose product with its transpose is the flexibility of the nodes, by virtual work.

    A row holds the bending moments that a unit force, or a unit moment, at a node makes at two
    Gauss points of each element: exact, because they vary linearly between nodes. Inverting a
    stiffness instead loses every digit where a section is very short.
    """
    first, second = bearings
    lengths = np.diff(mesh.nodes)
    middles = (mesh.nodes[:-1] + mesh.nodes[1:]) / 2.0
    away = lengths / (2.0 * math.sqrt(3.0))
    points = np.concatenate([middles - away, middles + away])
    weights = np.tile(np.sqrt(lengths / (2.0 * mesh.stiffness)), 2)
    beyond_first = np.maximum(points - first, 0.0)
    beyond_second = np.maximum(points - second, 0.0)
    on_second = ((mesh.nodes - first) / (second - first))[:, None]
    beyond_node = points - mesh.nodes[:, None]
    by_force = np.maximum(beyond_node, 0.0) - (1.0 - on_second) * beyond_first
    by_force -= on_second * beyond_second
    by_moment = (beyond_first - beyond_second) / (second - first) - (beyond_node > 0.0)
    root = np.empty((2 * mesh.nodes.size, points.size))
    root[0::2] = by_force * weights
    root[1::2] = by_moment * weights
    return root


def _element_mass(mass_per_length: float, length: float) -> _Array:
    ell = length
    pattern = np.array(
        [
            [156.0, 22.0 * ell, 54.0, -13.0 * ell],
            [22.0 * ell, 4.0 * ell**2, 13.0 * ell, -3.0 * ell**2],
            [54.0, 13.0 * ell, 156.0, -22.0 * ell],
            [-13.0 * ell, -3.0 * ell**2, -22.0 * ell, 4.0 * ell**2],
        ]
    )
    return mass_per_length * ell / 420.0 * pattern


def _assembled_mass(mesh: _Mesh, added_masses: list[AddedMass]) -> _Array:
    whole = np.zeros((2 * mesh.nodes.size, 2 * mesh.nodes.size))
    for index, length in enumerate(np.diff(mesh.nodes)):
        place = slice(2 * index, 2 * index + 4)
        whole[place, place] += _element_mass(float(mesh.mass_per_length[index]), float(length))
    for part in added_masses:
        node = _node_at(mesh.nodes, part.position)
        whole[2 * node, 2 * node] += part.mass
        whole[2 * node + 1, 2 * node + 1] += part.transverse_inertia - part.polar_inertia
    return whole


def _node_at(nodes: _Array, position: float) -> int:
    return int(np.argmin(np.abs(nodes - position)))


def _checked(
    sections: list[StepSection],
    added_masses: list[AddedMass],
    first_bearing: float,
    second_bearing: float,
) -> list[StepSection]:
    ordered = _ordered(sections)
    _demand_on_shaft("first_bearing", first_bearing, ordered)
    _demand_on_shaft("second_bearing", second_bearing, ordered)
    if not second_bearing > first_bearing + _SAME_PLACE:
        raise OutOfRangeError("second_bearing", second_bearing, "lie beyond first_bearing")
    for part in added_masses:
        _demand_on_shaft("added_masses", part.position, ordered)
    return ordered


def _sampled(mesh: _Mesh, nodal: _Array) -> tuple[_Array, _Array]:
    """Deflection between the nodes: the cubic through them plus the sag of a clamped element."""
    fraction = np.arange(_SAMPLES_PER_ELEMENT - 1) / (_SAMPLES_PER_ELEMENT - 1)
    length = np.diff(mesh.nodes)[:, None]
    value, slope = nodal[0::2], nodal[1::2]
    weight = (mesh.mass_per_length * STANDARD_GRAVITY / mesh.stiffness)[:, None]
    cubic = (
        value[:-1, None] * (1.0 - 3.0 * fraction**2 + 2.0 * fraction**3)
        + slope[:-1, None] * length * fraction * (1.0 - fraction) ** 2
        + value[1:, None] * fraction**2 * (3.0 - 2.0 * fraction)
        - slope[1:, None] * length * fraction**2 * (1.0 - fraction)
    )
    clamped = weight * length**4 * fraction**2 * (1.0 - fraction) ** 2 / 24.0
    positions = (mesh.nodes[:-1, None] + length * fraction).ravel()
    deflections = (cubic + clamped).ravel()
    return np.append(positions, mesh.nodes[-1]), np.append(deflections, value[-1])


def static_deflection(
    *,
    sections: list[StepSection],
    added_masses: list[AddedMass],
    first_bearing: float,
    second_bearing: float,
) -> StaticDeflection:
    r"""Sag of a stepped shaft with parts on it, lying in two bearings that let it tilt.

    .. math::

        \frac{d^2}{dz^2}\left(E I \frac{d^2 w}{dz^2}\right) = \mu g + \sum m_k g\, \delta(z - z_k)
        \qquad w(z_1) = w(z_2) = 0

    Parameters
    ----------
    sections : list of StepSection
        Sections of the shaft that follow each other without gap, [m, Pa, kg/m³]
    added_masses : list of AddedMass
        Parts on the shaft, :math:`m_k` at :math:`z_k`; may be empty, [m, kg]
    first_bearing : float
        Axial position of one bearing, :math:`z_1`, [m]
    second_bearing : float
        Axial position of the other, beyond the first, :math:`z_2`, [m]

    Returns
    -------
    deflection : StaticDeflection
        Deflections from one end of the shaft to the other, positive downwards, [m]

    Raises
    ------
    OutOfRangeError
        If the sections leave a gap, or a bearing or a part lies beside the shaft.

    Notes
    -----
    Exact for a slender stepped beam, whatever the mesh; only the greatest value is the greatest of
    samples, at least 256 over the length, and so up to 0.002 % low. Shear adds to the sag, and a
    step stiffens less than its drawing says; both matter on short, thick shafts. A part adds no
    stiffness.

    Examples
    --------
    100 kg amid 1 m of a shaft of nearly no mass, E I = 20 000 N·m²: F L³/(48 E I) = 1.0215 mm.

    >>> from math import pi
    >>> shaft = StepSection(start=0.0, end=1.0, outer_diameter=(64e-7 / pi) ** 0.25,
    ...                     inner_diameter=0.0, modulus=200e9, density=1e-6)
    >>> sag = static_deflection(sections=[shaft],
    ...                         added_masses=[AddedMass(position=0.5, mass=100.0)],
    ...                         first_bearing=0.0, second_bearing=1.0)
    >>> sag.greatest * 1e3, sag.greatest_position
    (1.0215, 0.500)

    References
    ----------
    Beam theory: virtual work and cubic elements, as in any text on either, from memory.
    """
    ordered = _checked(sections, added_masses, first_bearing, second_bearing)
    bearings = (first_bearing, second_bearing)
    mesh = _mesh(ordered, _stations(ordered, added_masses, bearings), 4)
    load = np.zeros(2 * mesh.nodes.size)
    for index, length in enumerate(np.diff(mesh.nodes)):
        weight = mesh.mass_per_length[index] * STANDARD_GRAVITY * length
        share = np.array([0.5, length / 12.0, 0.5, -length / 12.0])
        load[2 * index : 2 * index + 4] += weight * share
    for part in added_masses:
        load[2 * _node_at(mesh.nodes, part.position)] += part.mass * STANDARD_GRAVITY
    root = _flexibility_root(mesh, bearings)
    nodal = root @ (root.T @ load)
    positions, deflections = _sampled(mesh, nodal)
    place = int(np.argmax(np.abs(deflections)))
    return StaticDeflection(
        positions=positions,
        deflections=deflections,
        greatest=float(deflections[place]),
        greatest_position=float(positions[place]),
    )


def _lowest_speed(
    mesh: _Mesh, added_masses: list[AddedMass], bearings: tuple[float, float]
) -> float:
    """Root of the largest flexibility times mass; a gyroscopic disc makes the mass indefinite."""
    root = _flexibility_root(mesh, bearings)
    seen = root.T @ _assembled_mass(mesh, added_masses) @ root
    return 1.0 / math.sqrt(float(np.linalg.eigvalsh((seen + seen.T) / 2.0)[-1]))


def first_critical_speed(
    *,
    sections: list[StepSection],
    added_masses: list[AddedMass],
    first_bearing: float,
    second_bearing: float,
    greatest_change: float = 1e-6,
) -> CriticalSpeed:
    r"""First critical speed of a stepped shaft with parts on it, on two rigid bearings.

    The shaft whirls with its rotation, so that a part counts with its transverse less its polar
    inertia:

    .. math:: \left(\mathbf K - \omega^2 \mathbf M\right) \mathbf w = 0

    Parameters
    ----------
    sections : list of StepSection
        Sections of the shaft that follow each other without gap, [m, Pa, kg/m³]
    added_masses : list of AddedMass
        Parts on the shaft; may be empty, [m, kg, kg·m²]
    first_bearing : float
        Axial position of one bearing, [m]
    second_bearing : float
        Axial position of the other, beyond the first, [m]
    greatest_change : float
        Relative change by halving every element at which the mesh is fine enough, [-]

    Returns
    -------
    critical : CriticalSpeed
        Speed, number of elements and the change of the last refinement, [rad/s]

    Raises
    ------
    OutOfRangeError
        If the sections leave a gap, a bearing or a part lies beside the shaft, or the mesh does
        not settle to the change asked for.

    Notes
    -----
    Real bearings and pedestals lower the speed. Shear lowers it too, by about 1 % at a length of
    ten diameters and 3 to 4 % at five; the shaft's own rotary inertia is not counted. With polar
    inertia 0 the result is the natural frequency of the shaft that does not turn.

    Examples
    --------
    100 kg amid 1 m of a shaft of nearly no mass, E I = 20 000 N·m²: √(48 E I/(m L³)) = √9600.

    >>> from math import pi
    >>> shaft = StepSection(start=0.0, end=1.0, outer_diameter=(64e-7 / pi) ** 0.25,
    ...                     inner_diameter=0.0, modulus=200e9, density=1e-6)
    >>> critical = first_critical_speed(sections=[shaft],
    ...                                 added_masses=[AddedMass(position=0.5, mass=100.0)],
    ...                                 first_bearing=0.0, second_bearing=1.0)
    >>> critical.speed
    97.980

    References
    ----------
    Beam theory: virtual work, and consistent mass of cubic elements, as in any text on either, from
    memory.
    """
    demand_positive("greatest_change", greatest_change)
    ordered = _checked(sections, added_masses, first_bearing, second_bearing)
    bearings = (first_bearing, second_bearing)
    stations = _stations(ordered, added_masses, bearings)
    coarse = math.inf
    change = math.inf
    for refinement in _REFINEMENTS:
        mesh = _mesh(ordered, stations, refinement)
        speed = _lowest_speed(mesh, added_masses, bearings)
        change = abs(speed - coarse) / speed
        if change <= greatest_change:
            return CriticalSpeed(
                speed=speed, element_count=mesh.nodes.size - 1, change_on_refinement=change
            )
        coarse = speed
    raise OutOfRangeError(
        "greatest_change", greatest_change, f"exceed what the mesh can show, here {change:.1e}"
    )
