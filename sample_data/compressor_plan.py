"""The plan of the invented compressor rotor: in inches, horizontal on lined V-blocks."""

from collections.abc import Sequence
from typing import NamedTuple

from models.job import (
    AxialPlace,
    CoolingLimits,
    Item,
    Land,
    LengthLimit,
    Origin,
    Outline,
    OutlineKind,
    Plan,
    Point,
    Rotor,
    RunoutMethod,
    Shaft,
    ShaftStep,
    Station,
    StationKind,
    Step,
    TemperatureLimit,
)
from models.units import (
    Angle,
    Duration,
    Length,
    Mass,
    Power,
    Ratio,
    Speed,
    Temperature,
    TemperatureStep,
)

__all__ = ["AFTER_A_WEEKEND", "BUILT", "NEXT", "PLAN"]

BUILT = ("impeller-1", "spacer-1", "impeller-2", "spacer-2", "impeller-3", "spacer-3")
"""The steps that are done in the job file, in order."""

AFTER_A_WEEKEND = "spacer-3"
"""The step before which the rotor lay untouched over a weekend."""

NEXT = "impeller-4"
"""The step that is taken at the bench."""

_length, _angle = Length.read, Angle.read
_DRAWING = Origin(document="drawing HR-4471-02, invented", revision="C", note="note 6")
_NOTE_ON_FITS = Origin(document="drawing HR-4471-02, invented", revision="C", note="table of fits")
_SHOP = Origin(document="shop instruction 12, invented", revision="4")


def _limit(text: str, origin: Origin = _DRAWING) -> LengthLimit:
    return LengthLimit(value=_length(text), origin=origin)


class _Part(NamedTuple):
    """A row of the stack; lengths in inches."""

    key: str
    name: str
    kind: OutlineKind
    start: float
    end: float
    seat: float
    outer: float
    hub: float
    per_inch: tuple[float, float]
    material: str
    mass: str
    hottest: str
    from_first_end: bool = False
    lands: tuple[tuple[str, float, float], ...] = ()
    keyed: bool = False


_WHEEL, _SLEEVE = (0.0010, 0.0015), (0.0009, 0.0014)
_STAINLESS, _STEEL = "13cr-4ni", "4140"
_STACK = (
    _Part("impeller-1", "Impeller, first stage", "impeller", 22.0, 25.5, 5.990, 19.0, 8.2, _WHEEL,
          _STAINLESS, "118 lb", "600 °F"),
    _Part("spacer-1", "Spacer between stages 1 and 2", "spacer", 25.5, 29.5, 5.985, 7.4, 7.4,
          _SLEEVE, _STEEL, "17 lb", "650 °F"),
    _Part("impeller-2", "Impeller, second stage", "impeller", 29.5, 33.0, 5.980, 19.0, 8.2, _WHEEL,
          _STAINLESS, "116 lb", "600 °F"),
    _Part("spacer-2", "Spacer between stages 2 and 3", "spacer", 33.0, 37.0, 5.975, 7.4, 7.4,
          _SLEEVE, _STEEL, "17 lb", "650 °F"),
    _Part("impeller-3", "Impeller, third stage", "impeller", 37.0, 40.5, 5.970, 18.5, 8.2, _WHEEL,
          _STAINLESS, "111 lb", "600 °F"),
    _Part("spacer-3", "Spacer between stages 3 and 4", "spacer", 40.5, 44.5, 5.965, 7.4, 7.4,
          _SLEEVE, _STEEL, "17 lb", "650 °F"),
    _Part("impeller-4", "Impeller, fourth stage", "impeller", 44.5, 48.0, 5.960, 18.5, 8.2, _WHEEL,
          _STAINLESS, "109 lb", "600 °F"),
    _Part("spacer-4", "Spacer between stages 4 and 5", "spacer", 48.0, 52.0, 5.955, 7.4, 7.4,
          _SLEEVE, _STEEL, "17 lb", "650 °F"),
    _Part("impeller-5", "Impeller, fifth stage", "impeller", 52.0, 55.5, 5.950, 18.0, 8.2, _WHEEL,
          _STAINLESS, "104 lb", "600 °F"),
    _Part("drum", "Balance drum", "drum", 56.0, 63.0, 5.940, 10.5, 10.5, _WHEEL, _STEEL, "116 lb",
          "650 °F", lands=(("inner", 56.3, 58.5), ("outer", 60.5, 62.7))),
    _Part("sleeve-free", "Seal sleeve, free end", "sleeve", 63.5, 67.5, 5.900, 6.9, 6.9, _SLEEVE,
          _STEEL, "11 lb", "650 °F"),
    _Part("sleeve-drive", "Seal sleeve, drive end", "sleeve", 14.5, 18.5, 5.900, 6.9, 6.9, _SLEEVE,
          _STEEL, "11 lb", "650 °F", from_first_end=True),
    _Part("thrust-collar", "Thrust collar", "collar", 78.0, 79.5, 4.500, 9.0, 6.0, _SLEEVE,
          _STEEL, "25 lb", "650 °F", keyed=True),
    _Part("hub", "Coupling hub", "hub", 1.0, 6.0, 4.000, 7.5, 6.2, (0.0010, 0.0016),
          _STEEL, "44 lb", "500 °F", from_first_end=True, keyed=True),
)  # fmt: skip


