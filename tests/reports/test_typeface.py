from __future__ import annotations

import pytest
from fontTools.ttLib import TTFont

from reports import typeface
from reports.typeface import Weight

NEEDED = "0123456789+−±×√≤≥°µØ·↺↻αβδεθλμνρσφωΔΩ–…“”  "
every_font = pytest.mark.parametrize("path", typeface.font_paths(), ids=lambda path: path.stem)


@every_font
def test_every_sign_the_pages_use_is_in_every_font(path):
    with TTFont(path) as font:
        missing = [sign for sign in NEEDED if ord(sign) not in font.getBestCmap()]
    assert missing == []


@every_font
def test_every_font_may_be_embedded_without_restriction(path):
    with TTFont(path) as font:
        assert font["OS/2"].fsType == 0


@every_font
def test_figures_and_their_signs_are_one_width_so_columns_align(path):
    with TTFont(path) as font:
        names = font.getBestCmap()
        widths = {font["hmtx"][names[ord(sign)]][0] for sign in "0123456789+−"}
        per_em = font["head"].unitsPerEm
    # The maker's own tables: 0.600 em, narrow 0.540 em.
    expected = 0.540 if "Condensed" in path.stem else 0.600
    assert {width / per_em for width in widths} == {expected}


@every_font
def test_the_height_of_capitals_is_the_one_the_layout_counts_on(path):
    with TTFont(path) as font:
        assert font["OS/2"].sCapHeight / font["head"].unitsPerEm == typeface.CAPITAL_HEIGHT


def test_the_licence_lies_beside_the_fonts_and_names_itself():
    assert "SIL OPEN FONT LICENSE" in typeface.LICENCE_PATH.read_text(encoding="utf-8").upper()


def test_the_narrow_width_is_the_narrower_one():
    wide, narrow = (
        typeface.text_width(
            text="residual unbalance", size=10.0, weight=Weight.REGULAR, condensed=condensed
        )
        for condensed in (False, True)
    )
    assert narrow < wide
