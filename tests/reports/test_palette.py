from __future__ import annotations

from itertools import combinations

import numpy as np
import pytest

from reports.palette import CONTRAST, DARK, LIGHT, PAPER, Colour, Palette, colour_components
from tests.reports.colour_science import (
    MISSING_RECEPTOR,
    colour_difference,
    contrast_ratio,
    seen_difference,
)

PALETTES = [LIGHT, DARK, CONTRAST, PAPER]
GROUNDS = [Colour.PAPER, Colour.SHEET]
TEXTS = [Colour.INK, Colour.INK2, Colour.ACCENT, Colour.WITHIN, Colour.LOOK, Colour.STOP]
VERDICTS = [Colour.WITHIN, Colour.LOOK, Colour.STOP]
MEANINGS = [*VERDICTS, Colour.ACCENT, Colour.INK, Colour.BEFORE]

palettes = pytest.mark.parametrize("palette", PALETTES, ids=lambda palette: palette.name)
receptors = pytest.mark.parametrize("receptor", list(MISSING_RECEPTOR))


# Sharma, Wu and Dalal 2005, table 1, pairs 1, 4, 7, 17 and 25; from memory.
@pytest.mark.parametrize(
    ("first", "second", "printed"),
    [
        ((50.0, 2.6772, -79.7751), (50.0, 0.0, -82.7485), 2.0425),
        ((50.0, -1.3802, -84.2814), (50.0, 0.0, -82.7485), 1.0000),
        ((50.0, 0.0, 0.0), (50.0, -1.0, 2.0), 2.3669),
        ((50.0, 2.5, 0.0), (73.0, 25.0, -18.0), 27.1492),
        ((60.2574, -34.0099, 36.2677), (60.4626, -34.1751, 39.4387), 1.2644),
    ],
)
def test_the_colour_difference_agrees_with_the_published_pairs(first, second, printed):
    assert colour_difference(np.array(first), np.array(second)) == pytest.approx(
        printed, abs=0.00005
    )


@receptors
def test_a_missing_receptor_leaves_grey_grey(receptor):
    assert MISSING_RECEPTOR[receptor].sum(axis=1) == pytest.approx(np.ones(3), abs=2e-6)


def test_black_on_white_has_the_contrast_of_the_web_guidelines():
    # WCAG 2.2, definition of contrast ratio: 21:1; from memory.
    assert contrast_ratio("#000000", "#FFFFFF") == pytest.approx(21.0, abs=0.05)


@palettes
@pytest.mark.parametrize("ground", GROUNDS)
@pytest.mark.parametrize("text", TEXTS)
def test_every_colour_for_text_can_be_read_on_both_grounds(palette, ground, text):
    assert contrast_ratio(palette.code(text), palette.code(ground)) >= 4.5


@palettes
@pytest.mark.parametrize("ground", GROUNDS)
def test_the_line_of_the_earlier_state_can_be_seen_on_both_grounds(palette, ground):
    assert contrast_ratio(palette.code(Colour.BEFORE), palette.code(ground)) >= 3.0


@palettes
@pytest.mark.parametrize("verdict", VERDICTS)
def test_paper_coloured_words_can_be_read_on_a_verdict(palette, verdict):
    assert contrast_ratio(palette.paper, palette.code(verdict)) >= 4.5


@palettes
@receptors
def test_no_two_verdicts_look_alike_to_any_eye(palette, receptor):
    least = min(
        seen_difference(palette.code(one), palette.code(other), receptor)
        for one, other in combinations(VERDICTS, 2)
    )
    assert least >= 15.0


@palettes
@receptors
def test_no_two_colours_that_mean_something_look_alike_to_any_eye(palette, receptor):
    least = min(
        seen_difference(palette.code(one), palette.code(other), receptor)
        for one, other in combinations(MEANINGS, 2)
    )
    assert least >= 12.0


def test_paper_takes_every_colour_but_its_ground_from_the_light_palette():
    differing = {colour for colour in Colour if PAPER.code(colour) != LIGHT.code(colour)}
    assert differing == {Colour.PAPER}


def test_a_palette_cannot_be_changed():
    with pytest.raises(AttributeError):
        LIGHT.ink = "#000000"  # type: ignore[misc]


def test_every_token_of_a_palette_has_a_colour_to_ask_by():
    assert {colour.value for colour in Colour} | {"name"} == set(Palette.__dataclass_fields__)


def test_components_run_from_nothing_to_full():
    assert colour_components(code="#0080FF") == pytest.approx((0.0, 128 / 255, 1.0))
