"""Hold one chain against its rows."""

from collections import defaultdict
from collections.abc import Iterator
from dataclasses import dataclass

from sqlalchemy.exc import DBAPIError
from sqlalchemy.orm import Session

from models.job import Head
from models.record.canonical import (
    FIRST_PREVIOUS,
    UnfitValueError,
    parse,
    short_digest,
)
from models.record.flat import Row
from models.record.links import NamedRow, digest_of_texts, row_text
from models.record.tables import recorded_tables

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
        acts = self._read(session, "act", chain_id)
        self.acts = sorted(acts, key=lambda row: row["sequence"])
        rows: dict[int, list[NamedRow]] = defaultdict(list)
        for each in self._with_rows(session, chain_id):
            for row in self._read(session, each, chain_id):
                rows[row["sequence"]].append((each, row))
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

    def _with_rows(self, session: Session, chain_id: str) -> list[str]:
        """List the recorded tables that hold rows of the chain: most of them hold none."""
        names = [each.name for each in recorded_tables()]
        asked = " UNION ALL ".join(
            f"SELECT '{name}' WHERE EXISTS (SELECT 1 FROM \"{name}\" WHERE chain_id = ?)"
            for name in names
        )
        try:
            found = session.connection().exec_driver_sql(asked, (chain_id,) * len(names))
            return [row[0] for row in found]
        except DBAPIError:
            return names

    def _read(self, session: Session, name: str, chain_id: str) -> list[Row]:
        try:
            found = session.connection().exec_driver_sql(
                f'SELECT * FROM "{name}" WHERE chain_id = ?', (chain_id,)
            )
            columns = list(found.keys())
            return [dict(zip(columns, row, strict=True)) for row in found.fetchall()]
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
        # Written once, for the list of rows and for the link alike.
        texts = [(name, _text(row)) for name, row in found]
        told = list(self._differing(sequence, found, texts, listed))
        yield from told
        try:
            digest = digest_of_texts(act, texts)
        except (TypeError, ValueError) as error:
            digest = str(error)
        if digest != act["digest"] and not told:
            yield self._trouble(
                sequence, "act", key, "is changed: its digest does not fit what it says"
            )

    def _differing(
        self,
        sequence: int,
        found: list[NamedRow],
        texts: list[tuple[str, str]],
        listed: dict[tuple[str, str], str],
    ) -> Iterator[Trouble]:
        there = {
            (name, row["key"]): text for (name, row), (_, text) in zip(found, texts, strict=True)
        }
        for name, key in sorted(listed.keys() - there.keys()):
            yield self._trouble(sequence, name, key, "was removed, or is no longer in its act")
        for name, key in sorted(there.keys() - listed.keys()):
            yield self._trouble(sequence, name, key, "was added to an act that was closed")
        for place, text in there.items():
            if place in listed and _digest(text) != listed[place]:
                yield self._trouble(sequence, *place, "is changed")
        kept = [place for place in there if place in listed]
        if kept != [place for place in listed if place in there]:
            yield self._trouble(sequence, "act", "", "its rows are reordered")


def _triples(text: str) -> list[tuple[str, str, str]]:
    listed = parse(text)
    if not isinstance(listed, list):
        raise UnfitValueError("no list")
    return [(str(name), str(key), str(digest)) for name, key, digest in listed]


def _text(row: Row) -> str:
    try:
        return row_text(row)
    except (TypeError, ValueError):
        # A cell of a kind that nothing recorded has: its text fits no digest.
        return "no row of this program"


def _digest(text: str) -> str:
    try:
        return short_digest(text)
    except UnicodeEncodeError:
        return ""
