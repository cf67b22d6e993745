"""A technician at the real widgets, killed again and again: one process for each stretch of work.

    python -m tests.journeys.killed_bench FOLDER MOVES

A parent that has loaded everything and opened nothing forks a child, which opens the window on the
shop in FOLDER, looks at what it shows, makes MOVES moves by keyboard and mouse as a person would
(a value and Enter, a form filled, a key pressed), and kills itself without a word of farewell. The
next child goes on from what it sees. The last line printed says how many were killed.
"""

import os
import signal
import sys
import time
import traceback
from collections.abc import Callable
from pathlib import Path
from typing import Any

from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton, QApplication, QLineEdit, QWidget

from app.entry.form_rows import FormRow
from app.pages.bench.page import BenchPage
from app.presenters.bench.bench import BenchPresenter
from app.settings import Settings
from app.start import Opened
from app.style.tokens import load_fonts
from models.acts import Acts
from models.assess import assess
from models.record.store import Store
from models.rules.progress import Act
from sample_data.load import compressor
from sample_data.next_steps import AttemptAhead, next_attempts

JOB = "26-0417"
DONE = 7
_PATIENCE = 30.0
# In the order a person would look for them.
_KEYS = ("begin", "close", "seated", "removal", "settle", "sign")


def make_shop(folder: Path) -> None:
    """Bring the unfinished job into a new record."""
    with Store.open(folder) as store:
        Acts(store).bring_in(compressor(), by="AT", act_id="demo")


def bare(written: str) -> str:
    """The number of a written quantity."""
    return written.split()[0]


# Fields of the Cool stage that hold no temperature of the rotor.
_NO_TEMPERATURE = {"room", "instrument", "watched", "shown"}


class Technician:
    """Sees what the window shows, and types what the invented story has next."""

    def __init__(self, opened: Opened, ahead: tuple[AttemptAhead, ...]) -> None:
        self.opened = opened
        self.ahead = ahead

    # Seeing ---------------------------------------------------------------------------------

    def wait(self, what: Callable[[], Any]) -> Any:
        """Let the window work until something is so."""
        end = time.monotonic() + _PATIENCE
        while time.monotonic() < end:
            QApplication.processEvents()
            found = what()
            if found:
                return found
            time.sleep(0.002)
        raise TimeoutError(what)

    @property
    def page(self) -> BenchPage:
        return self.wait(lambda: self.opened.window.findChild(BenchPage))

    @property
    def view(self) -> Any:
        """The job as the bench judges it; None until it has been read."""
        return self.page.findChild(BenchPresenter).view

    @property
    def written(self) -> int | None:
        """The last act that this window knows to be on the disk."""
        return self.page.findChild(BenchPresenter)._seen

    def seen(self, name: str, kind: type = QWidget) -> Any:
        """Find a control that is shown, by its name."""
        found = self.page.findChild(kind, name)
        return found if found is not None and found.isVisible() and found.isEnabled() else None

    def quiet(self) -> None:
        """Wait until nothing is being written or read and the page shows a task."""
        self.wait(lambda: self.view is not None)
        self.wait(lambda: self.opened.writer.is_idle)

    # Doing ----------------------------------------------------------------------------------

    def move(self) -> str:
        """Do the one thing that the page asks for; say what it was."""
        self.quiet()
        cell = self.seen("cell")
        if cell is not None:
            return self.type_reading(cell)
        band = self.seen("band")
        if band is not None:
            key = next(one for one in band.findChildren(QAbstractButton) if one.isVisible())
            QTest.mouseClick(key, Qt.MouseButton.LeftButton)
            return f"band {key.accessibleName()}"
        if self.seen("form") is not None:
            return self.fill_form()
        for name in _KEYS:
            key = self.seen(f"key {name}")
            if key is not None:
                QTest.mouseClick(key, Qt.MouseButton.LeftButton)
                return name
        return ""

    @property
    def told(self) -> AttemptAhead:
        return self.ahead[self.view.next.attempt - 1]

    def type_reading(self, cell: QWidget) -> str:
        text = self.reading_asked_for()
        hand = self.wait(QApplication.focusWidget)
        QTest.keyClicks(hand, text)
        QTest.keyClick(hand, Qt.Key.Key_Return)
        if cell.double_pending:
            # Faster than any hand: two equal readings at two marks look like one sent twice.
            QTest.keyClick(hand, Qt.Key.Key_F2)
        return text

    def reading_asked_for(self) -> str:
        """Find the value for the mark and the place that the prompt names."""
        prompt = self.page.findChild(QWidget, "prompt").prompt
        mark, head, line = prompt.mark.removesuffix("°"), prompt.head, prompt.lines[0]
        if " at land " in head:
            feature = head.split()[0]
            survey = self.told.seat if feature == "seat" else self.told.bore
            column = [bare(one) for one in survey["angles"]].index(mark)
            row = int(prompt.lines[1].split()[1]) - 1
            return str(survey["typed"][row][column])
        removed = any(one.removed for one in self.view.progress.attempts[-1].items)
        survey = self.told.bare_seat if removed else self.told.after
        assert survey is not None
        station = next(one for one in survey["stations"] if one["station"] == head.split(",")[0])
        if "again" in line.split(",")[0]:
            return str(station["again"])
        return str(station["typed"][[bare(one) for one in survey["angles"]].index(mark)])

    def fill_form(self) -> str:
        form = self.page.findChild(QWidget, "form")
        names = {row.name for row in form.findChildren(FormRow)}
        for name, text in self.form_answers(names).items():
            row = form.row(name)
            line = row.findChild(QLineEdit)
            if line is not None:
                form.go_to(name)
                line.selectAll()
                QTest.keyClicks(line, text)
            else:
                keys = row.findChildren(QAbstractButton)
                key = next(one for one in keys if text in (one.text(), one.accessibleName()))
                QTest.mouseClick(key, Qt.MouseButton.LeftButton)
        take = self.seen("take")
        QTest.mouseClick(take, Qt.MouseButton.LeftButton)
        return f"form {sorted(names)[0]}"

    def form_answers(self, names: set[str]) -> dict[str, str]:
        """Answer the form that has these fields."""
        told = self.told
        if "gauge" in names:
            view = self.view
            survey = told.seat if view.next.feature == "seat" else told.bore
            return {
                "part": bare(survey["part_temperature"]),
                "gauge": bare(survey["gauge_temperature"]),
            }
        if "serial" in names:
            checks = {name: "Yes" for name in names if name != "serial"}
            return {**checks, "serial": told.confirmations[0]["serial"]}
        if "set_point" in names:
            return {"shaft": bare(told.heating["shaft_temperature"])}
        if "web" in names:
            bores = [
                float(bare(one["temperature"]))
                for one in told.heating["temperatures"]
                if one["where"] == "bore"
            ]
            answers = {name: f"{min(bores):g}" for name in names if name.startswith("bore ")}
            return answers | {name: "Entered" for name in names if name.startswith("gauge ")}
        if "shoulder" in names:
            return {"shoulder": "Felt all round"}
        if "room" in names:
            cooling = told.cooling[0]
            warmest = max(float(bare(one["temperature"])) for one in cooling["temperatures"])
            warm = {name: f"{warmest:g}" for name in names - _NO_TEMPERATURE}
            return {**warm, "room": bare(cooling["surroundings"])}
        if "value" in names:
            return {"value": bare(told.axial[-1]["value"])}
        return {}


