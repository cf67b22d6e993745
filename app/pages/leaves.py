"""Leaves of a desk: a few areas of which one is shown, each with its key."""

from __future__ import annotations

from PySide6.QtCore import Signal
from PySide6.QtWidgets import QHBoxLayout, QStackedWidget, QVBoxLayout, QWidget

from app.frame.key import Key
from app.frame.look import Look
from app.pages.desk import Rule, desk_key
from app.pages.table import DeskTable

__all__ = ["Leaves"]


class Leaves(QWidget):
    """A row of keys and, below it, the leaf whose key is pressed."""

    turned = Signal(str)
    """Another leaf is shown; carries its name."""

    def __init__(self, *, look: Look, parent: QWidget | None = None) -> None:
        super().__init__(parent)
        self._look = look
        self._keys: dict[str, Key] = {}
        self._leaves: dict[str, QWidget] = {}
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self._row = QHBoxLayout()
        self._row.setContentsMargins(24, 8, 24, 8)
        self._row.setSpacing(8)
        self._row.addStretch(1)
        column.addLayout(self._row)
        column.addWidget(Rule(look=look, parent=self))
        self._stack = QStackedWidget(self)
        column.addWidget(self._stack, 1)

    def add(self, name: str, leaf: QWidget) -> None:
        """Put up a leaf; the first one is shown.

        Parameters
        ----------
        name : str
            The words on its key.
        leaf : QWidget
            The leaf.
        """
        key = desk_key(name, look=self._look, parent=self)
        key.setCheckable(True)
        key.clicked.connect(lambda: self.turn_to(name))
        self._row.insertWidget(len(self._keys), key)
        self._stack.addWidget(leaf)
        # All keys come first, then whichever leaf is shown.
        if self._keys:
            QWidget.setTabOrder(list(self._keys.values())[-1], key)
        QWidget.setTabOrder(key, leaf)
        self._keys[name] = key
        self._leaves[name] = leaf
        if len(self._keys) == 1:
            self.turn_to(name)

    def turn_to(self, name: str) -> None:
        """Show another leaf.

        Parameters
        ----------
        name : str
            Its name.
        """
        for word, key in self._keys.items():
            key.setChecked(word == name)
        self._stack.setCurrentWidget(self._leaves[name])
        self.turned.emit(name)

    @property
    def present(self) -> str:
        """Name of the leaf that is shown."""
        return next(word for word, key in self._keys.items() if key.isChecked())

    def entrance(self) -> QWidget:
        """Give the first table of the leaf that is shown, or its key where it has none."""
        leaf = self._leaves[self.present]
        tables = [leaf] if isinstance(leaf, DeskTable) else leaf.findChildren(DeskTable)
        return tables[0] if tables else self._keys[self.present]

    def count(self, name: str, number: int) -> None:
        """Say on a leaf's key how many rows wait there.

        Parameters
        ----------
        name : str
            The leaf.
        number : int
            How many; 0 leaves the figure out [-].
        """
        self._keys[name].set_words(f"{name}: {number}" if number else name)
