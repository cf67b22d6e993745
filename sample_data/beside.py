"""What happens beside the mounting in the invented builds: points, work outside, things seen."""

import datetime
import hashlib
from collections.abc import Mapping
from importlib.resources import files

from models.job import (
    Attachment,
    Item,
    OutsideOperation,
    Place,
    PointEvent,
    Step,
    Tightening,
    VisualFinding,
)
from models.units import Torque
from sample_data.scribe import Scribe

__all__ = [
    "PICTURE",
    "PICTURED",
    "picture_content",
    "seen_on_seat",
    "send_off",
    "take_back",
    "tell_of_points",
    "tighten",
]

PICTURE = "impeller 2, seat.png"
_FILE = "seat.png"
# Whose seat is drawn in it.
PICTURED = ("impeller-2",)
# At these steps nobody came to the witness point; at the others the customer waived it.
_ABSENT = ("impeller-3",)
_TORQUES: Mapping[str, str] = {"in": "220 lbf·ft", "mm": "300 N·m"}
_DAYS_BEFORE = 4


def picture_content() -> bytes:
    """Read the one picture of the invented builds: a drawn seat with its bright patch."""
    return files("sample_data").joinpath("pictures").joinpath(_FILE).read_bytes()


def tell_of_points(story: Scribe, step: Step, *, before: bool) -> None:
    """Tell at a step's opening who was invited, and at its end who came."""
    witness = next(one.name for one in story.shop.people if one.key == story.shop.witness)
    for point in step.points:
        if point.kind != "witness":
            continue
        letter = "letter, invented"
        asked = datetime.datetime.fromisoformat(story.clock.told)
        asked -= datetime.timedelta(days=_DAYS_BEFORE)
        told = {"at": asked.isoformat(timespec="seconds"), "event": "invited", "how": letter}
        if not before:
            story.clock.wait(2)
            absent = step.key in _ABSENT
            told = {
                "at": story.clock.told,
                "event": "did not come" if absent else "waived",
                "how": "" if absent else f"{letter}, of the day before",
            }
        story.add(
            PointEvent,
            by=story.shop.inspector,
            point_kind=point.kind,
            point_role=point.role,
            what=point.what,
            who=witness,
            **told,
        )


def seen_on_seat(story: Scribe, item: Item) -> None:
    """Tell what was seen on a seat that a part came off, and attach a picture of it."""
    serial = next(one.serial for one in story.components if one.item == item.key)
    story.clock.wait(5)
    story.add(
        VisualFinding,
        subject="shaft",
        seen_at=f"seat of {item.name.lower()}, outer third",
        words="bright patch on one side, nothing scored",
        weight="remark",
    )
    content = picture_content()
    story.add(
        Attachment,
        name=PICTURE,
        media_type="image/png",
        size_bytes=len(content),
        file_digest=hashlib.sha256(content).hexdigest(),
        about=serial,
        words="the bright patch, drawn (invented)",
    )


def tighten(story: Scribe, item: Item) -> None:
    """Tell how a nut was tightened and locked."""
    story.add(
        Tightening,
        item=item.key,
        method="torque",
        torque=Torque.read(_TORQUES[story.shop.size_unit]),
        order="in three rounds",
        locked_by="set screw",
    )


def send_off(story: Scribe, *, subject: str, what: str) -> str:
    """Tell that a part was sent elsewhere, and give the entry's id."""
    here, story.place = story.place, Place(kind="as received")
    story.clock.wait(3)
    sent = story.add(
        OutsideOperation,
        what=what,
        subject=subject,
        works="Test House at the Ford (invented)",
        sent_on=story.clock.told[:10],
    )
    story.place = here
    return sent


def take_back(story: Scribe, sent: str) -> None:
    """Tell that a part is back with its certificate."""
    gone = next(one for one in story.entries if one.id == sent)
    assert isinstance(gone, OutsideOperation)
    here, story.place = story.place, Place(kind="as received")
    story.clock.wait(3)
    story.add(
        OutsideOperation,
        what=gone.what,
        subject=gone.subject,
        works=gone.works,
        sent_on=gone.sent_on,
        back_on=story.clock.told[:10],
        sent_as=sent,
        certificate="invented PT-118/26",
        result="accepted",
        words="no indication",
    )
    story.place = here
