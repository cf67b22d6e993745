"""An invented rotor with five impellers, for drawing; no reading of it was ever taken."""

from __future__ import annotations

import cmath
import math

from reports.sheet.pictures import (
    ChangeMark,
    Curve,
    DialPicture,
    DialReading,
    Facing,
    PartKind,
    PartOutline,
    PartState,
    PlaneCurve,
    RotorPicture,
    ShaftStep,
    StationMark,
    StationState,
    VerdictKind,
)

INCH = 0.0254


def _steps() -> tuple[ShaftStep, ...]:
    ends = [0.6, 4.6, 9.6, 13.6, 17.0, 18.2, 42.0, 47.2, 50.4, 55.4, 58.6, 62.0]
    diameters = [3.2, 3.4, 4.0, 4.5, 5.2, 6.3, 5.6, 5.4, 4.8, 4.0, 3.4, 2.8]
    starts = [0.0, *ends[:-1]]
    return tuple(
        ShaftStep(start=start * INCH, end=end * INCH, diameter=diameter * INCH)
        for start, end, diameter in zip(starts, ends, diameters, strict=True)
    )


def _part(key, name, kind, start, end, bore, outer, state, **more) -> PartOutline:
    return PartOutline(
        key=key,
        name=name,
        kind=kind,
        start=start * INCH,
        end=end * INCH,
        bore_diameter=bore * INCH,
        outer_diameter=outer * INCH,
        state=state,
        **more,
    )


def parts(*, lifted_gap: float = 0.0, attempt: int = 1) -> tuple[PartOutline, ...]:
    on, current, later = PartState.ON, PartState.CURRENT, PartState.TO_COME
    made = []
    impellers = [
        (18.2, 17.0, on),
        (23.4, 16.6, on),
        (28.4, 16.6, on),
        (33.4, 16.2, current),
        (38.3, 15.8, later),
    ]
    for index, (start, outer, state) in enumerate(impellers):
        number = index + 1
        label = ""
        if state is current:
            doing = "hot" if lifted_gap else "on"
            label = f"Impeller {number}, {doing}, attempt {attempt}"
        made.append(
            _part(
                f"impeller-{number}",
                f"Impeller {number}",
                PartKind.IMPELLER,
                start,
                start + 3.3,
                5.6,
                outer,
                state,
                hub_diameter=6.4 * INCH,
                number=str(2 * number - 1),
                label=label,
                lifted_gap=lifted_gap if state is current else 0.0,
                attempt=attempt if state is current else 1,
            )
        )
        if number < 5:
            made.append(
                _part(
                    f"sleeve-{number}",
                    f"Sleeve {number}",
                    PartKind.SLEEVE,
                    start + 3.3,
                    impellers[index + 1][0],
                    5.6,
                    6.7,
                    on if number < 4 else later,
                )
            )
    made += [
        _part("drum", "Balance drum", PartKind.DRUM, 42.0, 47.0, 5.4, 8.8, later, number="10"),
        _part("seal", "Seal sleeve", PartKind.SLEEVE, 47.2, 50.2, 5.4, 6.0, later),
        _part("collar", "Thrust collar", PartKind.COLLAR, 55.6, 58.4, 4.0, 7.8, later, number="12"),
        _part(
            "hub",
            "Coupling hub",
            PartKind.HUB,
            0.8,
            4.6,
            3.4,
            7.2,
            later,
            number="13",
            facing=Facing.DRIVE_END,
        ),
    ]
    return tuple(made)


POSITIONS = [2.4, 7.1, 11.6, 15.4, 22.5, 27.6, 32.6, 37.5, 41.6, 44.6, 48.7, 52.9, 56.6, 60.3]
NAMES = ["S1", "J1", "S3", "S4", "S5", "S6", "S7", "S8", "S9", "S10", "S11", "J2", "S13", "S14"]


def stations(*, active: int | None = 7) -> tuple[StationMark, ...]:
    def state(index: int) -> StationState:
        if active is None or index < active or index == 11:
            return StationState.READ
        return StationState.ACTIVE if index == active else StationState.TO_COME

    return tuple(
        StationMark(
            key=name, position=position * INCH, is_journal=name.startswith("J"), state=state(index)
        )
        for index, (name, position) in enumerate(zip(NAMES, POSITIONS, strict=True))
    )


