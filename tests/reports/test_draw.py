from __future__ import annotations

import io

import numpy as np
import pypdfium2
import pytest
from reportlab.pdfgen.canvas import Canvas
from reportlab.platypus import SimpleDocTemplate

from reports.draw import SheetFlowable, draw_sheet
from reports.palette import Colour
from reports.sheet.along import PAPER_LAYOUT, along_the_rotor
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
from reports.sheet.medium import PAPER_MEDIUM, LineWidth, Size
from tests.reports import invented

WIDE = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
SQUARE = ((2.0, 2.0), (18.0, 2.0), (18.0, 18.0), (2.0, 18.0))
PRIMITIVES = {
    "line": Line(x1=2.0, y1=10.0, x2=18.0, y2=10.0, stroke=WIDE),
    "polyline": Polyline(points=SQUARE, stroke=WIDE),
    "polygon filled": Polygon(points=SQUARE, fill=Colour.STOP),
    "polygon outlined": Polygon(points=SQUARE, stroke=WIDE),
    "polygon hatched": Polygon(points=SQUARE, hatch=Hatch(rising=True, pitch=2.0, stroke=WIDE)),
    "circle outlined": Circle(x=10.0, y=10.0, radius=6.0, stroke=WIDE),
    "circle filled": Circle(x=10.0, y=10.0, radius=6.0, fill=Colour.WITHIN),
    "arc": Arc(x=10.0, y=10.0, radius=6.0, start_degrees=0.0, sweep_degrees=90.0, stroke=WIDE),
    "text": Text(x=2.0, y=12.0, text="J1", size=Size.TITLE),
}


def sheet_with(*items):
    return sheet_of(
        width=20.0, height=20.0, medium=PAPER_MEDIUM, layers=[Layer(items=tuple(items))]
    )


def page_of(sheet) -> np.ndarray:
    file = io.BytesIO()
    size = 20.0 * 72.0 / 25.4
    canvas = Canvas(file, pagesize=(size, size))
    draw_sheet(canvas=canvas, sheet=sheet, left=0.0, top=size)
    canvas.save()
    with pypdfium2.PdfDocument(file.getvalue()) as document:
        return document[0].render(scale=200.0 / size).to_numpy()[:, :, :3]


@pytest.mark.parametrize("name", list(PRIMITIVES))
def test_every_primitive_leaves_its_ink_on_the_page(name):
    page = page_of(sheet_with(PRIMITIVES[name]))

    assert (page < 200).any()


def test_the_upper_left_of_the_sheet_is_the_upper_left_of_the_page():
    page = page_of(sheet_with(Circle(x=5.0, y=5.0, radius=2.0, fill=Colour.INK)))

    dark = np.argwhere(page.mean(axis=2) < 100)
    # By hand: 5 mm of 20 mm on 200 pixels.
    assert dark.mean(axis=0) == pytest.approx([50.0, 50.0], abs=1.0)


def test_an_arc_runs_the_way_a_clock_runs():
    page = page_of(sheet_with(PRIMITIVES["arc"]))

    rows, columns = np.argwhere(page.mean(axis=2) < 100).T
    assert rows.min() >= 95
    assert columns.min() >= 95


def test_broken_lines_are_broken_on_the_page():
    stroke = Stroke(Dash.DASHED, LineWidth.NARROW, Colour.INK)
    page = page_of(sheet_with(Line(x1=0.0, y1=10.0, x2=20.0, y2=10.0, stroke=stroke)))

    row = page.mean(axis=2).min(axis=0) < 160
    gaps = np.count_nonzero(np.diff(row.astype(int)) == -1)
    # By hand: dash and gap are 15 × 0.25 mm = 3.75 mm; 20 mm hold five gaps and a little.
    assert gaps == pytest.approx(5, abs=1)


def test_a_flowable_takes_the_sheets_own_size():
    sheet = along_the_rotor(picture=invented.rotor(active=None), layout=PAPER_LAYOUT)
    flowable = SheetFlowable(sheet)

    # By hand: 172 mm × 72 / 25.4.
    assert flowable.wrap(1000.0, 1000.0)[0] == pytest.approx(487.56, abs=0.005)


def test_equal_sheets_give_equal_bytes():
    def document() -> bytes:
        file = io.BytesIO()
        sheet = along_the_rotor(
            picture=invented.rotor(active=None),
            curves=invented.curves_of_two_attempts(),
            layout=PAPER_LAYOUT,
        )
        SimpleDocTemplate(file, invariant=1, leftMargin=40, rightMargin=40).build(
            [SheetFlowable(sheet)]
        )
        return file.getvalue()

    first = document()
    assert first == document()
    assert len(first) > 5000
