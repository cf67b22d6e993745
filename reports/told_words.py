"""Entries beside the mounting in words, for the traveler and the screen alike."""

from models.job import (
    AnyEntry,
    Attachment,
    OutsideOperation,
    PointEvent,
    Tightening,
    VisualFinding,
)

__all__ = ["TOLD", "told_words"]

TOLD = (Attachment, OutsideOperation, PointEvent, Tightening, VisualFinding)
_EVENTS = {
    "invited": "was invited",
    "came": "came",
    "did not come": "did not come",
    "waived": "waived it",
}


def told_words(entry: AnyEntry) -> str:
    """Say an entry beside the mounting in one sentence or two."""
    if isinstance(entry, PointEvent):
        said = f"{entry.point_kind} point “{entry.what}”: {entry.who} {_EVENTS[entry.event]}"
        return _with(said, entry.how, entry.words)
    if isinstance(entry, OutsideOperation):
        said = f"{entry.subject}: {entry.what} by {entry.works}, sent {entry.sent_on}"
        if entry.back_on is not None:
            said += f", back {entry.back_on}, {entry.result}"
        paper = f"certificate {entry.certificate}" if entry.certificate else ""
        return _with(said, paper, entry.words)
    if isinstance(entry, Tightening):
        figures = [
            one.written
            for one in (entry.torque, entry.angle, entry.pressure, entry.elongation)
            if one is not None
        ]
        locked = f"locked by {entry.locked_by}" if entry.locked_by else "not locked"
        said = f"{entry.item}: {entry.method} {', '.join(figures)}".rstrip()
        return _with(said, entry.order, locked, entry.words)
    if isinstance(entry, VisualFinding):
        return f"{entry.subject}, {entry.seen_at}: {entry.words} ({entry.weight})"
    if isinstance(entry, Attachment):
        about = f"about {entry.about}" if entry.about else ""
        said = f"{entry.name}, {entry.size_bytes} bytes, SHA-256 {entry.file_digest[:16]}…"
        return _with(said, entry.words, about)
    return entry.title


def _with(said: str, *more: str) -> str:
    return ", ".join((said, *(one for one in more if one)))
