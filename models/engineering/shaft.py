"""The shaft as a drawing shows it: shear by torque, slenderness, weights on the journals."""

import math
from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "STANDARD_GRAVITY",
    "AddedMass",
    "JournalLoads",
    "StepSection",
    "flexibility_factor",
    "journal_loads",
    "journal_loads_from_centre_of_gravity",
    "shaft_shear_stress",
    "span_over_diameter",
]

STANDARD_GRAVITY = 9.80665
"""Standard acceleration of free fall, [m/s²]; 3rd General Conference on Weights and Measures, 1901,
from memory."""


@dataclass(frozen=True)
class StepSection:
    """A stretch of the shaft of one outer and one inner diameter and one material."""

    start: float
    """Axial position where it begins, [m]"""
    end: float
    """Axial position where it ends, [m]"""
    outer_diameter: float
    """Outer diameter, [m]"""
    inner_diameter: float
    """Diameter of its bore; 0 where it is solid, [m]"""
    modulus: float
    """Young's modulus, [Pa]"""
    density: float
    """Density, [kg/m³]"""

    def __post_init__(self) -> None:
        demand_finite("start", self.start)
        demand_finite("end", self.end)
        if not self.end > self.start:
            raise OutOfRangeError("end", self.end, f"exceed start = {self.start!r}")
        demand_positive("outer_diameter", self.outer_diameter)
        demand_not_negative("inner_diameter", self.inner_diameter)
        if not self.inner_diameter < self.outer_diameter:
            raise OutOfRangeError("inner_diameter", self.inner_diameter, "be less than the outer")
        demand_positive("modulus", self.modulus)
        demand_positive("density", self.density)

    @property
    def length(self) -> float:
        """Length, [m]."""
        return self.end - self.start

    @property
    def mass_per_length(self) -> float:
        """Mass of one metre of it, [kg/m]."""
        return self.density * math.pi / 4.0 * (self.outer_diameter**2 - self.inner_diameter**2)

    @property
    def bending_stiffness(self) -> float:
        """Young's modulus times second moment of area, [N·m²]."""
        return self.modulus * math.pi / 64.0 * (self.outer_diameter**4 - self.inner_diameter**4)


@dataclass(frozen=True)
class AddedMass:
    """A part on the shaft that adds mass and, counted on the safe side, no stiffness."""

    position: float
    """Axial position of its centre of gravity, [m]"""
    mass: float
    """Mass, [kg]"""
    transverse_inertia: float = 0.0
    """Moment of inertia about a diameter through its centre of gravity, [kg·m²]"""
    polar_inertia: float = 0.0
    """Moment of inertia about the axis of rotation, [kg·m²]"""

    def __post_init__(self) -> None:
        demand_finite("position", self.position)
        demand_not_negative("mass", self.mass)
        demand_not_negative("transverse_inertia", self.transverse_inertia)
        demand_not_negative("polar_inertia", self.polar_inertia)


@dataclass(frozen=True)
class JournalLoads:
    """What a rotor at rest puts on its two journals; calculated, so it cannot close a balance."""

    mass: float
    """Mass of the rotor, [kg]"""
    centre_of_gravity: float
    """Axial position of its centre of gravity, [m]"""
    first: float
    """Load on the journal at the smaller axial position; negative where it lifts, [N]"""
    second: float
    """Load on the journal at the larger axial position; negative where it lifts, [N]"""

    @property
    def lifts(self) -> bool:
        """Whether a journal must be held down, because the rotor overhangs."""
        return self.first < 0.0 or self.second < 0.0


