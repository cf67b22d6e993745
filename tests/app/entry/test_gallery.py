from pathlib import Path

import pytest
from PySide6.QtGui import QColor, QPalette
from PySide6.QtWidgets import QApplication, QWidget

from app.entry.cell_state import Asked
from app.entry.cell_unit import unit_for
from app.entry.fields import ChoiceField, NumberField, TextField, check_field
from app.entry.fields_form import FieldsForm
from app.entry.keypad import Keypad
from app.entry.ladder import Ladder, Rung
from app.entry.question_line import Question, QuestionLine, ReasonKeys
from app.entry.reading_cell import ReadingCell
from app.frame.countdown import Countdown, DropWindow
from app.frame.desks import DesksLine
from app.frame.foot import FootKey, FootKeys, TitleBlock, TitleLine
from app.frame.look import Look
from app.frame.messages import Message, MessageStrip
from app.frame.prompt import Prompt, PromptBlock
from app.frame.verdicts import ShownVerdict, VerdictBand, VerdictPane
from models.units import inch_set
from reports.palette import CONTRAST, DARK, LIGHT, Colour
from reports.sheet.pictures import GapPicture, VerdictKind

pytestmark = pytest.mark.pictures
FOLDER = Path("build") / "pictures" / "widgets"
RUNOUT = unit_for(inch_set, "runout")
LOOKS = {
    "light": Look(palette=LIGHT),
    "dark": Look(palette=DARK),
    "contrast": Look(palette=CONTRAST),
    "small": Look(palette=LIGHT, text_scale=0.8),
    "large": Look(palette=LIGHT, text_scale=1.5),
    "double": Look(palette=LIGHT, text_scale=2.0),
    "far": Look(palette=LIGHT, far=True),
    "wide": Look(palette=DARK, window_width=1920.0),
}
MARKS = ("0°", "45°", "90°", "135°", "180°", "225°", "270°", "315°", "0° again")
VERDICTS = (
    ShownVerdict(
        kind=VerdictKind.WITHIN,
        phrase="Within limits",
        sentences=("S7 changed 0.0004 ± 0.0001 in TIR towards 146°, limit 0.0010 in.",),
        facts=("so far 8 of 14 stations",),
    ),
    ShownVerdict(
        kind=VerdictKind.LOOK,
        phrase="Look again",
        sentences=(
            "S7 changed 0.0010 in TIR, limit 0.0010 in: ±0.0001 in cannot tell. Read S7 again.",
            "Its total is as before, but the high spot turned 64°.",
        ),
        facts=("so far 8 of 14 stations",),
    ),
    ShownVerdict(
        kind=VerdictKind.STOP,
        phrase="Remount required",
        sentences=("S8 changed 0.0021 ± 0.0002 in TIR towards 210°, limit 0.0010 in.",),
        facts=("14 of 14 stations",),
    ),
    ShownVerdict(
        kind=VerdictKind.NOT_JUDGED,
        phrase="Not judged yet",
        sentences=("The second journal is not read: until then there is no datum.",),
        facts=("so far 1 of 14 stations",),
    ),
)


class Board(QWidget):
    """A piece of drawing paper on which widgets are laid out one below the other."""

    def __init__(self, look, width):
        super().__init__()
        self.look, self.top = look, 12
        palette = QPalette()
        palette.setColor(QPalette.ColorRole.Window, look.colour(Colour.PAPER))
        self.setPalette(palette)
        self.setAutoFillBackground(True)
        self.resize(width, 100)

    def put(self, widget, width, height, left=12, *, stay=False):
        widget.setParent(self)
        widget.setGeometry(left, self.top, width, height)
        if not stay:
            self.top += height + 14
        self.resize(self.width(), self.top)
        return widget

    def save(self, name):
        self.show()
        QApplication.processEvents()
        image = self.grab().toImage()
        FOLDER.mkdir(parents=True, exist_ok=True)
        assert image.save(str(FOLDER / f"{name}.png"))
        paper = QColor(self.look.palette.paper)
        dots = [image.pixelColor(x, y) for x in range(0, image.width(), 3) for y in (30, 60, 90)]
        assert any(dot != paper for dot in dots)


