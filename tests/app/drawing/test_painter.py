from __future__ import annotations

import numpy as np
import pytest
from PySide6.QtGui import QColor, QImage, QPainter

from app.drawing.painter import paint_sheet
from reports.palette import DARK, LIGHT, Colour
from reports.sheet.elements import (
    Arc,
    Circle,
    Dash,
    Hatch,
    Layer,
    Line,
    Polygon,
    Polyline,
    Stroke,
    Text,
    sheet_of,
)
from reports.sheet.medium import DESK, LineWidth, Size

WIDE = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
NARROW = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.INK)
SQUARE = ((20.0, 20.0), (80.0, 20.0), (80.0, 80.0), (20.0, 80.0))
PRIMITIVES = {
    "line": Line(x1=20.0, y1=50.0, x2=80.0, y2=50.0, stroke=WIDE),
    "polyline": Polyline(points=SQUARE, stroke=WIDE),
    "polygon filled": Polygon(points=SQUARE, fill=Colour.STOP),
    "polygon outlined": Polygon(points=SQUARE, stroke=WIDE),
    "polygon hatched": Polygon(points=SQUARE, hatch=Hatch(rising=True, pitch=6.0, stroke=NARROW)),
    "circle outlined": Circle(x=50.0, y=50.0, radius=20.0, stroke=WIDE),
    "circle filled": Circle(x=50.0, y=50.0, radius=20.0, fill=Colour.WITHIN),
    "arc": Arc(x=50.0, y=50.0, radius=20.0, start_degrees=0.0, sweep_degrees=90.0, stroke=WIDE),
    "text": Text(x=20.0, y=60.0, text="J1", size=Size.TITLE),
}


def pixels(*items, palette=LIGHT, scale=1.0, ratio=1.0) -> np.ndarray:
    sheet = sheet_of(width=100.0, height=100.0, medium=DESK, layers=[Layer(items=tuple(items))])
    size = round(100 * scale * ratio)
    image = QImage(size, size, QImage.Format.Format_RGB32)
    image.setDevicePixelRatio(ratio)
    image.fill(QColor(palette.paper))
    painter = QPainter(image)
    paint_sheet(painter=painter, sheet=sheet, palette=palette, scale=scale)
    painter.end()
    values = np.frombuffer(image.constBits(), dtype=np.uint8).reshape(size, size, 4)
    return values[:, :, 2::-1].astype(int)


def rgb(code: str) -> list[int]:
    return [int(code[first : first + 2], 16) for first in (1, 3, 5)]


@pytest.mark.parametrize("name", list(PRIMITIVES))
def test_every_primitive_leaves_its_ink(qapp, name):
    assert (pixels(PRIMITIVES[name]) != rgb(LIGHT.paper)).any()


@pytest.mark.parametrize("ratio", [1.0, 1.5, 2.0])
@pytest.mark.parametrize("x", [50.0, 50.3, 50.5])
def test_a_narrow_upright_line_is_crisp_at_every_device_ratio(qapp, ratio, x):
    line = Line(x1=x, y1=0.0, x2=x, y2=100.0, stroke=NARROW)

    row = pixels(line, ratio=ratio)[round(50 * ratio)]

    inked = row[(row != rgb(LIGHT.paper)).any(axis=1)]
    # By hand: 1 px, and 1.5 or 2 device pixels rounded to 2, all of full ink.
    assert (inked == rgb(LIGHT.ink)).all()
    assert len(inked) == (2 if ratio > 1.0 else 1)


def test_a_filled_area_has_the_colour_of_its_palette(qapp):
    for palette in (LIGHT, DARK):
        shown = pixels(PRIMITIVES["polygon filled"], palette=palette)
        assert shown[50, 50].tolist() == rgb(palette.stop)


def test_an_arc_runs_the_way_a_clock_runs(qapp):
    shown = pixels(PRIMITIVES["arc"])

    rows, columns = np.argwhere((shown != rgb(LIGHT.paper)).any(axis=2)).T
    assert rows.min() >= 48
    assert columns.min() >= 48


def test_a_sheet_grows_with_its_scale(qapp):
    shown = pixels(PRIMITIVES["polygon filled"], scale=2.0)

    rows, _ = np.argwhere((shown == rgb(LIGHT.stop)).all(axis=2)).T
    # By hand: 20 to 80 doubled.
    assert (rows.min(), rows.max()) == (40, 159)


def test_items_are_painted_in_their_order(qapp):
    over = Circle(x=50.0, y=50.0, radius=10.0, fill=Colour.LOOK)

    assert pixels(PRIMITIVES["polygon filled"], over)[50, 50].tolist() == rgb(LIGHT.look)
    assert pixels(over, PRIMITIVES["polygon filled"])[50, 50].tolist() == rgb(LIGHT.stop)


def test_painting_leaves_the_painter_as_it_was(qapp):
    image = QImage(10, 10, QImage.Format.Format_RGB32)
    painter = QPainter(image)
    pen, brush = painter.pen(), painter.brush()
    sheet = sheet_of(
        width=100.0, height=100.0, medium=DESK, layers=[Layer(items=(PRIMITIVES["circle filled"],))]
    )

    paint_sheet(painter=painter, sheet=sheet, palette=LIGHT)

    assert painter.pen() == pen
    assert painter.brush() == brush
    painter.end()
