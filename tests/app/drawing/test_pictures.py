from __future__ import annotations

from pathlib import Path

import pytest
from PySide6.QtGui import QColor, QImage, QPainter
from reportlab.pdfgen.canvas import Canvas

from app.drawing.painter import paint_sheet
from reports.draw import draw_sheet
from reports.palette import CONTRAST, DARK, LIGHT
from reports.sheet.along import (
    BENCH_1280_LAYOUT,
    BENCH_1920_LAYOUT,
    DESK_LAYOUT,
    PAPER_LAYOUT,
    along_the_rotor,
)
from reports.sheet.dial import dial
from reports.sheet.elements import Box, sheet_of
from reports.sheet.medium import BENCH_1280
from tests.reports import invented

pytestmark = pytest.mark.pictures
FOLDER = Path("build") / "pictures"


def being_read(layout, **more):
    return along_the_rotor(
        picture=invented.rotor(**more),
        curves=invented.curves_being_read(),
        changes=[invented.changes(after=invented.AFTER, active=7)],
        captions=[("change", "0.0001 in TIR")],
        layout=layout,
    )


def two_attempts(layout):
    return along_the_rotor(
        picture=invented.rotor(active=None, attempt=2),
        curves=invented.curves_of_two_attempts(),
        changes=[
            invented.changes(after=invented.AFTER),
            invented.changes(after=invented.SETTLED),
        ],
        captions=[("attempt 1", "change"), ("attempt 2", "change")],
        layout=layout,
    )


def one_dial():
    layer = dial(
        picture=invented.dial(),
        place=Box(20.0, 8.0, 316.0, 345.0),
        medium=BENCH_1280,
        scale=580.0,
        magnification=2000,
    )
    return sheet_of(width=336.0, height=353.0, medium=BENCH_1280, layers=[layer])


@pytest.mark.parametrize("palette", [LIGHT, DARK, CONTRAST], ids=lambda palette: palette.name)
@pytest.mark.parametrize(
    ("name", "draw"),
    [
        ("bench_1280", lambda: being_read(BENCH_1280_LAYOUT)),
        ("bench_1280_hot", lambda: being_read(BENCH_1280_LAYOUT, lifted_gap=0.0002)),
        ("bench_1920", lambda: being_read(BENCH_1920_LAYOUT)),
        ("desk", lambda: two_attempts(DESK_LAYOUT)),
        ("dial", one_dial),
    ],
)
def test_the_drawing_is_written_as_a_picture_for_people_to_look_at(qapp, name, draw, palette):
    FOLDER.mkdir(parents=True, exist_ok=True)
    sheet = draw()
    image = QImage(round(sheet.width), round(sheet.height), QImage.Format.Format_RGB32)
    image.fill(QColor(palette.paper))
    painter = QPainter(image)
    paint_sheet(painter=painter, sheet=sheet, palette=palette)
    painter.end()

    assert image.save(str(FOLDER / f"drawing_{name}_{palette.name}.png"))


def test_the_drawing_is_written_as_a_page_for_people_to_look_at():
    FOLDER.mkdir(parents=True, exist_ok=True)
    path = FOLDER / "drawing_paper.pdf"
    canvas = Canvas(str(path), pagesize=(595.0, 842.0))
    draw_sheet(canvas=canvas, sheet=two_attempts(PAPER_LAYOUT), left=57.0, top=800.0)
    canvas.save()

    assert path.stat().st_size > 5000