def cell_in(state, look):
    cell = ReadingCell(unit=RUNOUT, look=look, clock=lambda: 0.0)
    cell.ask(Asked(mark="225°"))
    prepare = {
        "waiting": lambda: None,
        "nothing typed": cell.take,
        "typing": lambda: cell.write("-0.0003"),
        "long": lambda: cell.write("-12.00034"),
        "unreadable": lambda: (cell.write("l.0003"), cell.take()),
        "cleared": lambda: (cell.write("-0.0003"), cell.clear_entry()),
        "writing": lambda: (cell.write("-0.0003"), cell.take(), cell.write("4"), cell.take()),
        "correcting": lambda: (
            cell.ask(Asked(mark="180°", old="0.0040", reason_needed=True)),
            cell.write("0.0004"),
        ),
        "corrected": lambda: (
            cell.ask(Asked(mark="180°", old="0.0040", reason_needed=True)),
            cell.write("0.0004"),
            cell.choose_reason("typing slip"),
        ),
        "closing": lambda: cell.ask(Asked(mark="0° again", closing="0.0000 in")),
        "double": lambda: (
            cell.write("-0.0003"),
            cell.take(),
            cell.ask(Asked(mark="270°")),
            cell.write("-0.0003"),
            cell.take(),
        ),
        "not yours": lambda: cell.lock("T. Alder signed in; take over with your PIN"),
        "trouble": lambda: (
            cell.write("-0.0003"),
            cell.take(),
            cell.refuse(
                what="The record could not be written",
                where="the disk of the job file is full",
                way_out="Free some room, then try again.",
            ),
        ),
    }
    prepare[state]()
    return cell


STATES = (
    "waiting",
    "nothing typed",
    "typing",
    "long",
    "unreadable",
    "cleared",
    "writing",
    "correcting",
    "corrected",
    "closing",
    "double",
    "not yours",
    "trouble",
)


@pytest.fixture(params=LOOKS, ids=str)
def named_look(request):
    return request.param, LOOKS[request.param]


def test_reading_cell_in_every_state(qtbot, named_look):
    name, look = named_look
    wide = name == "wide"
    width, height = (872, 160) if wide else (608, 130)
    board = Board(look, 2 * width + 36)
    qtbot.addWidget(board)
    for number, state in enumerate(STATES):
        left = 12 + (number % 2) * (width + 12)
        cell = board.put(cell_in(state, look), width, height, left, stay=number % 2 == 0)
        cell.show()
        if state == "typing":
            typing = cell
    board.resize(board.width(), board.top + height + 12)
    board.show()
    board.activateWindow()
    typing.setFocus()
    board.save(f"cell-{name}")


def test_ladder_question_and_keys(qtbot, named_look):
    name, look = named_look
    width = 872 if name == "wide" else 608
    board = Board(look, width + 24)
    qtbot.addWidget(board)
    values = ("0", "+3", "+5", "+4", "0", "", "", "", "")
    rungs = [Rung(mark=mark, value=value) for mark, value in zip(MARKS, values, strict=True)]
    rungs[2] = Rung(mark="90°", value="+5", struck=("+50", "+55"), questioned=True)
    rungs[5] = Rung(mark="225°", active=True)
    rungs[6] = Rung(mark="270°", skipped=True)
    caption = "readings in 0.0001 in, indicator DI-07, + towards the indicator"
    board.put(Ladder(rungs, caption=caption, look=look), width, 100)
    many = [Rung(mark=f"{angle * 22.5:g}°", value="−12") for angle in range(16)]
    board.put(Ladder([*many, Rung(mark="0° again")], caption=caption, look=look), width, 100)
    question = QuestionLine(look=look)
    board.put(question, width, question.sizeHint().height())
    question.set_question(
        Question(
            name="r",
            mark="180°",
            sentence="25.4 times its neighbours: 0.0003 in?",
            proposal="0.0003 in",
        ),
        open_count=2,
    )
    reasons = ReasonKeys(look=look)
    reasons.show_reason("slipped")
    board.put(reasons, width, reasons.sizeHint().height())
    keypad = Keypad(look=look)
    board.put(keypad, width, keypad.sizeHint().height())
    board.save(f"ladder-{name}")


