"""The handbook as the window shows it: what was searched for, and the page that is open."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from PySide6.QtCore import QObject, Signal

from models.handbook import Entry, Kind, Published, Quantity, every_entry, find

__all__ = ["HandbookPresenter", "PageLine"]


@dataclass(frozen=True, kw_only=True)
class PageLine:
    """One line of a page: what it is, and what it says."""

    what: str
    says: str


class HandbookPresenter(QObject):
    """Searches the handbook; records nothing and needs no job."""

    changed = Signal()
    """Other entries are listed."""

    def __init__(self, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._words = ""

    @property
    def words(self) -> str:
        """What is searched for; nothing lists everything."""
        return self._words

    @property
    def entries(self) -> tuple[Entry, ...]:
        """What was found, the best first."""
        return find(self._words)

    @property
    def standing(self) -> str:
        """How many were found, of what."""
        found, known = self.entries, every_entry()
        rules = sum(one.kind is Kind.RULE for one in found)
        told = f"{_count(rules, 'rule')} and {_count(len(found) - rules, 'formula')}"
        if not found:
            return f"Nothing is found on “{self._words}”: try fewer words, or none for all of it."
        return f"{told}." if len(found) == len(known) else f"{told} found, of {len(known)} entries."

    def search(self, words: str) -> None:
        """Search for words.

        Parameters
        ----------
        words : str
            A rule's id, a formula's name, the name of a number, or words.
        """
        if words.strip() != self._words:
            self._words = words.strip()
            self.changed.emit()

    def page(self, one: Entry) -> tuple[PageLine, ...]:
        """Lay an entry open, line by line.

        Parameters
        ----------
        one : Entry
            The entry.

        Returns
        -------
        tuple of PageLine
            Statement, formula, quantities, range, sources, what it was compared with, tests.
        """
        related = "formulas behind its numbers" if one.kind is Kind.RULE else "used by the rules"
        return (
            *_lines("says", (one.statement,)),
            *_lines("formula", one.formulas),
            *_lines("takes", map(_quantity, one.takes)),
            *_lines("gives", map(_quantity, one.gives)),
            *_lines("range and notes", one.holds),
            *_lines("source", one.sources),
            *_lines("edition", (one.edition,) if one.edition else ()),
            *_lines(related, (", ".join(one.related),) if one.related else ()),
            *_lines("compared with", map(_row, one.published)),
            *_lines("second path", one.second_paths),
            *_lines("tests", map(_test, one.tests)),
            *_lines("code", (one.lives_in,)),
        )


def _lines(what: str, says: Iterable[str]) -> tuple[PageLine, ...]:
    """Put several lines under one word."""
    told = "\n".join(says)
    return (PageLine(what=what, says=told),) if told else ()


def _quantity(one: Quantity) -> str:
    return f"{one.name.replace('_', ' ')} [{one.unit}]: {one.words}"


def _row(one: Published) -> str:
    return f"{one.printed or 'no figure'}: {one.case} ({one.source})"


def _test(path: str) -> str:
    """Write a test's name as the sentence it is, with its file."""
    place, _, name = path.partition("::")
    return f"{name.removeprefix('test_').replace('_', ' ')} ({place})"


def _count(number: int, what: str) -> str:
    return f"{number} {what}" if number == 1 else f"{number} {what}s"
