"""The forms that confirm before the furnace and before the door."""

from typing import Literal

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms.form import Answers, Bench, Form, Made, choice, entry_head
from app.presenters.bench.state import Field, FormTask
from models.assess import ItemView
from models.job import Check, Confirmation
from models.rules.progress import Act, NextAct

__all__ = ["confirmation_form"]

_YES_NO = (("yes", "Yes"), ("no", "No"), ("does not apply", "Does not apply"))
_CHECKS = (
    ("facing", "Facing the right way"),
    ("match mark", "Match mark found"),
    ("key", "Key and keyway"),
    ("stop", "Stop in place"),
    ("neighbours", "Neighbouring parts free"),
    ("hook", "Hook, slings, reach"),
)


def confirmation_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form of a confirmation, before the furnace or before the door."""
    before = act.act is Act.CONFIRM_FURNACE
    heat = view.heat
    lines = [f"{view.item.name} belongs on this seat with serial {view.serial or 'unknown'}."]
    if before and heat is not None and heat.target is not None:
        lines.append(
            f"It opens at {bench.units.both(heat.target, 'temperature')}; read the serial on the "
            "part itself."
        )
    task = FormTask(
        heading="Before the furnace" if before else "Before the door opens",
        lines=tuple(lines),
        fields=(
            Field("serial", "Serial read on the part"),
            *(choice(key, label, _YES_NO) for key, label in _CHECKS),
        ),
        take="Confirm",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Confirmation(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    moment="before the furnace" if before else "before the door",
                    serial=answers.word("serial"),
                    checks=tuple(
                        Check(what=key, answer=_answer(answers.word(key))) for key, _ in _CHECKS
                    ),
                ),
            )
        )

    return Form(task, make)


def _answer(word: str) -> Literal["yes", "no", "does not apply"]:
    if word == "yes":
        return "yes"
    return "no" if word == "no" else "does not apply"
