"""The plan of a build: rotor, shaft, stations, stacking steps and their limits, as issued.

Sizes, limits, stations and order suffice; whatever else is left out is shown as not judged.
Axial positions are counted from the datum face that the rotor names, positive along the rotor;
clock angles from the reference mark, the way the rotor names.
"""

from typing import Literal

from models.job.acceptance_plan import AcceptancePlan
from models.job.balance_plan import BalancePlan
from models.job.base import Frozen
from models.job.heat_words import Chilling, Surface
from models.job.limits import LengthLimit, TemperatureLimit
from models.job.loads import (
    BalanceReason,
    ForceCarried,
    PressureLimit,
    RoughnessKind,
    RunningWarmth,
)
from models.job.material import OwnMaterial
from models.job.origin import Origin
from models.job.standing import AgreedWaiver
from models.job.taper import TaperFit
from models.units import (
    Angle,
    Duration,
    Length,
    Mass,
    Power,
    Pressure,
    Ratio,
    Speed,
    TemperatureStep,
)

__all__ = [
    "AxialPlace",
    "CoolingLimits",
    "Disposition",
    "Growth",
    "Item",
    "ItemKind",
    "Land",
    "Outline",
    "OutlineKind",
    "Plan",
    "Point",
    "PointKind",
    "Role",
    "Rotor",
    "RunoutMethod",
    "Shaft",
    "ShaftStep",
    "Station",
    "StationKind",
    "Step",
]

Role = Literal["technician", "inspector", "engineer", "witness"]
ItemKind = Literal["hot", "slip", "clamped", "hydraulic"]
OutlineKind = Literal[
    "impeller", "sleeve", "spacer", "disc", "drum", "collar", "hub", "ring", "nut", "wheel"
]
StationKind = Literal["journal", "shaft", "seat", "probe track", "part"]
PointKind = Literal["hold", "witness", "review"]
Disposition = Literal[
    "rework", "repair", "use as is under concession", "scrap", "read again", "accept reading"
]


class Growth(Frozen, frozen=True, kw_only=True):
    """Interference that a land loses at a speed, on diameter, as its designer says."""

    value: Length
    speed: Speed
    origin: Origin


class Rotor(Frozen, frozen=True, kw_only=True):
    """The machine's rotating part, and how places on it are named."""

    serial: str
    name: str
    machine_tag: str = ""
    plant: str = ""
    service: str = ""
    units: Literal["inch", "metric"] = "metric"
    # Names of the two ends; z grows from the first end to the second.
    first_end: str = "drive end"
    second_end: str = "free end"
    datum_face: str = "shaft end at the drive end"
    reference_mark: str = "keyway of the coupling"
    # Clock angles are counted against the rotation, seen from `seen_from`.
    seen_from: str = "drive end"
    rotation: Literal["clockwise", "counter-clockwise"] = "clockwise"
    maximum_continuous_speed: Speed | None = None
    trip_speed: Speed | None = None
    power: Power | None = None
    invented: bool = False
    # What its owner says that speaks for a balance at speed.
    balance_reasons: tuple[BalanceReason, ...] = ()


class ShaftStep(Frozen, frozen=True, kw_only=True):
    """A stretch of the shaft with one diameter."""

    start: Length
    end: Length
    diameter: Length


class Shaft(Frozen, frozen=True, kw_only=True):
    """The bare shaft: its material and its steps from the first end to the second."""

    serial: str
    material: str
    steps: tuple[ShaftStep, ...]
    bore: Length | None = None
    roughness: Length | None = None
    yield_strength: Pressure | None = None
    roughness_kind: RoughnessKind = "Rz"
    shear_limit: PressureLimit | None = None


class Station(Frozen, frozen=True, kw_only=True):
    """A place where runout is read.

    It is reached from the start of step `reached_from` (from the bare shaft on when absent) to the
    end of the last step before `covered_by` goes on.
    """

    key: str
    name: str
    position: Length
    kind: StationKind = "shaft"
    reached_from: str | None = None
    covered_by: str | None = None
    final_limit: LengthLimit | None = None


class Outline(Frozen, frozen=True, kw_only=True):
    """How a part looks from the side: its extent and diameters."""

    kind: OutlineKind
    start: Length
    end: Length
    bore: Length
    outer: Length
    hub: Length | None = None
    facing: Literal["first end", "second end"] = "first end"


class Land(Frozen, frozen=True, kw_only=True):
    """A stretch over which bore and seat meet."""

    key: str
    start: Length
    end: Length
    nominal_diameter: Length
    hub_outer_diameter: Length
    least_interference: LengthLimit | None = None
    greatest_interference: LengthLimit | None = None
    growth: Growth | None = None
    # Stands for the figures where they are left out: H7/s6, FN2.
    fit_by_name: str = ""


