import pytest
from PySide6.QtCore import QPointF
from PySide6.QtGui import QImage, QPainter

from app.frame.look import Look
from app.frame.shapes import draw_verdict_shape
from reports.palette import CONTRAST, DARK, LIGHT, Colour
from reports.sheet.pictures import VerdictKind

SIDE = 100


def drawn(kind, palette=LIGHT, height=SIDE):
    look = Look(palette=palette)
    image = QImage(SIDE, SIDE, QImage.Format.Format_RGB32)
    image.fill(look.colour(Colour.PAPER))
    painter = QPainter(image)
    draw_verdict_shape(painter, QPointF(SIDE / 2, SIDE / 2), height, kind, look)
    painter.end()
    return image


def share_inked(image, palette=LIGHT, left=0, right=SIDE):
    paper = Look(palette=palette).colour(Colour.PAPER)
    dots = [(x, y) for x in range(left, right) for y in range(SIDE)]
    return sum(image.pixelColor(x, y) != paper for x, y in dots) / len(dots)


@pytest.mark.parametrize("palette", [LIGHT, DARK, CONTRAST], ids=lambda palette: palette.name)
def test_the_worse_the_verdict_the_more_ink(qtbot, palette):
    loads = [
        share_inked(drawn(kind, palette), palette)
        for kind in (VerdictKind.NOT_JUDGED, VerdictKind.WITHIN, VerdictKind.LOOK, VerdictKind.STOP)
    ]
    # The half square carries less ink than a ring but is half solid; only the solid square is full.
    assert loads[0] < loads[1] < loads[3]
    assert loads[0] < loads[2] < loads[3]


def test_look_again_is_solid_on_its_left_half_only(qtbot):
    image = drawn(VerdictKind.LOOK)
    ground = Look().colour(Colour.PAPER)

    assert image.pixelColor(35, 50) == Look().colour(Colour.LOOK)
    assert image.pixelColor(65, 50) == ground
    assert image.pixelColor(96, 50) == Look().colour(Colour.LOOK)


def test_within_limits_is_open_inside(qtbot):
    image = drawn(VerdictKind.WITHIN)

    assert image.pixelColor(50, 50) == Look().colour(Colour.PAPER)
    # Radius 0.43 of the height, from the specification of the shapes.
    assert image.pixelColor(93, 50) == Look().colour(Colour.WITHIN)


def test_stop_has_its_bar_only_where_it_can_be_seen(qtbot):
    paper = Look().colour(Colour.PAPER)

    assert drawn(VerdictKind.STOP).pixelColor(50, 50) == paper
    assert drawn(VerdictKind.STOP, height=16).pixelColor(50, 50) == Look().colour(Colour.STOP)
