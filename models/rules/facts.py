"""Plain facts that rules judge: SI numbers, None where nothing is recorded.

Every fact says its words and its SI unit in its field; `units` is only how messages are written.
"""

from dataclasses import dataclass

from models.rules.rule import known
from models.units import UnitSet, metric_set

__all__ = [
    "ClosureFacts",
    "CoolFacts",
    "FinalFacts",
    "FitFacts",
    "HeatFacts",
    "InstrumentFacts",
    "MountFacts",
    "OrderFacts",
    "PeopleFacts",
    "ProgressFacts",
    "SizeFacts",
    "StandFacts",
    "StationFacts",
    "SurveyFacts",
]


@dataclass(frozen=True, kw_only=True)
class InstrumentFacts:
    """An instrument on the day it was used."""

    units: UnitSet = metric_set
    tag: str | None = known("the instrument")
    used_on: str | None = known("the day it was used")
    due_on: str | None = known("the day its calibration falls due")


@dataclass(frozen=True, kw_only=True)
class SizeFacts:
    """The sizes of a bore or a seat over one land."""

    units: UnitSet = metric_set
    feature: str | None = known("bore or seat")
    mean_diameter: float | None = known("the sizes", "m")
    least_diameter: float | None = known("the sizes", "m")
    greatest_diameter: float | None = known("the sizes", "m")
    nominal_diameter: float | None = known("the nominal diameter", "m")
    part_temperature: float | None = known("the temperature of the part when measured", "°C")


@dataclass(frozen=True, kw_only=True)
class FitFacts:
    """How bore and seat of one land fit, at the reference temperature."""

    units: UnitSet = metric_set
    least_interference: float | None = known("interference, from the sizes of bore and seat", "m")
    mean_interference: float | None = known("interference, from the sizes of bore and seat", "m")
    greatest_interference: float | None = known(
        "interference, from the sizes of bore and seat", "m"
    )
    expanded_uncertainty: float | None = known("the uncertainty of the interference", "m")
    least_allowed: float | None = known("the least interference allowed", "m")
    greatest_allowed: float | None = known("the greatest interference allowed", "m")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class HeatFacts:
    """A part's heat before it goes on."""

    units: UnitSet = metric_set
    serial: str | None = known("the part's serial")
    target_temperature: float | None = known("the temperature that opens the bore", "°C")
    highest_temperature: float | None = known("the highest temperature allowed", "°C")
    coldest_bore: float | None = known("a temperature of the bore", "°C")
    mean_temperature: float | None = known(
        "the mean temperature over the part's area, from bore to rim", "°C"
    )
    hottest_part: float | None = known("a temperature of the part", "°C")
    spread: float | None = known("temperatures at more than one place", "K")
    gauged_lands: tuple[str, ...] | None = known("what was measured on the hot part")
    refused_lands: tuple[str, ...] | None = known("what was measured on the hot part")
    ungauged_lands: tuple[str, ...] | None = known("lands not gauged")
    small_gauges: tuple[str, ...] | None = known("lands gauged with too small a size")
    confirmed_serial: str | None = known("the serial confirmed before the furnace")
    furnace_open_points: tuple[str, ...] | None = known("the confirmation before the furnace")
    door_serial: str | None = known("the serial confirmed before the door")
    door_open_points: tuple[str, ...] | None = known("the confirmation before the door")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class MountFacts:
    """How a part went on."""

    units: UnitSet = metric_set
    outcome: str | None = known("how the mount ended")
    shoulder: str | None = known("contact at the shoulder")
    axial_position: float | None = known("the axial position, cold", "m")
    axial_target: float | None = known("the axial position wanted", "m")
    axial_tolerance: float | None = known("the tolerance of the axial position", "m")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class CoolFacts:
    """Temperatures that say whether the rotor may be read."""

    units: UnitSet = metric_set
    side_to_side: float | None = known("temperatures on both sides of the rotor", "K")
    above_surroundings: float | None = known("temperatures of rotor and surroundings", "K")
    side_to_side_allowed: float | None = known("the side-to-side limit", "K")
    above_surroundings_allowed: float | None = known("the limit above the surroundings", "K")
    bow_per_kelvin: float | None = known("the thermal bow per kelvin", "m")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class SurveyFacts:
    """A runout survey as a whole, against the survey it is compared with."""

    units: UnitSet = metric_set
    closed: bool | None = known("the survey's closing")
    stations_due: tuple[str, ...] | None = known("the stations in reach")
    stations_read: tuple[str, ...] | None = known("the stations read")
    set_up_differences: tuple[str, ...] | None = known("the set-up of the survey before")
    open_questions: tuple[str, ...] | None = known("the questions asked while reading")


@dataclass(frozen=True, kw_only=True)
class ClosureFacts:
    """The reading repeated at the first mark of a station."""

    units: UnitSet = metric_set
    station: str | None = known("the station")
    closure: float | None = known("the first mark read again", "m")
    closure_allowed: float | None = known("the closure limit", "m")


@dataclass(frozen=True, kw_only=True)
class StationFacts:
    """The change of a station's runout, from one survey to another, in the journal axis."""

    units: UnitSet = metric_set
    station: str | None = known("the station")
    change_tir: float | None = known("the change of runout", "m")
    clock_angle: float | None = known("the clock angle of the change", "°")
    expanded_uncertainty: float | None = known("the uncertainty of the change", "m")
    plain_change: float | None = known("the change of the total", "m")
    least_change: float | None = known("the least change the totals allow", "m")
    greatest_change: float | None = known("the greatest change the totals allow", "m")
    limit: float | None = known("the limit of change", "m")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class StandFacts:
    """What a stand can see, beside the finest limit that is judged on it."""

    units: UnitSet = metric_set
    visible_change: float | None = known("two surveys with nothing touched between", "m")
    finest_limit: float | None = known("a change limit", "m")


@dataclass(frozen=True, kw_only=True)
class FinalFacts:
    """A station of the finished rotor."""

    units: UnitSet = metric_set
    station: str | None = known("the station")
    tir: float | None = known("the final runout", "m")
    expanded_uncertainty: float | None = known("the uncertainty of the runout", "m")
    limit: float | None = known("the final limit", "m")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


@dataclass(frozen=True, kw_only=True)
class PeopleFacts:
    """Who did a step and who signed for it."""

    units: UnitSet = metric_set
    performers: tuple[str, ...] | None = known("who did the step")
    inspectors: tuple[str, ...] | None = known("who inspected the step")
    points_due: tuple[str, ...] | None = known("the points of the step")
    points_open: tuple[str, ...] | None = known("the signatures at the points")
    points_without: tuple[str, ...] | None = known("the points passed without a signature")
    agreed_waiver: str | None = known("the waiver that the plan agrees to")


@dataclass(frozen=True, kw_only=True)
class OrderFacts:
    """An entry taken although the order did not allow it."""

    units: UnitSet = metric_set
    entry: str | None = known("the entry")
    out_of_order: str | None = known("why it was taken out of order")


@dataclass(frozen=True, kw_only=True)
class ProgressFacts:
    """How far the build is."""

    units: UnitSet = metric_set
    steps_due: int | None = known("the steps of the plan")
    steps_waiting: tuple[str, ...] | None = known("the steps that wait")