def test_verdicts(qtbot, named_look):
    name, look = named_look
    wide = name == "wide"
    width, height = {"wide": (462, 420), "far": (450, 500)}.get(name, (300, 332))
    board = Board(look, 4 * (width + 8) + 16)
    qtbot.addWidget(board)
    for number, verdict in enumerate(VERDICTS):
        left = 12 + number * (width + 8)
        board.put(VerdictPane(verdict, look=look), width, height, left, stay=number < 3)
    end = ShownVerdict(
        kind=VerdictKind.STOP,
        phrase="Remount required",
        sentences=("S8 changed 0.0021 ± 0.0002 in TIR, limit 0.0010 in (plan B).",),
        facts=(
            "S8, shaft beside impeller 4: 0.0021 in TIR towards 210°",
            "The bend sits under impeller 4, 31.2 in from the drive end.",
            "Usual causes: uneven heating, a burr or dirt in the seat, a cocked wheel.",
        ),
    )
    band_width = 1856 if wide else 1232
    board.resize(max(board.width(), band_width + 24), board.height())
    for verdict, words in ((end, "Record the removal"), (VERDICTS[0], "Go on to balance")):
        band = VerdictBand(verdict, next_words=words, look=look)
        board.put(band, band_width, height)
    board.save(f"verdicts-{name}")


def test_frame_of_the_bench(qtbot, named_look):
    name, look = named_look
    width = 1920 if name == "wide" else 1280
    board = Board(look, width)
    qtbot.addWidget(board)
    line = DesksLine(present="Bench", person="T. Alder, technician", look=look)
    board.put(line, width, line.sizeHint().height(), 0)
    lines = ("mark 6 of 8, then 270°", "before the mount: −0.0008 in")
    for mark in ("225°", "0° again"):
        prompt = Prompt(mark=mark, head="S8, shaft beside impeller 4", lines=lines)
        board.put(PromptBlock(prompt, look=look), width // 2, 116 if name == "wide" else 98, 24)
    strip = MessageStrip(look=look)
    strip.set_message(
        Message(
            what="The record could not be written.",
            where="The disk of the job file is full.",
            way_out="Free some room, then try again; the reading stays in the cell.",
            key="Try again",
        )
    )
    board.put(strip, width, strip.heightForWidth(width), 0)
    title = TitleLine(
        rotor="R-0418 (invented)",
        job="J-0031",
        step="7 of 13, attempt 1",
        plan="B",
        written="14:32:07",
        stage="Runout",
    )
    block = TitleBlock(title, look=look)
    foot, high = (1160, 96) if name == "wide" else (768, 80)
    board.put(block, foot, high, 0, stay=True)
    words = ("Keypad", "Skip mark", "Note, photo", "Leave")
    keys = [FootKey(name=text, words=text, enabled=text != "Skip mark") for text in words]
    board.put(FootKeys(keys, look=look), width - foot, high, foot)
    board.save(f"frame-{name}")


def test_countdown(qtbot, named_look):
    name, look = named_look
    width, height = (1856, 427) if name == "wide" else (1232, 337)
    board = Board(look, width + 24)
    qtbot.addWidget(board)
    window = DropWindow(in_air=(400.0, 520.0), over_seat=(110.0, 150.0))
    for elapsed in (0.0, 310.0, 412.0):
        now = [0.0]

        def gap(seconds):
            opening, least = 300e-6, 1.0 - seconds / 400.0
            return GapPicture(
                gap=opening * (1.0 - seconds / 520.0),
                opening_gap=opening,
                least_gap=opening * least,
                gap_text=f"gap ×50, {max(0.0, 300 * least):.0f} µm",
            )

        countdown = Countdown(window, gap=gap, clock=lambda now=now: now[0], look=look)
        if elapsed:
            countdown.open_door()
            now[0] = elapsed
            countdown.halt()
        board.put(countdown, width, height)
    board.save(f"countdown-{name}")


def test_form(qtbot, named_look):
    name, look = named_look
    width = 872 if name == "wide" else 760
    board = Board(look, width + 24)
    qtbot.addWidget(board)
    temperature = unit_for(inch_set, "temperature")
    form = FieldsForm(
        [
            NumberField(name="bore", label="Temperature at the bore", unit=temperature),
            NumberField(
                name="rim", label="Temperature at the rim, opposite side", unit=temperature
            ),
            check_field(name="marks", label="Match marks agree"),
            check_field(name="key", label="Key in its seat, free at the top"),
            ChoiceField(
                name="method", label="Heated by", answers=("oven", "induction", "gas ring")
            ),
            TextField(name="serial", label="Serial read from the part"),
        ],
        look=look,
    )
    form.set_answer("bore", "610")
    form.set_answer("rim", "hot")
    form.set_message("rim", "“hot”: a temperature is a number such as −0.0003 °C")
    form.set_answer("marks", "yes")
    form.set_answer("serial", "W-114 (invented)")
    board.put(form, width, form.sizeHint().height())
    board.activateWindow()
    form.go_to("key")
    board.save(f"form-{name}")
