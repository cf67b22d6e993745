"""The form of a note."""

from app.presenters.bench.forms.form import Answers, Bench, Form, Made, entry_head
from app.presenters.bench.state import Field, FormTask
from models.job import Note, Place
from models.rules.progress import NextAct

__all__ = ["note_form"]


def note_form(bench: Bench, act: NextAct) -> Form:
    """Give the form of a note, which may be taken at any time."""
    task = FormTask(
        heading="Note",
        lines=("Something seen and worth keeping; it stands in the traveler.",),
        fields=(Field("words", "What you saw"),),
        take="Keep it",
    )

    def make(answers: Answers) -> Made:
        place = bench.place(act) if act.step else Place(kind="bare shaft")
        return Made((Note(**entry_head(bench), place=place, words=answers.word("words")),))

    return Form(task, make)