class AxialPlace(Frozen, frozen=True, kw_only=True):
    """Where a part must come to rest."""

    measured_from: str
    target: Length
    tolerance: Length
    origin: Origin


class Item(Frozen, frozen=True, kw_only=True):
    """One thing that goes on in a step; hot ones have lands, a clearance and a cap."""

    key: str
    name: str
    kind: ItemKind
    outline: Outline
    from_end: Literal["first end", "second end"] = "first end"
    material: str | None = None
    mass: Mass | None = None
    lands: tuple[Land, ...] = ()
    mounting_clearance: LengthLimit | None = None
    highest_temperature: TemperatureLimit | None = None
    axial: AxialPlace | None = None
    keyed: bool = False
    roughness: Length | None = None
    friction: Ratio | None = None
    friction_origin: Origin | None = None
    carried_torque_share: Ratio | None = None
    yield_strength: Pressure | None = None
    roughness_kind: RoughnessKind = "Rz"
    thrust: ForceCarried | None = None
    running: RunningWarmth | None = None
    taper: TaperFit | None = None
    # Last temper of the part: a cap is derived from it where the plan gives none and may be.
    tempered_at: TemperatureLimit | None = None
    surface: Surface = "bare"
    holds_elastomers: bool = False
    chilling: Chilling | None = None


class Point(Frozen, frozen=True, kw_only=True):
    """Who must have signed a step before work goes past it."""

    kind: PointKind
    role: Role
    what: str
    # How long before it the party is told; without one any invitation counts.
    notice: Duration | None = None


class Step(Frozen, frozen=True, kw_only=True):
    """A stacking step: one or more items, and whether a survey is due after them."""

    key: str
    title: str
    items: tuple[Item, ...]
    survey_due: bool = True
    # No default is offered for the change limit: a plan without one is not issued.
    change_limit: LengthLimit | None = None
    points: tuple[Point, ...] = ()


class RunoutMethod(Frozen, frozen=True, kw_only=True):
    """How the shaft is surveyed in this job, so that surveys compare."""

    marks: tuple[Angle, ...]
    order: Literal["station by station", "mark by mark"] = "station by station"
    attitude: Literal["vertical", "horizontal"]
    supports: str
    supported_at: tuple[str, ...] = ()
    end_stop: str = ""
    rest_time: str = ""
    turns_before_reading: int = 0
    close_circle: bool = True
    closure_limit: Length | None = None
    # Standard uncertainty of one reading, and of the angle at which it is taken.
    reading_uncertainty: Length | None = None
    mark_uncertainty: Angle | None = None
    # What the indicator resolves; asked once, against the change limits, when the plan is issued.
    indicator_resolution: Length | None = None


class CoolingLimits(Frozen, frozen=True, kw_only=True):
    """What temperatures must show before a survey counts as cold."""

    side_to_side: TemperatureStep
    above_surroundings: TemperatureStep
    agreement: Length
    time_constant_hours: float | None = None
    origin: Origin


class Plan(Frozen, frozen=True, kw_only=True):
    """One revision of the plan, whole."""

    revision: str
    reason: str
    written_by: str
    issued_by: str
    issued_at: str
    approved_by: str = ""
    decision_rule: Literal["proved", "simple"]
    rotor: Rotor
    shaft: Shaft
    first_journal: str
    second_journal: str
    stations: tuple[Station, ...]
    steps: tuple[Step, ...]
    runout: RunoutMethod
    cooling: CoolingLimits
    drift_limit: LengthLimit | None = None
    bare_shaft_limit: LengthLimit | None = None
    balance: BalancePlan | None = None
    acceptance: AcceptancePlan | None = None
    smoothing_factor: float | None = None
    smoothing_edition: str = ""
    # Copies of the shop's own materials that this plan rests on; by name before the table.
    materials: tuple[OwnMaterial, ...] = ()
    waivers: tuple[AgreedWaiver, ...] = ()
    # Dispositions that count only with the customer's agreement.
    customer_agrees_to: tuple[Disposition, ...] = ()
    # How long after the deed an entry is still in time; common practice stands in where absent.
    late_after: Duration | None = None

    def step(self, key: str) -> Step:
        """Find a step by its key."""
        return next(step for step in self.steps if step.key == key)

    def step_number(self, key: str) -> int:
        """Count the step's place in the stack from 1."""
        return next(n for n, step in enumerate(self.steps, start=1) if step.key == key)

    def station(self, key: str) -> Station:
        """Find a station by its key."""
        return next(station for station in self.stations if station.key == key)

    def stations_in_reach(self, step_key: str | None) -> tuple[Station, ...]:
        """List stations that can be read once the step's items are on (None: the bare shaft)."""
        on = 0 if step_key is None else self.step_number(step_key)
        return tuple(
            station
            for station in self.stations
            if (station.reached_from is None or self.step_number(station.reached_from) <= on)
            and (station.covered_by is None or self.step_number(station.covered_by) > on)
        )
