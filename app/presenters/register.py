"""The register's people as the record has them, and what may be done with whoever is chosen."""

from __future__ import annotations

from PySide6.QtCore import QObject, Signal

from app.presenters.keys import KeysPresenter, RegisterRow
from app.presenters.shop import Said, ShopPresenter

__all__ = ["RegisterPresenter"]


class RegisterPresenter(QObject):
    """Reads people beside the window; asks for what an inspector or the person itself does."""

    changed = Signal()
    """The people are read."""

    def __init__(
        self, shop: ShopPresenter, keys: KeysPresenter, parent: QObject | None = None
    ) -> None:
        super().__init__(parent)
        self._shop = shop
        self._keys = keys
        self._rows: tuple[RegisterRow, ...] = ()
        self._shop_words = ""
        self._has_keys = False
        keys.changed.connect(self.read)
        shop.person_changed.connect(self.changed)

    @property
    def rows(self) -> tuple[RegisterRow, ...]:
        """The people of the shop."""
        return self._rows

    @property
    def shop_words(self) -> str:
        """The shop's name and place."""
        return self._shop_words

    @property
    def words(self) -> str:
        """What to know or do first."""
        if not self._has_keys:
            return (
                "Until keys are set up, names are taken on trust, and every page says so. Setting "
                "them up makes the shop's own authority and its first inspector."
            )
        if self._by is None:
            return (
                "An inspector of the shop gives keys, replaces, unlocks and retires. Say who is at "
                "the window: press the words at the upper right."
            )
        return "What is done here stands on the record with name, moment and reason."

    @property
    def _by(self) -> str | None:
        """Who is at the window, if an inspector of the shop."""
        mine = next((one for one in self._rows if one.person.key == self._shop.person_key), None)
        return mine.person.key if mine is not None and mine.person.role == "inspector" else None

    def read(self) -> None:
        """Read the people beside the window."""
        self._shop.background.run(
            lambda: (self._keys.rows(), self._keys.shop_words, self._keys.needs_key),
            words="reading the register",
            done=self._have,
            failed=lambda error: self._shop.said.emit(Said(what=str(error))),
        )

    def _have(self, found: tuple[tuple[RegisterRow, ...], str, bool]) -> None:
        self._rows, self._shop_words, self._has_keys = found
        self.changed.emit()

    def offered(self, row: RegisterRow | None) -> frozenset[str]:
        """Name what may be done now.

        Parameters
        ----------
        row : RegisterRow or None
            Who is chosen in the table.

        Returns
        -------
        frozenset of str
            Of set up, enrol, change, replace, unlock, retire.
        """
        if not self._has_keys:
            return frozenset({"set up"})
        may = set()
        by = self._by
        if by is not None:
            may.add("enrol")
        if row is not None and row.has_key:
            if row.person.key == self._shop.person_key:
                may.add("change")
            elif by is not None:
                may |= {"replace", "retire"}
                if row.locked:
                    may.add("unlock")
        return frozenset(may)

    def press(self, name: str, row: RegisterRow | None) -> None:
        """Ask for what a key says.

        Parameters
        ----------
        name : str
            One of those offered.
        row : RegisterRow or None
            Who is chosen.
        """
        if name not in self.offered(row):
            return
        if name == "set up":
            self._keys.ask_first_start()
        elif name == "enrol":
            self._keys.ask_enrol(self._shop.person_key)
        elif row is not None and name == "change":
            self._keys.ask_change(row.person)
        elif row is not None:
            ask = {
                "replace": self._keys.ask_replace,
                "unlock": self._keys.ask_unlock,
                "retire": self._keys.ask_retire,
            }[name]
            ask(row.person, self._shop.person_key)