def _text(inches: float, decimals: int = 3) -> str:
    return f"{inches:.{decimals}f} in"


def _lands(part: _Part) -> tuple[Land, ...]:
    rows = part.lands or (("1", part.start + 0.2, part.end - 0.2),)
    least, greatest = (f"{part.seat * ratio:.4f} in" for ratio in part.per_inch)
    return tuple(
        Land(
            key=key,
            start=_length(_text(start)),
            end=_length(_text(end)),
            nominal_diameter=_length(_text(part.seat)),
            hub_outer_diameter=_length(_text(part.hub)),
            least_interference=_limit(least, _NOTE_ON_FITS),
            greatest_interference=_limit(greatest, _NOTE_ON_FITS),
        )
        for key, start, end in rows
    )


def _outline(part: _Part) -> Outline:
    return Outline(
        kind=part.kind,
        start=_length(_text(part.start)),
        end=_length(_text(part.end)),
        bore=_length(_text(part.seat)),
        outer=_length(_text(part.outer)),
        hub=_length(_text(part.hub)),
        facing="first end" if part.kind == "impeller" else "second end",
    )


def _hot(part: _Part) -> Item:
    return Item(
        key=part.key,
        name=part.name,
        kind="hot",
        outline=_outline(part),
        from_end="first end" if part.from_first_end else "second end",
        material=part.material,
        mass=Mass.read(part.mass),
        lands=_lands(part),
        mounting_clearance=_limit("0.0030 in", _SHOP),
        highest_temperature=TemperatureLimit(value=Temperature.read(part.hottest), origin=_DRAWING),
        axial=AxialPlace(
            measured_from="shaft end at the drive end",
            target=_length(_text(part.start)),
            tolerance=_length("0.005 in"),
            origin=_DRAWING,
        ),
        keyed=part.keyed,
        roughness=_length("1.6 µm"),
        friction=Ratio.read("0.12"),
        friction_origin=_SHOP,
        carried_torque_share=Ratio.read("0.2") if part.kind == "impeller" else None,
    )


def _points(part: _Part) -> tuple[Point, ...]:
    if part.kind not in ("impeller", "drum", "collar", "hub"):
        return ()
    hold = Point(kind="hold", role="inspector", what="fit and runout before the next part")
    if part.key != "impeller-3":
        return (hold,)
    what = "runout after the third impeller"
    return (
        hold,
        Point(kind="witness", role="witness", what=what, notice=Duration.read("48 h")),
    )


_NUT = Step(
    key="nut",
    title="Thrust collar nut",
    items=(
        Item(
            key="nut",
            name="Thrust collar nut",
            kind="clamped",
            outline=Outline(
                kind="nut",
                start=_length("79.500 in"),
                end=_length("81.000 in"),
                bore=_length("4.250 in"),
                outer=_length("6.500 in"),
            ),
            from_end="second end",
            material=_STEEL,
            mass=Mass.read("8 lb"),
        ),
    ),
    change_limit=_limit("0.0010 in"),
    points=(Point(kind="hold", role="inspector", what="nut tightened and locked"),),
)


def _steps() -> tuple[Step, ...]:
    hot = tuple(
        Step(
            key=part.key,
            title=part.name,
            items=(_hot(part),),
            change_limit=_limit("0.0010 in"),
            points=_points(part),
        )
        for part in _STACK
    )
    *before, hub = hot
    return (*before, _NUT, hub)


