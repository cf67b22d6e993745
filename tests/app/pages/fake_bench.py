"""A presenter that shows the states it is given and remembers what it was told."""

from PySide6.QtCore import QObject, Signal

from models.units import Length, UnreadableNumberError, inch_set


class FakeBench(QObject):
    changed = Signal()
    refused = Signal(str)
    in_hand = Signal(str)
    troubled = Signal(str, str, str)
    recovered = Signal()

    def __init__(self, state):
        super().__init__()
        self.state = state
        self.told = []
        self.on_typed = None

    def show(self, state):
        self.state = state
        self.changed.emit()

    def read(self, text):
        return inch_set.read(text, "runout")

    def other_unit_text(self, text):
        try:
            return f"{Length.text(self.read(text).si, 'µm', 1)} µm"
        except UnreadableNumberError:
            return ""

    def typed(self, text):
        self.told.append(("typed", text))
        if self.on_typed is not None:
            self.show(self.on_typed(text))

    def __getattr__(self, name):
        if name.startswith("_"):
            raise AttributeError(name)

        def act(*words):
            self.told.append((name, *words))

        return act

    @property
    def acts(self):
        """Everything but the keys that were followed."""
        return [one for one in self.told if one[0] != "typed"]