def journal_loads_from_centre_of_gravity(
    *,
    mass: float,
    centre_of_gravity: float,
    first_journal: float,
    second_journal: float,
) -> JournalLoads:
    r"""Load on each of two journals from the mass and the centre of gravity of the rotor.

    Moments about each journal in turn:

    .. math::

        F_1 = m g \frac{z_2 - z_c}{z_2 - z_1} \qquad F_2 = m g \frac{z_c - z_1}{z_2 - z_1}

    Parameters
    ----------
    mass : float
        Mass of the rotor, :math:`m`, [kg]
    centre_of_gravity : float
        Axial position of the centre of gravity, :math:`z_c`, [m]
    first_journal : float
        Axial position of one journal, :math:`z_1`, [m]
    second_journal : float
        Axial position of the other, beyond the first, :math:`z_2`, [m]

    Returns
    -------
    loads : JournalLoads
        Loads, negative where a journal would lift, [N]

    Raises
    ------
    OutOfRangeError
        If the mass is not positive or the second journal does not lie beyond the first.

    Notes
    -----
    A journal of an overhung rotor may carry nothing or pull upwards. Weighed loads go before
    calculated ones: half the weight on each journal is an assumption, not a measurement.

    Examples
    --------
    1000 kg with its centre at a quarter of the span: three quarters and one quarter of 9806.65 N.

    >>> loads = journal_loads_from_centre_of_gravity(
    ...     mass=1000.0, centre_of_gravity=0.5, first_journal=0.0, second_journal=2.0)
    >>> loads.first, loads.second
    (7354.99, 2451.66)

    References
    ----------
    Statics, by hand. API 617:2002, chapter 1, annex B.3.2 for weighing and for negative loads.
    """
    demand_positive("mass", mass)
    demand_finite("centre_of_gravity", centre_of_gravity)
    demand_finite("first_journal", first_journal)
    demand_finite("second_journal", second_journal)
    if not second_journal > first_journal:
        raise OutOfRangeError("second_journal", second_journal, "lie beyond first_journal")
    share = (centre_of_gravity - first_journal) / (second_journal - first_journal)
    weight = mass * STANDARD_GRAVITY
    return JournalLoads(
        mass=mass,
        centre_of_gravity=centre_of_gravity,
        first=weight * (1.0 - share),
        second=weight * share,
    )


def journal_loads(
    *,
    sections: list[StepSection],
    added_masses: list[AddedMass],
    first_journal: float,
    second_journal: float,
) -> JournalLoads:
    r"""Mass, centre of gravity and journal loads of a stepped shaft with parts on it.

    .. math::

        m = \sum \mu_i l_i + \sum m_k \qquad
        m z_c = \sum \mu_i l_i \bar z_i + \sum m_k z_k

    Parameters
    ----------
    sections : list of StepSection
        Sections of the shaft, :math:`\mu_i` their mass per length, [m, Pa, kg/m³]
    added_masses : list of AddedMass
        Parts on the shaft, :math:`m_k`; may be empty, [m, kg]
    first_journal : float
        Axial position of one journal, [m]
    second_journal : float
        Axial position of the other, beyond the first, [m]

    Returns
    -------
    loads : JournalLoads
        Loads, negative where a journal would lift, [N]

    Raises
    ------
    OutOfRangeError
        If there is no section, or the second journal does not lie beyond the first.

    Notes
    -----
    Masses only: sections may be given in any order and may overlap, as a liner on a shaft does.

    Examples
    --------
    A bar of 1 kg/m (area 1 cm², density 10 000 kg/m³) of 1 m with 1 kg at its far end: 2 kg,
    centre at 0.75 m.

    >>> from math import pi, sqrt
    >>> bar = StepSection(start=0.0, end=1.0, outer_diameter=sqrt(4e-4 / pi),
    ...                   inner_diameter=0.0, modulus=200e9, density=1e4)
    >>> loads = journal_loads(sections=[bar], added_masses=[AddedMass(position=1.0, mass=1.0)],
    ...                       first_journal=0.0, second_journal=1.0)
    >>> loads.mass, loads.centre_of_gravity
    (2.00, 0.75)

    References
    ----------
    Statics, by hand.
    """
    if not sections:
        raise OutOfRangeError("sections", len(sections), "hold at least one section")
    mass = sum(section.mass_per_length * section.length for section in sections)
    mass += sum(part.mass for part in added_masses)
    moment = sum(
        section.mass_per_length * section.length * (section.start + section.end) / 2.0
        for section in sections
    )
    moment += sum(part.mass * part.position for part in added_masses)
    return journal_loads_from_centre_of_gravity(
        mass=mass,
        centre_of_gravity=moment / mass,
        first_journal=first_journal,
        second_journal=second_journal,
    )


