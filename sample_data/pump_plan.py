"""The plan of the invented multistage pump rotor: metric, twelve marks, horizontal."""

from models.job import (
    AxialPlace,
    CoolingLimits,
    Item,
    ItemKind,
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

__all__ = ["PLAN"]

_length, _angle = Length.read, Angle.read
_DRAWING = Origin(document="Zeichnung EG 20-318, invented", revision="2", note="note 4")
_FITS = Origin(document="Zeichnung EG 20-318, invented", revision="2", note="table of fits")
_SHOP = Origin(document="shop instruction M 7, invented", revision="1")
_SEATS = (80.40, 80.35, 80.30, 80.25, 80.20, 80.15, 80.10, 80.05)


def _limit(text: str, origin: Origin = _DRAWING) -> LengthLimit:
    return LengthLimit(value=_length(text), origin=origin)


def _mm(value: float, decimals: int = 2) -> Length:
    return _length(f"{value:.{decimals}f} mm")


def _land(key: str, start: float, end: float, seat: float, hub: float, fit: str) -> Land:
    least, greatest = fit.split(" to ")
    return Land(
        key=key,
        start=_mm(start),
        end=_mm(end),
        nominal_diameter=_mm(seat, 3),
        hub_outer_diameter=_mm(hub),
        least_interference=_limit(f"{least} µm", _FITS),
        greatest_interference=_limit(f"{greatest} µm", _FITS),
    )


def _outline(
    kind: OutlineKind, start: float, end: float, bore: float, outer: float, hub: float
) -> Outline:
    return Outline(
        kind=kind,
        start=_mm(start),
        end=_mm(end),
        bore=_mm(bore),
        outer=_mm(outer),
        hub=_mm(hub),
        facing="first end" if kind == "impeller" else "second end",
    )


def _hot(
    key: str,
    name: str,
    outline: Outline,
    lands: tuple[Land, ...],
    *,
    mass: str,
    material: str = "42crmo4",
    first_end: bool = False,
    keyed: bool = False,
    clearance: str = "40 µm",
) -> Item:
    return Item(
        key=key,
        name=name,
        kind="hot",
        outline=outline,
        from_end="first end" if first_end else "second end",
        material=material,
        mass=Mass.read(mass),
        lands=lands,
        mounting_clearance=_limit(clearance, _SHOP),
        highest_temperature=TemperatureLimit(value=Temperature.read("300 °C"), origin=_DRAWING),
        axial=AxialPlace(
            measured_from="shaft end at the drive end",
            target=outline.start,
            tolerance=_length("0.15 mm"),
            origin=_DRAWING,
        ),
        keyed=keyed,
        roughness=_length("1.6 µm"),
        friction=Ratio.read("0.12"),
        friction_origin=_SHOP,
        carried_torque_share=Ratio.read("0.125") if outline.kind == "impeller" else None,
    )


def _cold(key: str, name: str, kind: ItemKind, outline: Outline, mass: str) -> Item:
    return Item(
        key=key,
        name=name,
        kind=kind,
        outline=outline,
        from_end="first end" if outline.start.si < 0.4 else "second end",
        material="42crmo4",
        mass=Mass.read(mass),
    )


def _stage(number: int) -> Step:
    start = 310.0 + 110.0 * number
    seat = _SEATS[number - 1]
    impeller = _hot(
        f"impeller-{number}",
        f"Impeller of stage {number}",
        _outline("impeller", start, start + 60.0, seat, 290.0, 112.0),
        (_land("1", start + 5.0, start + 55.0, seat, 112.0, "40 to 70"),),
        mass="9.2 kg",
        material="13cr-4ni",
        keyed=True,
    )
    before: tuple[Item, ...] = ()
    if number > 1:
        sleeve = _outline("sleeve", start - 50.0, start, seat, 100.0, 100.0)
        name = f"Sleeve between stages {number - 1} and {number}"
        before = (_cold(f"sleeve-{number - 1}", name, "slip", sleeve, "1.1 kg"),)
    return _step(f"impeller-{number}", f"Stage {number}", (*before, impeller), hold=True)


def _witnessed(key: str) -> tuple[Point, ...]:
    if key != "impeller-5":
        return ()
    what = "runout at the fifth stage"
    return (Point(kind="witness", role="witness", what=what, notice=Duration.read("48 h")),)


def _step(key: str, title: str, items: tuple[Item, ...], *, hold: bool = False) -> Step:
    point = Point(kind="hold", role="inspector", what="fit and runout before the next part")
    return Step(
        key=key,
        title=title,
        items=items,
        change_limit=_limit("20 µm"),
        points=(point, *_witnessed(key)) if hold else (),
    )


def _steps() -> tuple[Step, ...]:
    drum = _hot(
        "drum",
        "Balance drum",
        _outline("drum", 1270.0, 1400.0, 80.0, 165.0, 165.0),
        (
            _land("inner", 1275.0, 1315.0, 80.00, 165.0, "40 to 70"),
            _land("outer", 1355.0, 1395.0, 79.90, 165.0, "40 to 70"),
        ),
        mass="16.8 kg",
    )
    collar = _hot(
        "thrust-collar",
        "Thrust collar",
        _outline("collar", 1760.0, 1790.0, 65.0, 150.0, 95.0),
        (_land("1", 1763.0, 1787.0, 65.00, 95.0, "25 to 50"),),
        mass="3.4 kg",
        keyed=True,
    )
    hub = _hot(
        "hub",
        "Coupling hub",
        _outline("hub", 20.0, 100.0, 60.0, 120.0, 95.0),
        (_land("1", 25.0, 95.0, 60.00, 95.0, "30 to 60"),),
        mass="5.1 kg",
        first_end=True,
        keyed=True,
    )
    drive = _outline("sleeve", 240.0, 340.0, 78.0, 96.0, 96.0)
    free = _outline("sleeve", 1450.0, 1560.0, 78.0, 96.0, 96.0)
    nut = _outline("nut", 1800.0, 1825.0, 58.0, 92.0, 92.0)
    sleeves = (
        _cold("sleeve-drive", "Seal sleeve, drive end", "slip", drive, "1.9 kg"),
        _cold("sleeve-free", "Seal sleeve, free end", "slip", free, "2.1 kg"),
    )
    return (
        *(_stage(number) for number in range(1, 9)),
        _step("drum", "Balance drum", (drum,), hold=True),
        _step("end-sleeves", "Seal sleeves", sleeves),
        _step("thrust-collar", "Thrust collar", (collar,), hold=True),
        _step(
            "nut",
            "Thrust collar nut",
            (_cold("nut", "Thrust collar nut", "clamped", nut, "0.8 kg"),),
            hold=True,
        ),
        _step("hub", "Coupling hub", (hub,), hold=True),
    )


def _shaft() -> Shaft:
    stages = [
        (310.0 + 110.0 * number, 420.0 + 110.0 * number, seat)
        for number, seat in enumerate(_SEATS, start=1)
    ]
    drawn = (
        (0.0, 110.0, 60.0),
        (110.0, 230.0, 75.0),
        (230.0, 360.0, 78.0),
        (360.0, 420.0, 90.0),
        *stages[:-1],
        (1190.0, 1265.0, 80.05),
        (1265.0, 1335.0, 80.0),
        (1335.0, 1405.0, 79.9),
        (1405.0, 1640.0, 78.0),
        (1640.0, 1755.0, 75.0),
        (1755.0, 1795.0, 65.0),
        (1795.0, 1900.0, 58.0),
    )
    return Shaft(
        serial="EG-W-318/1",
        material="42crmo4",
        steps=tuple(
            ShaftStep(start=_mm(start), end=_mm(end), diameter=_mm(diameter))
            for start, end, diameter in drawn
        ),
        roughness=_length("0.8 µm"),
    )


_FINAL: dict[StationKind, str] = {
    "journal": "10 µm",
    "probe track": "15 µm",
    "shaft": "40 µm",
    "part": "60 µm",
}


def _stations() -> tuple[Station, ...]:
    rows: tuple[tuple[str, str, float, StationKind, str | None, str | None], ...] = (
        ("H1", "Outside of the coupling hub", 60.0, "part", "hub", None),
        ("P1", "Probe track, drive end", 140.0, "probe track", None, None),
        ("J1", "Journal, drive end", 180.0, "journal", None, None),
        ("B1", "Shaft shoulder before stage 1", 390.0, "shaft", None, None),
        ("R1", "Wear ring of stage 1", 435.0, "part", "impeller-1", None),
        ("K2", "Seat of stage 2", 560.0, "seat", None, "impeller-2"),
        ("R4", "Wear ring of stage 4", 765.0, "part", "impeller-4", None),
        ("K4", "Seat of stage 4", 780.0, "seat", None, "impeller-4"),
        ("K6", "Seat of stage 6", 1000.0, "seat", None, "impeller-6"),
        ("R7", "Wear ring of stage 7", 1095.0, "part", "impeller-7", None),
        ("K8", "Seat of stage 8", 1220.0, "seat", None, "impeller-8"),
        ("K9", "Seat of the balance drum", 1335.0, "seat", None, "drum"),
        ("D1", "Outside of the balance drum", 1340.0, "part", "drum", None),
        ("B2", "Shaft behind the drum", 1425.0, "shaft", None, None),
        ("J2", "Journal, free end", 1700.0, "journal", None, None),
        ("P2", "Probe track, free end", 1745.0, "probe track", None, None),
    )
    return tuple(
        Station(
            key=key,
            name=name,
            position=_mm(position),
            kind=kind,
            reached_from=reached,
            covered_by=covered,
            final_limit=_limit(_FINAL[kind]) if kind in _FINAL else None,
        )
        for key, name, position, kind, reached, covered in rows
    )


PLAN = Plan(
    revision="1",
    reason="First issue.",
    written_by="KB",
    issued_by="HL",
    issued_at="2026-10-14T09:20:00+02:00",
    approved_by="Quellverband Obertal (invented)",
    decision_rule="simple",
    rotor=Rotor(
        serial="EG-318",
        name="Eight-stage pump rotor",
        machine_tag="P 4.02",
        plant="Wasserwerk Tannenbruch (invented)",
        service="drinking water, high lift",
        units="metric",
        reference_mark="keyway of the coupling",
        maximum_continuous_speed=Speed.read("2980 r/min"),
        trip_speed=Speed.read("3280 r/min"),
        power=Power.read("900 kW"),
        invented=True,
    ),
    shaft=_shaft(),
    first_journal="J1",
    second_journal="J2",
    stations=_stations(),
    steps=_steps(),
    runout=RunoutMethod(
        marks=tuple(_angle(f"{degrees} °") for degrees in range(0, 360, 30)),
        order="station by station",
        attitude="horizontal",
        supports="lined V-blocks",
        supported_at=("J1", "J2"),
        end_stop="ball against the centre at the free end",
        rest_time="10 min",
        turns_before_reading=2,
        close_circle=True,
        closure_limit=_length("4 µm"),
        reading_uncertainty=_length("0.6 µm"),
        mark_uncertainty=_angle("1 °"),
        indicator_resolution=_length("1 µm"),
    ),
    cooling=CoolingLimits(
        side_to_side=TemperatureStep.read("0.5 K"),
        above_surroundings=TemperatureStep.read("2 K"),
        agreement=_length("4 µm"),
        time_constant_hours=2.2,
        origin=_SHOP,
    ),
    drift_limit=_limit("40 µm"),
    bare_shaft_limit=_limit("20 µm"),
)
