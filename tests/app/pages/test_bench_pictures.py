from pathlib import Path

import pytest
from PySide6.QtGui import QColor, QImage
from PySide6.QtWidgets import QApplication, QVBoxLayout, QWidget

from app.frame.desks import DesksLine
from app.frame.look import Look
from app.pages.bench.page import BenchPage
from app.style.theme import qt_palette
from reports.palette import CONTRAST, DARK, LIGHT
from tests.app.pages.bench_scenes import SCENES
from tests.app.pages.fake_bench import FakeBench

pytestmark = pytest.mark.pictures
FOLDER = Path("build") / "pictures" / "bench"
SIZES = {"1280": (1280, 800), "1920": (1920, 1080)}


def in_a_window(qtbot, scene, size, look, *, prepare=None):
    window = QWidget()
    window.setPalette(qt_palette(palette=look.palette))
    qtbot.addWidget(window)
    column = QVBoxLayout(window)
    column.setContentsMargins(0, 0, 0, 0)
    column.setSpacing(0)
    wide = Look(palette=look.palette, window_width=float(size[0]))
    line = DesksLine(present="Bench", person="T. Alder, technician", look=wide)
    line.setFixedHeight(44 if size[0] >= 1920 else 36)
    column.addWidget(line)
    page = BenchPage(FakeBench(SCENES[scene]()), look)
    column.addWidget(page, 1)
    window.resize(*size)
    window.show()
    window.activateWindow()
    QApplication.processEvents()
    if scene == "typing":
        page.reading.cell.write("-0.0003")
    if prepare is not None:
        prepare(page)
    QApplication.processEvents()
    return window


def save(window, name, look):
    image = window.grab().toImage().convertToFormat(QImage.Format.Format_RGB32)
    FOLDER.mkdir(parents=True, exist_ok=True)
    assert image.save(str(FOLDER / f"{name}.png"))
    paper = QColor(look.palette.paper)
    dots = [image.pixelColor(x, y) for x in range(0, image.width(), 7) for y in (150, 500, 760)]
    assert any(dot != paper for dot in dots)


@pytest.mark.parametrize("palette", [LIGHT, DARK], ids=lambda palette: palette.name)
@pytest.mark.parametrize("size", SIZES)
@pytest.mark.parametrize("scene", SCENES)
def test_every_task_and_verdict_is_drawn_to_look_at(qtbot, scene, size, palette):
    look = Look(palette=palette)
    window = in_a_window(qtbot, scene, SIZES[size], look)
    save(window, f"{scene}-{size}-{palette.name}", look)


@pytest.mark.parametrize(
    ("name", "scene", "look", "size"),
    [
        ("contrast", "typing", Look(palette=CONTRAST), (1280, 800)),
        ("far", "typing", Look(far=True), (1280, 800)),
        ("far-wide", "typing", Look(far=True), (1920, 1080)),
        ("small-type", "typing", Look(text_scale=0.8), (1280, 800)),
        ("large-type", "typing", Look(text_scale=1.3), (1280, 800)),
        ("double-type", "typing", Look(text_scale=2.0), (1280, 800)),
        ("double-type-form", "heat", Look(text_scale=2.0), (1280, 800)),
        ("between", "typing", Look(), (1600, 900)),
        ("tall", "typing", Look(), (1280, 1024)),
        ("double-pixels", "typing", Look(), (2560, 1440)),
    ],
)
def test_other_looks_and_sizes_are_drawn_to_look_at(qtbot, name, scene, look, size):
    save(in_a_window(qtbot, scene, size, look), f"{name}-{scene}", look)


@pytest.mark.parametrize(
    ("name", "scene", "prepare"),
    [
        ("keypad", "typing", lambda page: page.foot.key("keypad").click()),
        ("keypad-question", "questioned", lambda page: page.foot.key("keypad").click()),
        ("reasons", "waiting", lambda page: page.verdict.click()),
        ("why-kept", "questioned", lambda page: page.beside.question.kept.emit("180°")),
        ("touched", "waiting", lambda page: page.drawing.touched.emit("K5", "K5 changed.")),
        (
            "trouble",
            "typing",
            lambda page: page._presenter.troubled.emit(
                "The record could not be written", "the disk is full", "Free some room."
            ),
        ),
    ],
)
def test_what_lies_over_the_bench_is_drawn_to_look_at(qtbot, name, scene, prepare):
    look = Look()
    save(in_a_window(qtbot, scene, (1280, 800), look, prepare=prepare), f"over-{name}", look)