def shaft_shear_stress(*, torque: float, outer_diameter: float, inner_diameter: float) -> float:
    r"""Nominal shear stress at the surface of a round shaft that carries a torque.

    .. math::

        \tau = \frac{16\,T}{\pi\, d^3 \left(1 - (d_i/d)^4\right)}

    Parameters
    ----------
    torque : float
        Torque, either sense, :math:`T`, [N·m]
    outer_diameter : float
        Outer diameter, :math:`d`, [m]
    inner_diameter : float
        Diameter of the bore; 0 where it is solid, :math:`d_i`, [m]

    Returns
    -------
    stress : float
        Shear stress, never negative, [Pa]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest, or the torque is not finite.

    Notes
    -----
    Nominal: without a keyway or a step, which about double it at the corner (Sofronas,
    Hydrocarbon Processing, May 2011).

    Examples
    --------
    π N·m on 0.1 m solid: 16/0.1³.

    >>> from math import pi
    >>> shaft_shear_stress(torque=pi, outer_diameter=0.1, inner_diameter=0.0)
    16000.0

    References
    ----------
    T. Philpot, MecMovies, 6.17.
    """
    demand_finite("torque", torque)
    demand_positive("outer_diameter", outer_diameter)
    demand_not_negative("inner_diameter", inner_diameter)
    if not inner_diameter < outer_diameter:
        raise OutOfRangeError("inner_diameter", inner_diameter, "be less than outer_diameter")
    hollow = 1.0 - (inner_diameter / outer_diameter) ** 4
    return 16.0 * abs(torque) / (math.pi * outer_diameter**3 * hollow)


def span_over_diameter(*, bearing_span: float, largest_body_diameter: float) -> float:
    r"""Bearing span over the largest diameter of the shaft's body; a smaller one is stiffer.

    .. math:: s = L / D

    Parameters
    ----------
    bearing_span : float
        Distance between the bearings, :math:`L`, [m]
    largest_body_diameter : float
        Largest diameter of the shaft under its parts, :math:`D`, [m]

    Returns
    -------
    ratio : float
        Span over diameter, [-]

    Raises
    ------
    OutOfRangeError
        If one of them is not positive.

    Notes
    -----
    About 10 is the usual dividing value and 12 is called flexible, from memory. Some sheets print
    the inverse.

    Examples
    --------
    >>> span_over_diameter(bearing_span=1.8, largest_body_diameter=0.15)
    12.0

    References
    ----------
    Common practice, from memory; definition.
    """
    demand_positive("bearing_span", bearing_span)
    demand_positive("largest_body_diameter", largest_body_diameter)
    return bearing_span / largest_body_diameter


def flexibility_factor(*, bearing_span: float, shaft_diameter: float) -> float:
    r"""Flexibility factor of a pump shaft, which decides its runout limits.

    .. math:: F = L^4 / D^2

    Parameters
    ----------
    bearing_span : float
        Distance between the bearings, :math:`L`, [m]
    shaft_diameter : float
        Diameter of the shaft at the impeller, :math:`D`, [m]

    Returns
    -------
    factor : float
        Flexibility factor; 1.9e9 mm², the usual dividing value, is 1900 m², [m²]

    Raises
    ------
    OutOfRangeError
        If one of them is not positive.

    Examples
    --------
    2 m and 0.1 m: 16/0.01.

    >>> flexibility_factor(bearing_span=2.0, shaft_diameter=0.1)
    1600.0

    References
    ----------
    API 610, 11th edition, table 9, from memory; two pump makers' manuals print the dividing value.
    """
    demand_positive("bearing_span", bearing_span)
    demand_positive("shaft_diameter", shaft_diameter)
    return bearing_span**4 / shaft_diameter**2
