"""What a drawing is drawn from: plain frozen facts in SI, with the words to print beside them."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

__all__ = [
    "LIFT_MAGNIFICATION",
    "ChangeMark",
    "Curve",
    "DialPicture",
    "DialReading",
    "Facing",
    "GapPicture",
    "LengthUnit",
    "PartKind",
    "PartOutline",
    "PartState",
    "PlaneCurve",
    "RangeBar",
    "RangePicture",
    "RotorPicture",
    "ShaftStep",
    "StationMark",
    "StationState",
    "Turning",
    "VerdictKind",
]


LIFT_MAGNIFICATION = 50
"""How many times its radial gap a part that hangs hot is drawn above its seat [-]."""


class PartKind(StrEnum):
    """What a part looks like from the side."""

    IMPELLER = "impeller"
    SLEEVE = "sleeve"
    DISC = "disc"
    DRUM = "drum"
    COLLAR = "collar"
    HUB = "hub"
    RING = "ring"
    NUT = "nut"
    WHEEL = "wheel"


class PartState(StrEnum):
    """How far a part is: still to come, the one in hand, or on."""

    TO_COME = "to come"
    CURRENT = "current"
    ON = "on"


class StationState(StrEnum):
    """How far a station is in the survey shown."""

    TO_COME = "to come"
    ACTIVE = "being read"
    READ = "read"


class Facing(StrEnum):
    """Towards which end a part looks: an impeller's eye, a collar's or a hub's disc."""

    DRIVE_END = "drive end"
    FAR_END = "far end"


class Curve(StrEnum):
    """Which centreline a curve is."""

    BEFORE = "before"
    EARLIER = "earlier attempt"
    AFTER = "after"


class VerdictKind(StrEnum):
    """The three verdicts, and the state in which there is none."""

    WITHIN = "within limits"
    LOOK = "look again"
    STOP = "stop"
    NOT_JUDGED = "not judged"


class Turning(StrEnum):
    """A sense of turning, seen from the drive end."""

    CLOCKWISE = "clockwise"
    COUNTERCLOCKWISE = "counterclockwise"


class LengthUnit(StrEnum):
    """The job's own unit of length, which comes first wherever both are written."""

    INCH = "in"
    MILLIMETRE = "mm"


@dataclass(frozen=True, slots=True, kw_only=True)
class ShaftStep:
    """A cylinder of the shaft, measured from the drive-end face.

    Attributes
    ----------
    start, end : float
        Where it begins and ends [m].
    diameter : float
        Outer diameter [m].
    bore : float
        Diameter of the bore, 0 for a solid shaft [m].
    """

    start: float
    end: float
    diameter: float
    bore: float = 0.0


@dataclass(frozen=True, slots=True, kw_only=True)
class PartOutline:
    """A part as it is drawn.

    Attributes
    ----------
    key : str
        How the program knows it.
    name : str
        How a person calls it.
    kind : PartKind
        What it looks like.
    start, end : float
        Where its hub begins and ends on the shaft, from the drive-end face [m].
    bore_diameter, outer_diameter : float
        Bore and greatest diameter [m].
    hub_diameter : float or None
        Diameter of the hub beside the disc; None draws a usual one [m].
    facing : Facing
        Towards which end it looks.
    state : PartState
        How far it is.
    lifted_gap : float
        Radial gap between bore and seat while it hangs hot over its seat, 0 once seated [m].
    attempt : int
        Number of the attempt, 1 for the first.
    label : str
        Few words on a leader; empty for none.
    number : str
        Short label above the part, such as the step's number; empty for none.
    tells : str
        One sentence when touched; empty lets the drawing say name and state.
    """

    key: str
    name: str
    kind: PartKind
    start: float
    end: float
    bore_diameter: float
    outer_diameter: float
    hub_diameter: float | None = None
    facing: Facing = Facing.DRIVE_END
    state: PartState = PartState.ON
    lifted_gap: float = 0.0
    attempt: int = 1
    label: str = ""
    number: str = ""
    tells: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class StationMark:
    """A place along the shaft where runout is read.

    Attributes
    ----------
    key : str
        Its name, such as ``S7``.
    position : float
        Distance from the drive-end face [m].
    is_journal : bool
        Whether it carries the datum.
    state : StationState
        How far it is in this survey.
    tells : str
        One sentence when touched; empty lets the drawing say name and state.
    """

    key: str
    position: float
    is_journal: bool = False
    state: StationState = StationState.READ
    tells: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class RotorPicture:
    """A whole rotor with what is on it.

    Attributes
    ----------
    name : str
        How a person calls it.
    steps : tuple of ShaftStep
        The shaft from the drive end on.
    parts : tuple of PartOutline
        In stacking order.
    stations : tuple of StationMark
        From the drive end on.
    drive_end_name, far_end_name : str
        Words at the ends; an empty one is left out.
    length_unit : LengthUnit
        The job's own unit.
    """

    name: str
    steps: tuple[ShaftStep, ...]
    parts: tuple[PartOutline, ...] = ()
    stations: tuple[StationMark, ...] = ()
    drive_end_name: str = "drive end"
    far_end_name: str = ""
    length_unit: LengthUnit = LengthUnit.INCH

    @property
    def length(self) -> float:
        """Distance from the drive-end face to the other end [m]."""
        return max(step.end for step in self.steps)

    @property
    def greatest_radius(self) -> float:
        """Radius of whatever reaches farthest out [m]."""
        return (
            max(
                [step.diameter for step in self.steps]
                + [
                    part.outer_diameter + 2.0 * LIFT_MAGNIFICATION * part.lifted_gap
                    for part in self.parts
                ]
            )
            / 2.0
        )

    @property
    def current_part(self) -> PartOutline | None:
        """The part in hand, if there is one."""
        return next((part for part in self.parts if part.state is PartState.CURRENT), None)