def _shaft() -> Shaft:
    seats = [(part.start, part.end, part.seat) for part in _STACK if 22.0 <= part.start < 56.0]
    drawn = (
        (0.0, 6.0, 4.000),
        (6.0, 13.5, 4.500),
        (13.5, 19.5, 5.900),
        (19.5, 22.0, 6.250),
        *seats,
        (55.5, 63.0, 5.940),
        (63.0, 70.0, 5.900),
        (70.0, 78.0, 5.000),
        (78.0, 79.5, 4.500),
        (79.5, 84.0, 4.250),
    )
    return Shaft(
        serial="HS-0926-1",
        material="4340",
        steps=tuple(
            ShaftStep(
                start=_length(_text(start)),
                end=_length(_text(end)),
                diameter=_length(_text(diameter)),
            )
            for start, end, diameter in drawn
        ),
        roughness=_length("0.8 µm"),
    )


# Key, name, position in inches, kind, reached from, covered by.
_Row = tuple[str, str, float, StationKind, str | None, str | None]
_STATIONS: Sequence[_Row] = (
    ("J1", "Journal, drive end", 10.0, "journal", None, None),
    ("P1", "Probe track, drive end", 12.5, "probe track", None, None),
    ("B1", "Shaft shoulder before stage 1", 20.7, "shaft", None, None),
    ("E1", "Outside of spacer 1", 29.0, "part", "spacer-1", None),
    ("K3", "Seat of impeller 2", 31.25, "seat", None, "impeller-2"),
    ("E2", "Outside of spacer 2", 35.0, "part", "spacer-2", None),
    ("K5", "Seat of impeller 3", 38.75, "seat", None, "impeller-3"),
    ("E3", "Outside of spacer 3", 42.5, "part", "spacer-3", None),
    ("K7", "Seat of impeller 4", 46.25, "seat", None, "impeller-4"),
    ("K9", "Seat of impeller 5", 53.75, "seat", None, "impeller-5"),
    ("K10", "Seat of the balance drum", 59.5, "seat", None, "drum"),
    ("B2", "Shaft between seal and journal, free end", 69.0, "shaft", None, None),
    ("J2", "Journal, free end", 74.0, "journal", None, None),
    ("P2", "Probe track, free end", 76.5, "probe track", None, None),
)
_FINAL: dict[StationKind, str] = {
    "journal": "0.0005 in",
    "probe track": "0.0005 in",
    "shaft": "0.0020 in",
    "part": "0.0025 in",
}


def _stations() -> tuple[Station, ...]:
    return tuple(
        Station(
            key=key,
            name=name,
            position=_length(_text(position)),
            kind=kind,
            reached_from=reached,
            covered_by=covered,
            final_limit=_limit(_FINAL[kind]) if kind in _FINAL else None,
        )
        for key, name, position, kind, reached, covered in _STATIONS
    )


PLAN = Plan(
    revision="B",
    reason="Fits of the spacers widened by the drawing's revision C.",
    written_by="DO",
    issued_by="BQ",
    issued_at="2026-10-08T15:10:00-05:00",
    approved_by="Saltmarsh Gas Transmission (invented)",
    decision_rule="simple",
    rotor=Rotor(
        serial="HR-4471",
        name="Five-stage compressor rotor",
        machine_tag="K-207B",
        plant="Pelican Bend station (invented)",
        service="gas transmission",
        units="inch",
        second_end="free end",
        reference_mark="keyway of the coupling",
        maximum_continuous_speed=Speed.read("9200 r/min"),
        trip_speed=Speed.read("9660 r/min"),
        power=Power.read("6400 hp"),
        invented=True,
    ),
    shaft=_shaft(),
    first_journal="J1",
    second_journal="J2",
    stations=_stations(),
    steps=_steps(),
    runout=RunoutMethod(
        marks=tuple(_angle(f"{degrees} °") for degrees in range(0, 360, 45)),
        order="station by station",
        attitude="horizontal",
        supports="lined V-blocks",
        supported_at=("J1", "J2"),
        end_stop="ball against the centre at the drive end",
        rest_time="15 min",
        turns_before_reading=2,
        close_circle=True,
        closure_limit=_length("0.0002 in"),
        reading_uncertainty=_length("0.00004 in"),
        mark_uncertainty=_angle("1 °"),
        indicator_resolution=_length("0.0001 in"),
    ),
    cooling=CoolingLimits(
        side_to_side=TemperatureStep.read("1.0 °F"),
        above_surroundings=TemperatureStep.read("3.0 °F"),
        agreement=_length("0.0002 in"),
        time_constant_hours=4.0,
        origin=_SHOP,
    ),
    drift_limit=_limit("0.0015 in"),
    bare_shaft_limit=_limit("0.0008 in"),
    smoothing_factor=0.8,
    smoothing_edition="DIN 7190, from memory",
)
