"""Does at a presenter what the invented story does next, one value after the other."""

from collections.abc import Callable, Mapping
from typing import Any

from pytestqt.qtbot import QtBot

from app.presenters.bench.bench import BenchPresenter
from app.presenters.bench.state import FormTask, KeyTask, ReadingTask, WaitTask
from app.presenters.writing import Writer
from models.rules.progress import Act
from sample_data.next_steps import AttemptAhead

__all__ = ["Hand", "bare", "figures"]


def bare(written: str) -> str:
    """The number of a written quantity, as a person types it into a field of that unit."""
    return written.split()[0]


def figures(survey: Mapping[str, Any]) -> dict[tuple[str, str], str]:
    """What is typed at each station and mark."""
    typed = {}
    for station in survey["stations"]:
        for mark, value in enumerate(station["typed"]):
            typed[station["station"], str(mark)] = value
        if "again" in station:
            typed[station["station"], "again"] = station["again"]
    return typed


class Hand:
    """A technician at a presenter."""

    def __init__(self, qtbot: QtBot, presenter: BenchPresenter, writer: Writer) -> None:
        self.qtbot = qtbot
        self.presenter = presenter
        self.writer = writer
        self.after_each: Callable[[], None] = lambda: None
        self.refusals: list[str] = []
        presenter.refused.connect(self.refusals.append)

    def settle_down(self) -> None:
        """Wait until nothing is being written."""
        self.qtbot.waitUntil(lambda: self.writer.is_idle, timeout=20_000)

    @property
    def act(self) -> Act:
        self.settle_down()
        view = self.presenter.view
        assert view is not None
        return view.next.act

    def task(self, kind: type) -> Any:
        self.settle_down()
        task = self.presenter.state.task
        assert isinstance(task, kind), (task, self.refusals)
        return task

    def fill(self, answers: Mapping[str, str]) -> None:
        form = self.task(FormTask)
        names = {field.key for field in form.fields}
        assert set(answers) <= names, set(answers) - names
        kept = {field.key: field.value for field in form.fields}
        self.presenter.fill({**kept, **answers})
        self.settle_down()
        self.after_each()

    def press(self, name: str) -> None:
        task = self.task(KeyTask)
        assert name in {key.name for key in task.keys}, task
        self.presenter.press(name)
        self.settle_down()
        self.after_each()

    def read_runout(self, survey: Mapping[str, Any]) -> None:
        typed = figures(survey)
        self.settle_down()
        while isinstance(self.presenter.state.task, ReadingTask):
            reading = self.presenter._reading
            assert reading is not None
            spot = reading.active
            assert spot is not None
            self.presenter.take(typed[spot.station, str(spot.mark)])
            self.after_each()
        self.settle_down()

    def read_sizes(self, survey: Mapping[str, Any]) -> None:
        self.settle_down()
        while isinstance(self.presenter.state.task, ReadingTask):
            reading = self.presenter._reading
            assert reading is not None
            spot = reading.active
            assert spot is not None
            self.presenter.take(survey["typed"][spot.position][int(spot.mark)])
            self.after_each()
        self.settle_down()

    # The parts of an attempt ------------------------------------------------------------------

    def measure(self, told: Mapping[str, Any]) -> None:
        self.fill(
            {
                "instrument": told["instrument"],
                "part": bare(told["part_temperature"]),
                "gauge": bare(told["gauge_temperature"]),
            }
        )
        self.read_sizes(told)
        self.press("close")

    def confirm(self, told: Mapping[str, Any]) -> None:
        form = self.task(FormTask)
        answers = {field.key: "yes" for field in form.fields if field.choices}
        self.fill({**answers, "serial": told["serial"]})

    def heat(self, told: Mapping[str, Any]) -> None:
        self.fill({"shaft": bare(told["shaft_temperature"]), "instrument": told["instrument"]})
        lands = {one["land"] for one in told["gauge"]}
        bores = [float(bare(one["temperature"])) for one in told["temperatures"]
                 if one["where"] == "bore"]  # fmt: skip
        answers = {f"gauge {land}": "entered" for land in lands}
        answers |= {f"bore {land}": f"{min(bores):g}" for land in lands}
        self.fill(answers)

    def mount(self) -> None:
        self.presenter.open_door()
        self.press("seated")
        self.fill({"shoulder": "felt all round"})

    def cool(self, told: Mapping[str, Any]) -> None:
        form = self.task(FormTask)
        warmest = max(float(bare(one["temperature"])) for one in told["temperatures"])
        answers = {field.key: f"{warmest:g}" for field in form.fields if field.use}
        self.fill({**answers, "room": bare(told["surroundings"])})

    def rest(self, told: Mapping[str, Any]) -> None:
        self.fill({"value": bare(told["value"]), "instrument": told["instrument"]})

    def survey(self, told: Mapping[str, Any]) -> None:
        self.fill({"instrument": told["instrument"]})
        self.read_runout(told)
        self.press("close")

    def until_read(self, ahead: AttemptAhead) -> None:
        """Take one attempt from its opening to the closing of its survey."""
        self.press("begin")
        self.measure(ahead.seat)
        self.measure(ahead.bore)
        self.confirm(ahead.confirmations[0])
        self.heat(ahead.heating)
        self.confirm(ahead.confirmations[1])
        self.mount()
        self.cool(ahead.cooling[0])
        self.rest(ahead.axial[-1])
        self.survey(ahead.after)

    def take_off(self, ahead: AttemptAhead) -> None:
        """Take the part off again and read the bare seat."""
        assert ahead.removal is not None
        assert ahead.bare_seat is not None
        self.press("removal")
        self.fill({"found": "bright all round"})
        self.survey(ahead.bare_seat)
        self.press("settle")

    def waits(self) -> bool:
        self.settle_down()
        return isinstance(self.presenter.state.task, WaitTask)
