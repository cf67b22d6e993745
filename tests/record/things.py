"""Invented entries beside the mounting, one of each kind, for the small job."""

from collections.abc import Callable

from models.job import (
    AnyEntry,
    Attachment,
    InstrumentEvent,
    NumberedFinding,
    OutsideOperation,
    Place,
    PointEvent,
    Tightening,
    VisualFinding,
)
from models.units import Angle, Length, Pressure, Torque

__all__ = ["FOUND_OUT", "NUMBERED", "entries_beside"]

_STEP_TWO = Place(kind="attempt", step="one", attempt=2)

NUMBERED = NumberedFinding(
    number=1,
    about="seen",
    words="Scratch across the seat",
    opened_at="2031-03-04T10:04:00+01:00",
    entry="seen",
    step="one",
    attempt=2,
)
FOUND_OUT = InstrumentEvent(
    id="found out one",
    tag="DI-3",
    last_good_on="2031-03-01",
    found_on="2031-03-20",
    words="Sticks at half its travel",
    by="ivo",
)


def entries_beside(common: Callable[[str, Place, int], dict[str, object]]) -> tuple[AnyEntry, ...]:
    """Make one entry of each kind, in the second attempt of step one."""
    point: dict[str, object] = {"point_kind": "witness", "point_role": "witness", "what": "runout"}
    return (
        PointEvent(
            **common("invited", _STEP_TWO, 100),
            **point,
            event="invited",
            who="Customer",
            at="2031-03-01T09:00:00+01:00",
            how="letter 12",
        ),
        OutsideOperation(
            **common("sent", _STEP_TWO, 101),
            what="plating of the seat",
            subject="C-1",
            works="Invented Platers, Elsewhere",
            sent_on="2031-02-20",
        ),
        OutsideOperation(
            **common("back", _STEP_TWO, 102),
            what="plating of the seat",
            subject="C-1",
            works="Invented Platers, Elsewhere",
            sent_on="2031-02-20",
            back_on="2031-03-02",
            sent_as="sent",
            certificate="P-77",
            result="accepted",
        ),
        Tightening(
            **common("tight", _STEP_TWO, 103),
            item="w1",
            method="torque and angle",
            torque=Torque.read("410 lbf·ft"),
            angle=Angle.read("60°"),
            pressure=Pressure.read("120 bar"),
            elongation=Length.read("0.12 mm"),
            instrument="BG-2",
            order="crosswise",
            locked_by="tab washer",
        ),
        VisualFinding(
            **common("seen", _STEP_TWO, 104),
            subject="C-1",
            seen_at="bore, rear land",
            words="Scratch across the seat",
            weight="does not conform",
        ),
        Attachment(
            **common("picture", _STEP_TWO, 105),
            name="scratch.png",
            media_type="image/png",
            size_bytes=3,
            # Of the three bytes "abc", as FIPS 180-2 appendix B.1 prints it.
            file_digest="ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
            about="seen",
        ),
    )
