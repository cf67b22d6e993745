"""Compare what a file holds with what the program made: tables, indices, triggers."""

import re
from collections.abc import Mapping
from functools import cache
from types import MappingProxyType

from sqlalchemy import Connection
from sqlalchemy.dialects import sqlite
from sqlalchemy.schema import CreateIndex, CreateTable

from models.record.tables import CHANGEABLE, OF_A_LIBRARY, Base
from models.record.triggers import trigger_texts

__all__ = ["differences", "expected_objects", "found_objects"]

_SPACE = re.compile(r"\s+|(?<=[(),])|(?=[(),])")


@cache
def expected_objects() -> Mapping[tuple[str, str], str]:
    """Write out every table, index and trigger as the program makes them."""
    dialect = sqlite.dialect()
    expected: dict[tuple[str, str], str] = {}
    for name, table in Base.metadata.tables.items():
        expected["table", name] = _plain(str(CreateTable(table).compile(dialect=dialect)))
        for index in table.indexes:
            text = str(CreateIndex(index).compile(dialect=dialect))
            expected["index", str(index.name)] = _plain(text)
    for name, text in trigger_texts(Base.metadata, changeable=CHANGEABLE).items():
        expected["trigger", name] = _plain(text)
    return MappingProxyType(expected)


def found_objects(connection: Connection) -> dict[tuple[str, str], str]:
    """Read every table, index, trigger and view that somebody made in the file."""
    rows = connection.exec_driver_sql(
        "SELECT type, name, sql FROM sqlite_schema WHERE sql IS NOT NULL"
    )
    return {
        (kind, name): _plain(text)
        for kind, name, text in rows
        if name not in OF_A_LIBRARY and not name.startswith("sqlite_")
    }


def differences(connection: Connection) -> tuple[str, ...]:
    """Say what is missing, changed or added; nothing if the file is as the program made it."""
    expected = expected_objects()
    found = found_objects(connection)
    said = [f"{kind} {name} is missing" for kind, name in sorted(expected.keys() - found.keys())]
    said += [f"{kind} {name} was added" for kind, name in sorted(found.keys() - expected.keys())]
    said += [
        f"{kind} {name} is changed"
        for kind, name in sorted(expected.keys() & found.keys())
        if expected[kind, name] != found[kind, name]
    ]
    return tuple(said)


def _plain(text: str) -> str:
    """Write a statement so that spacing, quoting and the order of its parts do not matter."""
    # All three may change with the library that writes them.
    words = " ".join(part for part in _SPACE.split(text.replace('"', "")) if part)
    if not words.startswith("CREATE TABLE"):
        return words
    head, body = words.split(" ( ", 1)
    body, options = body.rsplit(" )", 1)
    ends = ",".join(sorted(options.replace(",", " ").split()))
    return f"{head} ( {' , '.join(sorted(_top_level(body)))} ) {ends}"


def _top_level(body: str) -> list[str]:
    parts: list[str] = [""]
    depth = 0
    for word in body.split(" "):
        depth += (word == "(") - (word == ")")
        if word == "," and depth == 0:
            parts.append("")
        else:
            parts[-1] += f" {word}"
    return [part.strip() for part in parts]