def rotor(*, active: int | None = 7, lifted_gap: float = 0.0, attempt: int = 1) -> RotorPicture:
    return RotorPicture(
        name="R-0418 (invented)",
        steps=_steps(),
        parts=parts(lifted_gap=lifted_gap, attempt=attempt),
        stations=stations(active=active),
    )


def _bow(position: float, amount: float, angle: float) -> complex:
    share = (position - 7.1) / (52.9 - 7.1)
    return amount * math.sin(math.pi * share) * cmath.exp(1j * math.radians(angle))


def _kink(position: float, amount: float, angle: float) -> complex:
    first, second, at = 7.1, 52.9, 34.9
    if position < at:
        share = (position - first) / (at - first)
    else:
        share = (second - position) / (second - at)
    return amount * share * cmath.exp(1j * math.radians(angle))


BEFORE = [_bow(position, 0.00042 * INCH, 28.0) for position in POSITIONS]
AFTER = [
    before + _kink(position, 0.00055 * INCH, 146.0)
    for before, position in zip(BEFORE, POSITIONS, strict=True)
]
SETTLED = [
    before + _kink(position, 0.00008 * INCH, 120.0)
    for before, position in zip(BEFORE, POSITIONS, strict=True)
]
PLACES = tuple(position * INCH for position in POSITIONS)


def curves_being_read(*, active: int = 7) -> tuple[PlaneCurve, ...]:
    after = [
        vector if index <= active or index == 11 else None for index, vector in enumerate(AFTER)
    ]
    return (
        PlaneCurve(which=Curve.BEFORE, positions=PLACES, vectors=tuple(BEFORE)),
        PlaneCurve(which=Curve.AFTER, positions=PLACES, vectors=tuple(after), active=active),
    )


def curves_of_two_attempts() -> tuple[PlaneCurve, ...]:
    return (
        PlaneCurve(which=Curve.BEFORE, positions=PLACES, vectors=tuple(BEFORE), name="before"),
        PlaneCurve(which=Curve.EARLIER, positions=PLACES, vectors=tuple(AFTER), name="attempt 1"),
        PlaneCurve(which=Curve.AFTER, positions=PLACES, vectors=tuple(SETTLED), name="attempt 2"),
    )


def _verdict(share: float) -> VerdictKind:
    if share > 1.02:
        return VerdictKind.STOP
    return VerdictKind.LOOK if share > 0.95 else VerdictKind.WITHIN


def changes(*, after: list[complex], active: int | None = None) -> tuple[ChangeMark, ...]:
    marks = []
    for index, (name, before, now) in enumerate(zip(NAMES, BEFORE, after, strict=True)):
        change = 2.0 * (now - before)
        limit = 0.0010 * INCH
        is_datum = name.startswith("J")
        figure = f"{abs(change) / INCH * 1e4:.0f}"
        state = StationState.READ
        if active is not None and index >= active and not is_datum:
            state = StationState.ACTIVE if index == active else StationState.TO_COME
        missing = state is StationState.TO_COME
        marks.append(
            ChangeMark(
                key=name,
                position=PLACES[index],
                change_tir=None if missing or is_datum else change,
                limit_tir=limit,
                text="datum"
                if is_datum
                else ""
                if missing
                else f"{figure} ± 2"
                if state is StationState.ACTIVE
                else figure,
                verdict=VerdictKind.NOT_JUDGED
                if is_datum or state is not StationState.READ
                else _verdict(abs(change) / limit),
                state=state,
                is_datum=is_datum,
            )
        )
    return tuple(marks)


def dial(*, station: int = 7, read: int = 6) -> DialPicture:
    before, after = BEFORE[station], AFTER[station]
    readings = []
    for count in range(read):
        angle = math.radians(45.0 * count)
        ripple = 0.00004 * INCH * math.cos(3.0 * angle + 0.6)
        value = (after * cmath.exp(-1j * angle)).real + ripple
        readings.append(DialReading(angle=angle, value=value, is_open=count == read - 1))
    return DialPicture(
        key=NAMES[station],
        readings=tuple(readings),
        eccentricity=after,
        before=before,
        limit_tir=0.0010 * INCH,
        active_angle=math.radians(45.0 * (read - 1)) if read < 8 else None,
        caption=("from the drive end", "rotor turns ↻, marks counted ↺"),
    )
