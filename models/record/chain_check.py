"""Hold one chain against its rows."""

from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from sqlalchemy import select
from sqlalchemy.exc import DBAPIError
from sqlalchemy.orm import Session

from models.job import Head
from models.record import tables
from models.record.canonical import (
    FIRST_PREVIOUS,
    UnfitValueError,
    canonical_text,
    parse,
    short_digest,
)
from models.record.flat import Row
from models.record.links import NamedRow, digest_of, filled
from models.record.tables import recorded_tables, table

__all__ = ["ChainCheck", "Trouble"]


@dataclass(frozen=True, kw_only=True)
class Trouble:
    """One thing that is not as it was recorded."""

    what: str
    job: str = ""
    sequence: int | None = None
    table: str = ""
    key: str = ""

    @property
    def words(self) -> str:
        """Say where it is and what it is, in one line."""
        where = [f"job {self.job}"] if self.job else []
        where += [] if self.sequence is None else [f"act {self.sequence}"]
        where += [f"table {self.table}"] if self.table else []
        where += [f"row {self.key}"] if self.key else []
        return f"{', '.join(where)}: {self.what}" if where else self.what


class ChainCheck:
    """All rows of one chain, read once."""

    def __init__(self, session: Session, chain_id: str, name: str) -> None:
        self._name = name
        self._unread: list[Trouble] = []
        act = table(tables.Act)
        asked = select(act).where(act.c.chain_id == chain_id).order_by(act.c.sequence)
        self.acts = self._read(session, "act", asked)
        rows: dict[int, list[NamedRow]] = defaultdict(list)
        for each in recorded_tables():
            asked = select(each).where(each.c.chain_id == chain_id)
            for row in self._read(session, each.name, asked):
                rows[row["sequence"]].append((each.name, row))
        self._rows = {
            sequence: sorted(found, key=lambda one: one[1]["line"])
            for sequence, found in rows.items()
        }

    @property
    def head(self) -> Head | None:
        """The last link."""
        if not self.acts:
            return None
        return Head(sequence=self.acts[-1]["sequence"], digest=self.acts[-1]["digest"])

    def troubles(self) -> Iterator[Trouble]:
        """Find everything that is not as it was recorded."""
        yield from self._unread
        yield from self._order()
        for act in self.acts:
            yield from self._act(act)
        known = {act["sequence"] for act in self.acts}
        for sequence in sorted(self._rows.keys() - known):
            for name, row in self._rows[sequence]:
                yield self._trouble(sequence, name, row["key"], "was added without an act")

    def compared_with(self, expected: Head) -> Iterator[Trouble]:
        """Look for a head that was kept elsewhere, whole or as far as paper prints it."""
        found = next((act for act in self.acts if act["sequence"] == expected.sequence), None)
        if found is None:
            last = 0 if self.head is None else self.head.sequence
            yield self._trouble(
                expected.sequence, "act", "", f"was cut off: the chain ends at act {last}"
            )
        elif not found["digest"].startswith(expected.digest):
            yield self._trouble(
                expected.sequence,
                "act",
                found["act_id"],
                "the chain was written anew: its digest is not the one that was kept",
            )

    def _read(self, session: Session, name: str, asked: Any) -> list[Row]:  # noqa: ANN401
        try:
            return [dict(row) for row in session.execute(asked).mappings()]
        except (DBAPIError, UnicodeDecodeError) as error:
            self._unread.append(self._trouble(None, name, "", f"cannot be read: {error}"))
            return []

    def _trouble(self, sequence: int | None, name: str, key: str, what: str) -> Trouble:
        return Trouble(job=self._name, sequence=sequence, table=name, key=key, what=what)

    def _order(self) -> Iterator[Trouble]:
        previous, digest, entered = 0, FIRST_PREVIOUS, ""
        for act in self.acts:
            sequence, key = act["sequence"], act["act_id"]
            if sequence != previous + 1:
                gone = previous + 1
                yield self._trouble(gone, "act", "", f"is missing before act {sequence}")
            if act["previous_digest"] != digest:
                yield self._trouble(
                    sequence,
                    "act",
                    key,
                    "does not follow the act before it: removed, added, reordered or changed",
                )
            if act["entered_at_utc"] < entered:
                yield self._trouble(sequence, "act", key, "is dated before the act before it")
            previous, digest, entered = sequence, act["digest"], act["entered_at_utc"]

    def _act(self, act: Row) -> Iterator[Trouble]:
        sequence, key = act["sequence"], act["act_id"]
        found = self._rows.get(sequence, [])
        try:
            listed = {(name, of): digest for name, of, digest in _triples(act["rows_json"])}
        except (UnfitValueError, ValueError, TypeError):
            yield self._trouble(sequence, "act", key, "its list of rows is changed")
            return
        told = list(self._differing(sequence, found, listed))
        yield from told
        try:
            digest = digest_of(act, found)
        except (UnfitValueError, ValueError) as error:
            digest = str(error)
        if digest != act["digest"] and not told:
            yield self._trouble(
                sequence, "act", key, "is changed: its digest does not fit what it says"
            )

    def _differing(
        self, sequence: int, found: list[NamedRow], listed: dict[tuple[str, str], str]
    ) -> Iterator[Trouble]:
        there = {(name, row["key"]): row for name, row in found}
        for name, key in sorted(listed.keys() - there.keys()):
            yield self._trouble(sequence, name, key, "was removed, or is no longer in its act")
        for name, key in sorted(there.keys() - listed.keys()):
            yield self._trouble(sequence, name, key, "was added to an act that was closed")
        for place, row in there.items():
            if place in listed and _digest(row) != listed[place]:
                yield self._trouble(sequence, *place, "is changed")
        kept = [place for place in there if place in listed]
        if kept != [place for place in listed if place in there]:
            yield self._trouble(sequence, "act", "", "its rows are reordered")


def _triples(text: str) -> list[tuple[str, str, str]]:
    listed = parse(text)
    if not isinstance(listed, list):
        raise UnfitValueError("no list")
    return [(str(name), str(key), str(digest)) for name, key, digest in listed]


def _digest(row: Row) -> str:
    try:
        return short_digest(canonical_text(filled(row)))
    except UnfitValueError:
        return ""
