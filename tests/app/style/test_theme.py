from __future__ import annotations

import pytest
from PySide6.QtGui import QColor, QFontInfo, QFontMetricsF, QPalette

from app.style.theme import Appearance, apply_theme, palette_for, qt_palette
from app.style.tokens import load_fonts, pixel_font, sized_font
from reports.sheet.medium import BENCH_1280, BENCH_1920, DESK, Size
from reports.typeface import FAMILY, FAMILY_CONDENSED, Weight, text_width

APPEARANCES = pytest.mark.parametrize("appearance", list(Appearance))


def test_the_shipped_files_bring_both_widths(qapp):
    assert {FAMILY, FAMILY_CONDENSED} <= set(load_fonts())


@pytest.mark.parametrize("weight", list(Weight))
@pytest.mark.parametrize("condensed", [False, True])
def test_words_are_as_wide_on_the_screen_as_the_layout_counts(qapp, weight, condensed):
    font = pixel_font(size=100.0, weight=weight, condensed=condensed)
    words = "Sleeve 0.0123 in"

    shown = QFontMetricsF(font).horizontalAdvance(words)
    counted = text_width(text=words, size=100.0, weight=weight, condensed=condensed)

    assert QFontInfo(font).family() == (FAMILY_CONDENSED if condensed else FAMILY)
    assert shown == pytest.approx(counted, rel=0.01)


@pytest.mark.parametrize(
    ("medium", "condensed"), [(BENCH_1280, True), (BENCH_1920, False), (DESK, False)]
)
def test_notes_run_narrow_only_where_the_screen_is_small(qapp, medium, condensed):
    family = sized_font(medium=medium, size=Size.NOTE).family()

    assert family == (FAMILY_CONDENSED if condensed else FAMILY)


@pytest.mark.parametrize(("scale", "pixels"), [(0.8, 12), (1.0, 15), (2.0, 30)])
def test_a_persons_own_scale_makes_text_larger(qapp, scale, pixels):
    # By hand from 15 px on the desks.
    assert sized_font(medium=DESK, size=Size.TEXT, scale=scale).pixelSize() == pixels


@APPEARANCES
def test_no_colour_of_the_system_shows_through(qapp, appearance):
    palette = palette_for(appearance=appearance)
    ours = {
        QColor(getattr(palette, name)).name()
        for name in type(palette).__dataclass_fields__
        if name != "name"
    }
    chosen = qt_palette(palette=palette)

    for role in QPalette.ColorRole:
        if role not in (QPalette.ColorRole.NoRole, QPalette.ColorRole.NColorRoles):
            assert chosen.color(QPalette.ColorGroup.Active, role).name() in ours, role


@APPEARANCES
def test_words_that_are_switched_off_can_still_be_read(qapp, appearance):
    palette = palette_for(appearance=appearance)
    chosen = qt_palette(palette=palette)

    faded = chosen.color(QPalette.ColorGroup.Disabled, QPalette.ColorRole.WindowText)

    assert faded == QColor(palette.ink2)


def test_a_theme_reaches_the_whole_application(qapp):
    before = qapp.palette(), qapp.font()
    try:
        palette = apply_theme(application=qapp, appearance=Appearance.DARK, text_scale=1.0)

        assert qapp.palette().color(QPalette.ColorRole.Window) == QColor(palette.paper)
        assert qapp.font().family() == FAMILY
    finally:
        qapp.setPalette(before[0])
        qapp.setFont(before[1])
