"""The shaft as its plan draws it: loads on its journals, its sag and its first critical speed.

Nothing here is judged. A mass that the plan does not give is estimated and marked as calculated; a
calculated load cannot close a balance, a weighed one can.
"""

import math
from dataclasses import dataclass
from typing import NamedTuple

from models.assess.materials import material_of
from models.assess.torque import PartTorque, SeatShear, seat_shears, torques_along
from models.engineering.beam import (
    CriticalSpeed,
    StaticDeflection,
    first_critical_speed,
    static_deflection,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.materials import modulus
from models.engineering.shaft import (
    AddedMass,
    JournalLoads,
    StepSection,
    journal_loads,
    shaft_shear_stress,
    span_over_diameter,
)
from models.job import Item, Plan
from models.units import unit_set

__all__ = [
    "LOOK_AGAIN_ABOVE",
    "Masses",
    "PartMass",
    "ShaftView",
    "journal_positions",
    "masses_on",
    "sections_of",
    "shaft_view",
]

LOOK_AGAIN_ABOVE = 10.0
"""Span over diameter above which a rotor usually counts as flexible: common practice, from memory,
[-]."""

_REFERENCE_TEMPERATURE = 20.0


@dataclass(frozen=True)
class PartMass:
    """The mass of a part: as the plan gives it, or estimated from its outline and its density."""

    item: str
    name: str
    position: float
    mass: float
    calculated: bool


class Masses(NamedTuple):
    """The parts on a shaft, and by their keys those of which neither mass nor material is known."""

    parts: tuple[PartMass, ...]
    without: tuple[str, ...]


@dataclass(frozen=True, eq=False)
class ShaftView:
    """The rotor on its two journals, worked out from the plan."""

    plan: Plan
    parts: tuple[PartMass, ...]
    without_mass: tuple[str, ...]
    bearing_span: float | None
    largest_diameter: float | None
    span_over_diameter: float | None
    loads: JournalLoads | None
    deflection: StaticDeflection | None
    critical: CriticalSpeed | None
    shear_at_coupling: float | None
    problem: str | None

    @property
    def torques(self) -> tuple[PartTorque, ...]:
        """What the shaft carries from the free end to the coupling."""
        return torques_along(self.plan)

    @property
    def shears(self) -> tuple[SeatShear, ...]:
        """The shear in the shaft under every seat."""
        return seat_shears(self.plan)

    @property
    def look_again(self) -> bool:
        """Whether the span is long for its diameter, as common practice has it."""
        ratio = self.span_over_diameter
        return ratio is not None and ratio > LOOK_AGAIN_ABOVE

    @property
    def calculated(self) -> tuple[str, ...]:
        """Items whose mass was estimated."""
        return tuple(part.item for part in self.parts if part.calculated)

    @property
    def load_at_first_journal(self) -> float | None:
        """The load on the journal that the plan names first, in N."""
        if self.loads is None:
            return None
        return self.loads.second if self._turned else self.loads.first

    @property
    def load_at_second_journal(self) -> float | None:
        """The load on the journal that the plan names second, in N."""
        if self.loads is None:
            return None
        return self.loads.first if self._turned else self.loads.second

    @property
    def _turned(self) -> bool:
        plan = self.plan
        first = plan.station(plan.first_journal).position.si
        return first > plan.station(plan.second_journal).position.si

    @property
    def sentences(self) -> tuple[str, ...]:
        """What was worked out, in words, with what it rests on."""
        found = (
            self._load_words(),
            self._span_words(),
            self._sag_words(),
            self._speed_words(),
            self._shear_words(),
        )
        return tuple(one for one in (*found, self.problem) if one)

    def _load_words(self) -> str:
        if self.loads is None:
            return ""
        plan, units = self.plan, unit_set(self.plan.rotor.units)
        first, second = self.load_at_first_journal, self.load_at_second_journal
        assert first is not None
        assert second is not None
        doubts = []
        if self.calculated:
            doubts.append(f"masses estimated from the outline: {', '.join(self.calculated)}")
        if self.without_mass:
            doubts.append(f"no mass known: {', '.join(self.without_mass)}")
        tail = f" ({'; '.join(doubts)})" if doubts else ""
        return (
            f"Calculated, not weighed: {units.both(self.loads.mass, 'mass')}, "
            f"{units.show(first, 'force')} on {plan.first_journal} and "
            f"{units.show(second, 'force')} on {plan.second_journal}, centre of gravity at "
            f"{units.both(self.loads.centre_of_gravity, 'position')}{tail}."
        )

    def _span_words(self) -> str:
        if self.span_over_diameter is None:
            return ""
        words = f"Bearing span over largest diameter is {self.span_over_diameter:.1f}"
        if not self.look_again:
            return words + "."
        return (
            f"{words}, above {LOOK_AGAIN_ABOVE:.0f}: look again, the rotor counts as flexible "
            "(common practice, from memory)."
        )

    def _sag_words(self) -> str:
        if self.deflection is None:
            return ""
        units = unit_set(self.plan.rotor.units)
        return (
            f"At rest it sags by {units.both(abs(self.deflection.greatest), 'fit')} at "
            f"{units.show(self.deflection.greatest_position, 'position')}."
        )

    def _speed_words(self) -> str:
        if self.critical is None:
            return ""
        units = unit_set(self.plan.rotor.units)
        continuous = self.plan.rotor.maximum_continuous_speed
        beside = ""
        if continuous is not None and continuous.si > 0.0:
            beside = (
                f", {self.critical.speed / continuous.si:.2f} times the maximum continuous speed"
            )
        return (
            f"First critical speed on rigid bearings {units.show(self.critical.speed, 'speed')}"
            f"{beside}; real bearings lower it."
        )

    def _shear_words(self) -> str:
        shears = self.shears
        if not shears:
            return ""
        units = unit_set(self.plan.rotor.units)
        worst = max(shears, key=lambda one: one.shear)
        limit = self.plan.shaft.shear_limit
        beside = "no limit in the plan, so not judged"
        if limit is not None:
            beside = f"{units.show(limit.value.si, 'pressure')} allowed"
        return (
            f"Greatest shear in the shaft {units.both(worst.shear, 'pressure')} under "
            f"{worst.item.name}, which passes {units.both(worst.torque, 'torque')}; {beside}."
        )


def journal_positions(plan: Plan) -> tuple[float, float]:
    """Give the axial positions of the two journals, the smaller first."""
    first = plan.station(plan.first_journal).position.si
    second = plan.station(plan.second_journal).position.si
    return min(first, second), max(first, second)


def sections_of(plan: Plan) -> list[StepSection]:
    """Turn the drawn steps of the shaft into sections; empty where its material is unknown."""
    found = material_of(plan, plan.shaft.material)
    if found is None:
        return []
    stiffness = modulus(material=found, temperature=_REFERENCE_TEMPERATURE)
    return [
        StepSection(
            start=step.start.si,
            end=step.end.si,
            outer_diameter=step.diameter.si,
            inner_diameter=plan.shaft.bore.si if plan.shaft.bore else 0.0,
            modulus=stiffness,
            density=found.density,
        )
        for step in plan.shaft.steps
    ]


def masses_on(plan: Plan, *, up_to: str | None = None) -> Masses:
    """Weigh the parts on the shaft after a step (the last where none is named), in their order."""
    steps = plan.steps if up_to is None else plan.steps[: plan.step_number(up_to)]
    items = [item for step in steps for item in step.items]
    found = [(item.key, _mass(plan, item)) for item in items]
    return Masses(
        parts=tuple(part for _, part in found if part is not None),
        without=tuple(key for key, part in found if part is None),
    )


def _mass(plan: Plan, item: Item) -> PartMass | None:
    outline = item.outline
    middle = (outline.start.si + outline.end.si) / 2.0
    if item.mass is not None:
        return PartMass(item.key, item.name, middle, item.mass.si, calculated=False)
    found = material_of(plan, item.material)
    if found is None:
        return None
    # A full ring: too heavy for a wheel, whose blades leave most of its width empty.
    area = math.pi / 4.0 * (outline.outer.si**2 - outline.bore.si**2)
    mass = found.density * area * (outline.end.si - outline.start.si)
    return PartMass(item.key, item.name, middle, mass, calculated=True)


def shaft_view(plan: Plan) -> ShaftView:
    """Work the finished rotor out on its two journals."""
    first, second = journal_positions(plan)
    largest = _largest_between(plan, first, second)
    parts, without = masses_on(plan)
    loads = deflection = critical = None
    problem = None
    try:
        sections = sections_of(plan)
        if not sections:
            raise OutOfRangeError("the shaft's material", plan.shaft.material, "be a known one")
        added = [AddedMass(position=part.position, mass=part.mass) for part in parts]
        loads = journal_loads(
            sections=sections, added_masses=added, first_journal=first, second_journal=second
        )
        deflection = static_deflection(
            sections=sections, added_masses=added, first_bearing=first, second_bearing=second
        )
        critical = first_critical_speed(
            sections=sections, added_masses=added, first_bearing=first, second_bearing=second
        )
    except OutOfRangeError as trouble:
        problem = f"Not worked out further: {trouble}."
    return ShaftView(
        plan=plan,
        parts=parts,
        without_mass=without,
        bearing_span=second - first if second > first else None,
        largest_diameter=largest,
        span_over_diameter=(
            span_over_diameter(bearing_span=second - first, largest_body_diameter=largest)
            if largest is not None and second > first
            else None
        ),
        loads=loads,
        deflection=deflection,
        critical=critical,
        shear_at_coupling=_shear_at_coupling(plan),
        problem=problem,
    )


def _largest_between(plan: Plan, first: float, second: float) -> float | None:
    diameters = [
        step.diameter.si
        for step in plan.shaft.steps
        if step.end.si > first and step.start.si < second
    ]
    return max(diameters, default=None)


def _shear_at_coupling(plan: Plan) -> float | None:
    """Find the shear under the coupling hub by the rotor's whole torque; None where none is."""
    power, speed = plan.rotor.power, plan.rotor.maximum_continuous_speed
    items = [item for step in plan.steps for item in step.items]
    hubs = [item for item in items if item.outline.kind == "hub" and item.lands]
    if power is None or speed is None or speed.si <= 0.0 or not hubs:
        return None
    thinnest = min(land.nominal_diameter.si for item in hubs for land in item.lands)
    return shaft_shear_stress(
        torque=power.si / speed.si,
        outer_diameter=thinnest,
        inner_diameter=plan.shaft.bore.si if plan.shaft.bore else 0.0,
    )
