"""Labels that never overlap: the more important stays, the other one is left out."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, replace

from reports.palette import Colour
from reports.sheet.elements import Anchor, Box, Text
from reports.sheet.medium import Medium, Size
from reports.typeface import Weight

__all__ = ["Label", "note", "thinned"]


@dataclass(frozen=True, slots=True, kw_only=True)
class Label:
    """Words that want a place.

    Attributes
    ----------
    text : Text
        The words.
    importance : int
        The higher one stays where two would overlap [-].
    extra_right : float
        Room kept to its right, as for a verdict's shape, in sheet units [-].
    name : str
        Whose label it is, for whoever asked for it.
    """

    text: Text
    importance: int = 0
    extra_right: float = 0.0
    name: str = ""

    def box(self, medium: Medium) -> Box:
        """Give the room the label takes with whatever stands beside it."""
        words = self.text.box(medium)
        return Box(words.left, words.top, words.right + self.extra_right, words.bottom)


def note(
    *,
    x: float,
    y: float,
    text: str,
    medium: Medium,
    anchor: Anchor = Anchor.START,
    colour: Colour = Colour.INK2,
    weight: Weight = Weight.REGULAR,
) -> Text:
    """Set words at the size and width of notes.

    Parameters
    ----------
    x, y : float
        Place on the base line in sheet units [-].
    text : str
        The words.
    medium : Medium
        Decides whether notes run narrow.
    anchor : Anchor, optional
        Which end of the words sits there.
    colour : Colour, optional
        Colour of the words.
    weight : Weight, optional
        Weight of the type.

    Returns
    -------
    Text
        The words on the sheet.
    """
    return Text(
        x=x,
        y=y,
        text=text,
        size=Size.NOTE,
        weight=weight,
        condensed=medium.condensed_notes,
        anchor=anchor,
        colour=colour,
    )


def thinned(
    *, labels: Sequence[Label], medium: Medium, taken: Iterable[Box] = ()
) -> tuple[Label, ...]:
    """Keep the labels that do not overlap.

    Where they all fit they all stay. Where they do not, the narrow width is tried, and after that
    the less important give way; among equals every second one does.

    Parameters
    ----------
    labels : sequence of Label
        In the order in which they stand.
    medium : Medium
        Decides how wide words run.
    taken : iterable of Box, optional
        Places that are no longer free.

    Returns
    -------
    tuple of Label
        Those that stay, in the order given.
    """
    blocked = tuple(taken)
    if len(_kept(labels, medium, blocked)) == len(labels):
        return tuple(labels)
    narrow = [replace(label, text=replace(label.text, condensed=True)) for label in labels]
    kept = _kept(narrow, medium, blocked)
    return tuple(label for index, label in enumerate(narrow) if index in kept)


def _kept(labels: Sequence[Label], medium: Medium, blocked: tuple[Box, ...]) -> set[int]:
    order = sorted(range(len(labels)), key=lambda index: (-labels[index].importance, index))
    kept: set[int] = set()
    boxes = list(blocked)
    for index in order:
        box = labels[index].box(medium)
        spaced = Box(box.left - medium.space, box.top, box.right + medium.space, box.bottom)
        if not any(spaced.overlaps(other) for other in boxes):
            kept.add(index)
            boxes.append(box)
    return kept