@dataclass(frozen=True, slots=True, kw_only=True)
class PlaneCurve:
    """The centreline of one survey.

    Attributes
    ----------
    which : Curve
        Before, an earlier attempt, or after.
    positions : tuple of float
        Distances from the drive-end face, rising [m].
    vectors : tuple of complex or None
        Eccentricity e·exp(jθ) at each of them; None where it is not measured [m].
    name : str
        Word at the line, such as ``attempt 2``; empty for none.
    active : int or None
        Index of the point that still follows the keys, drawn open.
    """

    which: Curve
    positions: tuple[float, ...]
    vectors: tuple[complex | None, ...]
    name: str = ""
    active: int | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class ChangeMark:
    """The change of one station against its limit.

    Attributes
    ----------
    key : str
        The station's name.
    position : float
        Distance from the drive-end face [m].
    change_tir : complex or None
        Change as total indicator reading at its clock angle, twice the change of eccentricity;
        None where there is none [m].
    limit_tir : float or None
        Limit of its amount; None where none is set [m].
    text : str
        The figure under it, such as ``9 ± 2`` or ``datum``.
    verdict : VerdictKind
        What was judged.
    state : StationState
        How far the station is.
    is_datum : bool
        Whether it is a journal that carries the datum.
    tells : str
        One sentence when touched.
    """

    key: str
    position: float
    change_tir: complex | None
    limit_tir: float | None
    text: str = ""
    verdict: VerdictKind = VerdictKind.NOT_JUDGED
    state: StationState = StationState.READ
    is_datum: bool = False
    tells: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class DialReading:
    """One reading at one mark of the clock.

    Attributes
    ----------
    angle : float
        Clock angle from the reference mark, counted as the plan counts [rad].
    value : float
        Reading, positive towards the indicator [m].
    is_open : bool
        Whether it is the one still being typed.
    """

    angle: float
    value: float
    is_open: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class DialPicture:
    """The readings of one station round the clock, seen from the drive end.

    Attributes
    ----------
    key : str
        The station's name.
    readings : tuple of DialReading
        In the order they were read.
    mean : float
        Mean of the readings; the base circle stands for it [m].
    eccentricity : complex or None
        Fitted eccentricity; None before enough is read [m].
    before : complex or None
        Eccentricity before the mount [m].
    limit_tir : float or None
        Limit of the change as total indicator reading [m].
    active_angle : float or None
        Clock angle of the mark to read now [rad].
    counted : Turning
        Which way the marks are counted.
    caption : tuple of str
        Lines under the dial; the magnification is added to the first.
    verdict : VerdictKind
        What is judged about the change so far.
    tells : str
        One sentence when touched.
    """

    key: str
    readings: tuple[DialReading, ...]
    mean: float = 0.0
    eccentricity: complex | None = None
    before: complex | None = None
    limit_tir: float | None = None
    active_angle: float | None = None
    counted: Turning = Turning.COUNTERCLOCKWISE
    caption: tuple[str, ...] = ("from the drive end",)
    verdict: VerdictKind = VerdictKind.NOT_JUDGED
    tells: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class RangeBar:
    """One measured range on a value-against-limits figure.

    Attributes
    ----------
    name : str
        What it is, at its left.
    least, mean, greatest : float
        Of the readings, in the figure's own unit [-].
    uncertainty : float
        Expanded uncertainty, drawn as a whisker beyond the range, in that unit [-].
    text : str
        The figure at its right.
    verdict : VerdictKind
        What was judged.
    tells : str
        One sentence when touched.
    """

    name: str
    least: float
    mean: float
    greatest: float
    uncertainty: float = 0.0
    text: str = ""
    verdict: VerdictKind = VerdictKind.NOT_JUDGED
    tells: str = ""


@dataclass(frozen=True, slots=True, kw_only=True)
class RangePicture:
    """Values against their limits; used alike for fit, heat, time and axial position.

    Attributes
    ----------
    bars : tuple of RangeBar
        One row each.
    lower, upper : float or None
        Limits in the figure's own unit [-].
    lower_text, upper_text : str
        What each limit is and where it comes from.
    unit : str
        Written once, at the end of the scale.
    start, end : float or None
        Ends of the scale; None lets the values choose [-].
    """

    bars: tuple[RangeBar, ...]
    lower: float | None = None
    upper: float | None = None
    lower_text: str = ""
    upper_text: str = ""
    unit: str = ""
    start: float | None = None
    end: float | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class GapPicture:
    """The gap between a hot bore and its seat, drawn magnified.

    Attributes
    ----------
    gap : float
        Radial gap now, negative once it has closed [m].
    opening_gap : float
        Radial gap when it left the furnace, which sets the scale [m].
    least_gap : float
        The cautious end of the gap now [m].
    bore_text, seat_text, gap_text, least_text : str
        Words at the bore line, the seat line, between them, and at the cautious end; the last is
        left out where it has no room.
    tells : str
        One sentence when touched.
    """

    gap: float
    opening_gap: float
    least_gap: float
    bore_text: str = "bore"
    seat_text: str = "seat"
    gap_text: str = ""
    least_text: str = "at least"
    tells: str = ""