def work(folder: Path, moves: int, ahead: tuple[AttemptAhead, ...]) -> None:
    """One life at the bench: open the window, make some moves, be killed."""
    application = QApplication([])
    load_fonts()
    opened = Opened(Store.open(folder), Settings(folder=folder))
    opened.show(sign_in="AT", job=JOB)
    technician = Technician(opened, ahead)
    del application
    made = 0
    while made < moves:
        technician.quiet()
        view = technician.view
        latest = view.progress.latest(ahead[-1].step)
        if view.next.act in (Act.SIGN, Act.NOTHING) and latest is not None and latest.performed:
            os._exit(DONE)
        before = technician.written
        technician.move()
        # Only what the window says is written may be relied on; a form that is merely open is not.
        technician.wait(lambda: opened.writer.is_idle)
        made += technician.written != before
    os.kill(os.getpid(), signal.SIGKILL)


def main(folder: Path, moves: int) -> int:
    """Fork one child after the other until the step is settled and signed."""
    ahead = next_attempts()
    # Warm: a child then works out only what is new to it.
    assess(compressor())
    child = os.fork()
    if child == 0:
        make_shop(folder)
        os._exit(0)
    os.waitpid(child, 0)
    killed = 0
    while True:
        child = os.fork()
        if child == 0:
            try:
                work(folder, moves, ahead)
            except BaseException:
                # Nobody else would say it: the child ends here.
                traceback.print_exc()
            finally:
                os._exit(1)
        _, status = os.waitpid(child, 0)
        if os.WIFSIGNALED(status) and os.WTERMSIG(status) == signal.SIGKILL:
            killed += 1
            continue
        ended = os.waitstatus_to_exitcode(status)
        sys.stdout.write(f"{killed} killed, ended {ended}\n")
        return 0 if ended == DONE else 1


if __name__ == "__main__":
    sys.exit(main(Path(sys.argv[1]), int(sys.argv[2])))
