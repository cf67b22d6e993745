"""A few fields to fill, and the one key that takes them."""

from __future__ import annotations

from itertools import pairwise

from PySide6.QtCore import QRect, Signal
from PySide6.QtGui import QKeySequence, QResizeEvent, QShortcut
from PySide6.QtWidgets import QApplication, QLineEdit, QWidget

from app.entry.fields import ChoiceField, FormField, NumberField
from app.entry.fields_form import FieldsForm
from app.frame.key import Key
from app.frame.look import Look
from app.frame.plain import PlainWidget
from app.pages.bench.scroll_bars import flatten_scroll_bars
from app.pages.bench.shown import field_of
from app.pages.bench.task_words import TaskWords
from app.presenters.bench.state import Field, FormTask
from reports.sheet.medium import Size

__all__ = ["FormEntry"]

_MOST_WORDS = 0.46


class FormEntry(PlainWidget):
    """The left columns while a form is filled. Ctrl+Enter takes it from any field.

    Parameters
    ----------
    take_parent : QWidget or None
        What holds the key that takes the form, where it stands elsewhere.
    """

    filled = Signal(dict)

    def __init__(
        self,
        *,
        look: Look | None = None,
        parent: QWidget | None = None,
        take_parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Form", look=look, parent=parent)
        self._task: FormTask | None = None
        self._fields: list[FormField] = []
        self.words = TaskWords(look=self._look, parent=self)
        self.form = FieldsForm(look=self._look, parent=self)
        self.form.setObjectName("form")
        self.take = Key(
            "", hint="Ctrl+Enter", size=Size.LEAD, look=self._look, parent=take_parent or self
        )
        self.take.setObjectName("take")
        self.take.clicked.connect(self._take)
        self.form.finished.connect(self.take.setFocus)
        self.setFocusProxy(self.form)
        for keys in ("Ctrl+Return", "Ctrl+Enter"):
            QShortcut(QKeySequence(keys), self).activated.connect(self.take.click)

    def show_task(self, task: FormTask) -> None:
        """Ask for the fields of a task; what is typed stays while the same is asked.

        Parameters
        ----------
        task : FormTask
            Heading, lines, cautions, fields and the words on the key.
        """
        before, self._task = self._task, task
        if before == task:
            return
        self.words.set_words(heading=task.heading, lines=task.lines, cautions=task.cautions)
        self.take.set_words(task.take)
        old = {} if before is None else {field.key: field for field in before.fields}
        if before is None or list(map(_shape, before.fields)) != list(map(_shape, task.fields)):
            self._rebuild(task, same=before is not None and before.heading == task.heading)
        for field in task.fields:
            known = old.get(field.key)
            if field.value and (known is None or known.value != field.value):
                self.form.set_answer(field.key, _words_for(field, field.value))
            if field.hint and known is None:
                self.form.set_message(field.key, field.hint)
        self._lay_out()

    def _rebuild(self, task: FormTask, *, same: bool) -> None:
        typed = self.form.answers if same else {}
        had_keyboard = self.isAncestorOf(QApplication.focusWidget() or self)
        self._fields = [field_of(field) for field in task.fields]
        self.form.set_fields(self._fields)
        asked = {field.name for field in self._fields}
        for name, text in typed.items():
            if name in asked:
                self.form.set_answer(name, text)
        # New rows come last of all in the window, behind the foot, unless they are told otherwise.
        controls: list[QWidget] = []
        for field in self._fields:
            row = self.form.row(field.name)
            controls += [*row.findChildren(QLineEdit), *row.findChildren(Key)]
        for before, after in pairwise([*controls, self.take]):
            QWidget.setTabOrder(before, after)
        if had_keyboard and self.isVisible():
            self.setFocus()

    def put_away(self) -> None:
        """Forget the form, so that the next one starts empty."""
        self._task = None

    @property
    def missing(self) -> dict[str, str]:
        """What keeps the form from being taken: a sentence for each such field."""
        answers = self.form.answers
        told = {}
        for field in self._fields:
            text = answers.get(field.name, "")
            if not text and not field.optional:
                verb = "chosen" if isinstance(field, ChoiceField) else "typed"
                told[field.name] = f"Nothing {verb} for {field.label}"
            elif text and isinstance(field, NumberField):
                told |= _unreadable(field, text)
        return told

    def _take(self) -> None:
        if self._task is None:
            return
        missing = self.missing
        for name, sentence in missing.items():
            self.form.set_message(name, sentence)
        if missing:
            self.form.go_to(next(iter(missing)))
            return
        values = {field.key: field for field in self._task.fields}
        answers = self.form.answers
        self.filled.emit({name: _key_for(values[name], text) for name, text in answers.items()})

    def line(self) -> QLineEdit | None:
        """Give the line that has the keyboard, or else the first one that is empty."""
        lines = [line for line in self.form.findChildren(QLineEdit) if line.isVisible()]
        focused = [line for line in lines if line.hasFocus()]
        empty = [line for line in lines if not line.text()]
        return next(iter(focused + empty + lines), None)

    def asked_height(self, width: int) -> int:
        """Give the height in which every field is seen at once.

        Parameters
        ----------
        width : int
            The room there is [px].

        Returns
        -------
        int
            Words and rows [px].
        """
        return self.words.heightForWidth(width) + self.form.sizeHint().height() + 8

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Put words and form below each other."""
        super().resizeEvent(event)
        self._lay_out()

    def look_changed(self) -> None:
        """Make room for the new scale."""
        self._lay_out()

    def _lay_out(self) -> None:
        width, height = self.width(), self.height()
        words = min(self.words.heightForWidth(width), round(height * _MOST_WORDS))
        self.words.setGeometry(QRect(0, 0, width, words))
        top = words + 4
        self.form.setGeometry(QRect(0, top, width, max(height - top - 2, 44)))
        flatten_scroll_bars(self.form, self._look)


def _shape(field: Field) -> tuple[object, ...]:
    return (field.key, field.label, field.unit, field.use, field.choices, field.needed)


def _words_for(field: Field, value: str) -> str:
    return dict(field.choices).get(value, value)


def _key_for(field: Field, words: str) -> str:
    return {label: key for key, label in field.choices}.get(words, words)


def _unreadable(field: NumberField, text: str) -> dict[str, str]:
    try:
        field.unit.read(text)
    except ValueError as unreadable:
        return {field.name: str(unreadable)}
    return {}
