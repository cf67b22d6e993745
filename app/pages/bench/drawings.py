"""The bench's drawings: along the rotor, the dial, and values against their limits."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass, replace

from app.pages.bench.places import Frame, Places
from app.presenters.bench.state import BenchState
from reports.sheet.along import along_the_rotor, axis_for, magnification_along
from reports.sheet.decay import DecayPicture, decay, decay_height
from reports.sheet.dial import dial
from reports.sheet.elements import Box, Layer, Sheet, sheet_of
from reports.sheet.labels import note
from reports.sheet.medium import Medium
from reports.sheet.pictures import DialPicture, RangePicture, Turning
from reports.sheet.ranges import fit_bar, fit_bar_height
from reports.sheet.scale import magnification_text

__all__ = ["Magnification", "along_sheet", "dial_sheet", "ranges_height", "ranges_sheet"]

_ALONE = 2000
# The figure's own shares of its width: names at the left, and the ruled part.
_NAMES_SHARE, _PLOT_SHARE = 0.25, 0.6
_MARGINS = (0.18, 0.3, 0.45, 0.6, 0.8, 1.0, 1.4)


@dataclass(slots=True)
class Magnification:
    """How many times the centreline is enlarged; held while one survey is read.

    Attributes
    ----------
    survey : object
        What tells one survey from another; None holds nothing.
    held : int or None
        The magnification that is held [-].
    before : int or None
        What it was before it stepped down in this survey [-].
    """

    survey: object = None
    held: int | None = None
    before: int | None = None

    def hold(self, survey: object) -> None:
        """Hold from now on for a survey; another survey chooses anew."""
        if survey != self.survey:
            self.survey, self.held, self.before = survey, None, None

    def take(self, chosen: int) -> None:
        """Remember what was chosen, and what it was where it stepped down."""
        if self.held is not None and chosen < self.held and self.before is None:
            self.before = self.held
        self.held = chosen if self.survey is not None else None

    @property
    def words(self) -> str:
        """What is said where it has stepped down."""
        return "" if self.before is None else f"was {magnification_text(magnification=self.before)}"


def _chosen(state: BenchState, places: Places, enlarged: Magnification) -> int:
    if state.rotor is None:
        return _ALONE
    return magnification_along(
        picture=state.rotor,
        curves=state.curves,
        limit_tir=max((mark.limit_tir or 0.0 for mark in state.changes), default=0.0),
        # Folded planes have no height, and the dial still needs a scale.
        layout=places.layout,
        held=enlarged.held,
    )


def along_sheet(state: BenchState, places: Places, enlarged: Magnification) -> Sheet | None:
    """Draw everything that shares the rotor's axis.

    Parameters
    ----------
    state : BenchState
        Rotor, centrelines and changes.
    places : Places
        The rows, and which of them are shown.
    enlarged : Magnification
        What is held, and is told what was chosen.

    Returns
    -------
    Sheet or None
        None where there is no rotor.
    """
    if state.rotor is None:
        return None
    curves = state.curves if places.has_planes else ()
    if curves:
        enlarged.take(_chosen(state, places, enlarged))
    sheet = along_the_rotor(
        picture=state.rotor,
        curves=curves,
        changes=[state.changes] if state.changes and places.layout.change_height > 20.0 else [],
        captions=[state.change_caption],
        layout=places.layout,
        counted=Turning(state.counted),
        held=enlarged.held,
        description=f"{state.rotor.name}. {state.words}",
    )
    return _with_step_down(sheet, places, enlarged) if curves else sheet


def _with_step_down(sheet: Sheet, places: Places, enlarged: Magnification) -> Sheet:
    """Say in the gutter, between both planes, that the enlargement was stepped down."""
    if not enlarged.words:
        return sheet
    layout = places.layout
    middle = sum(layout.planes) / 2.0
    size = layout.medium.sizes
    words = note(
        x=layout.margin,
        y=middle + 0.35 * min(size.values()),
        text=enlarged.words,
        medium=layout.medium,
    )
    return sheet_of(
        width=sheet.width,
        height=sheet.height,
        medium=sheet.medium,
        layers=[Layer(items=sheet.items, marks=sheet.marks), Layer(items=(words,))],
        title=sheet.title,
        description=sheet.description,
    )


def dial_sheet(
    picture: DialPicture, state: BenchState, frame: Frame, places: Places, enlarged: Magnification
) -> Sheet:
    """Draw the readings of a station round the clock, as large as the planes are enlarged."""
    width = places.dial.width() / frame.growth
    height = places.dial.height() / frame.growth
    side, above = frame.between(8, 14), frame.between(5, 8)
    scale = 580.0
    wanted = enlarged.held or _ALONE
    if state.rotor is not None:
        scale = axis_for(picture=state.rotor, layout=places.layout).scale
        if places.has_planes:
            wanted = enlarged.held or _chosen(state, places, enlarged)
    # Beside an open question the dial needs the room of its second line more than the words.
    shown = replace(picture, caption=picture.caption[:1]) if places.beside.height() else picture
    medium = _fitting(shown.caption, width - 2.0 * side, frame.medium)
    layer = dial(
        picture=shown,
        place=Box(side, above, width - side, height - above),
        medium=medium,
        scale=scale,
        magnification=wanted,
    )
    return sheet_of(
        width=width,
        height=height,
        medium=medium,
        layers=[layer],
        title=f"Dial of {picture.key}",
        description=picture.tells,
    )


def _fitting(lines: Sequence[str], room: float, medium: Medium) -> Medium:
    """Hold type so small that no line under the dial leaves its column."""
    longest = max((_width(text, medium) for text in lines), default=0.0)
    share = min(room / longest, 1.0) if longest else 1.0
    return replace(medium, sizes={use: size * share for use, size in medium.sizes.items()})


def ranges_height(picture: RangePicture | DecayPicture, frame: Frame) -> float:
    """Give the height that values against their limits, or a decay, ask for [px of the drawing]."""
    if isinstance(picture, DecayPicture):
        return min(math.ceil(decay_height(medium=frame.medium)), frame.between(150, 220))
    asked = fit_bar_height(picture=picture, medium=frame.medium) + 8.0
    return min(math.ceil(asked), frame.between(210, 300))


def ranges_sheet(picture: RangePicture | DecayPicture, frame: Frame, places: Places) -> Sheet:
    """Draw values against their limits, or how a station moved while it cooled."""
    width = places.ranges.width() / frame.growth
    height = places.ranges.height() / frame.growth
    place = Box(0.0, 2.0, width, height - 4.0)
    if isinstance(picture, DecayPicture):
        return sheet_of(
            width=width,
            height=height,
            medium=frame.medium,
            layers=[decay(picture=picture, place=place, medium=frame.medium)],
            title="While it cools",
            description=picture.tells,
        )
    layer = fit_bar(picture=_with_room(picture, place, frame), place=place, medium=frame.medium)
    bars = ". ".join(f"{bar.name}: {bar.text}, {bar.verdict.value}" for bar in picture.bars)
    return sheet_of(
        width=width,
        height=height,
        medium=frame.medium,
        layers=[layer],
        title="Values against limits",
        description=bars,
    )


def _with_room(picture: RangePicture, place: Box, frame: Frame) -> RangePicture:
    """Widen the scale until the words at both limits have room beside their lines."""
    lower, upper = picture.lower, picture.upper
    if lower is None or upper is None or picture.start is not None or picture.end is not None:
        return picture
    ends = [lower, upper]
    for bar in picture.bars:
        ends += [bar.least - bar.uncertainty, bar.greatest + bar.uncertainty]
    least, span = min(ends), max(ends) - min(ends)
    wide = [_width(text, frame.medium) for text in (picture.lower_text, picture.upper_text)]
    plot, left = _PLOT_SHARE * place.width, _NAMES_SHARE * place.width
    shown = picture
    for margin in _MARGINS:
        start, whole = least - margin * span, (1.0 + 2.0 * margin) * span
        shown = replace(picture, start=start, end=start + whole)
        low, high = (left + plot * (limit - start) / whole for limit in (lower, upper))
        if low - wide[0] >= place.left and high + wide[1] <= place.right:
            break
    return shown


def _width(text: str, medium: Medium) -> float:
    return note(x=0.0, y=0.0, text=text, medium=medium).box(medium).width + 8.0
