"""The forms of a mount, of where the part came to rest, and of its removal."""

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms.form import (
    Answers,
    Bench,
    Form,
    Made,
    choice,
    entry_head,
    temperature_field,
)
from app.presenters.bench.state import Field, FormTask
from models.assess import ItemView
from models.job import AxialMeasured, Mount, Removal
from models.rules.progress import Act, NextAct
from models.units import UnreadableNumberError

__all__ = ["axial_form", "mount_form", "removal_form"]


def mount_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form of how a part came to rest, filled in after the act."""
    mount = view.mount
    task = FormTask(
        heading=f"How {view.item.name} came to rest",
        lines=("Entered after the act; the moment it was seated is on record already.",),
        fields=(
            choice(
                "shoulder",
                "Shoulder",
                (("felt all round", "Felt all round"), ("gap", "A gap")),
            ),
        ),
        take="Take it",
        cautions=cautions_for(Act.MOUNT),
    )

    def make(answers: Answers) -> Made:
        if mount is None:
            raise UnreadableNumberError("", "the part has not gone on")
        return Made(
            (
                Mount(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    outcome=mount.outcome,
                    door_opened_at=mount.door_opened_at,
                    seated_at=mount.seated_at,
                    shoulder="gap" if answers.word("shoulder") == "gap" else "felt all round",
                    supersedes=mount.id,
                    reason="shoulder felt after the act",
                ),
            )
        )

    return Form(task, make)


def axial_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form of where a part rests, cold."""
    place = view.item.axial
    lines: tuple[str, ...] = ()
    if place is not None:
        lines = (
            f"From {place.measured_from}: {place.target.written}, ± {place.tolerance.written}.",
        )
    instruments = bench.instruments("depth", "caliper", "micrometer")
    task = FormTask(
        heading=f"Where {view.item.name} rests, cold",
        lines=lines,
        fields=(
            Field("value", "Axial position", unit=bench.units.unit("position"), use="position"),
            choice("instrument", "Instrument", instruments, instruments[0][0]),
        ),
        take="Take it",
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                AxialMeasured(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    state="cold",
                    value=answers.length("value", "position"),
                    instrument=answers.word("instrument"),
                ),
            )
        )

    return Form(task, make)


def removal_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form of a removal."""
    methods = (
        ("heated and drawn off", "Heated, drawn off"),
        ("drawn off cold", "Drawn off cold"),
        ("hydraulic", "Hydraulic"),
    )
    task = FormTask(
        heading=f"Take {view.item.name} off",
        lines=(
            "Heat from the rim inwards, before the hub grows warm; draw straight, stand clear.",
        ),
        fields=(
            choice("method", "How it came off", methods, "heated and drawn off"),
            temperature_field(bench, "temperature", "Hottest place", needed=False),
            Field("found", "What bore and seat look like", needed=False),
        ),
        take="It is off",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Removal(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    method=answers.word("method"),
                    temperature=answers.temperature("temperature"),
                    found=answers.word("found"),
                ),
            )
        )

    return Form(task, make)
