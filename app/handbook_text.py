"""Pages of the handbook in words and as plain data, for the command line and the window."""

from dataclasses import asdict
from textwrap import fill
from typing import Any

from models.handbook import NUMBERS, Entry, Kind, find

__all__ = ["as_data", "page_text", "told"]

_WIDTH = 96
_TYPES = ("float", "bool", "complex", "ndarray", "array", "int", "str", "tuple")


def as_data(entries: tuple[Entry, ...]) -> list[dict[str, Any]]:
    """Give entries as plain data."""
    return [{**asdict(one), "kind": one.kind.value} for one in entries]


def told(words: str) -> str:
    """Say what the handbook has on some words: a page where they mean one, else a list.

    Parameters
    ----------
    words : str
        A rule's id, a formula's name, the name of a number, or words; nothing for all of it.

    Returns
    -------
    str
        The text; nothing where nothing was found.
    """
    found = find(words)
    if len(found) == 1:
        return page_text(found[0])
    key = words.split("[")[0].strip().casefold().replace(" ", "_")
    if words.strip() and (key in NUMBERS or _is_name(words, found)):
        return "\n\n\n".join(page_text(one) for one in found)
    return "\n".join(_line(one) for one in found)


def _is_name(words: str, found: tuple[Entry, ...]) -> bool:
    asked = words.strip().casefold()
    return bool(found) and all(one.name.casefold().split(".")[-1] == asked for one in found)


def _line(one: Entry) -> str:
    edition = f", edition {one.edition}" if one.edition else ""
    tested = f"{_count(len(one.tests), 'test')}, {_count(len(one.published), 'compared row')}"
    return "\n".join(
        (
            f"{one.name}  ({one.kind.value}{edition}; {tested})",
            _wrapped(one.statement),
            *(_wrapped(formula) for formula in one.formulas),
            _wrapped(f"Source: {'; '.join(one.sources)}"),
        )
    )


def page_text(one: Entry) -> str:
    """Write a whole page: statement, formula, quantities, range, sources, edition, tests."""
    edition = f", edition {one.edition}" if one.edition else ""
    parts = [f"{one.name}  ({one.kind.value}{edition})", _wrapped(one.statement)]
    if one.formulas:
        parts.append(_block("Formula", [_wrapped(formula) for formula in one.formulas]))
    takes = [_wrapped(f"{each.name} [{each.unit}]: {each.words}") for each in one.takes]
    if takes:
        parts.append(_block("Takes", takes))
    gives = [_wrapped(f"{_result(each.name)} [{each.unit}]: {each.words}") for each in one.gives]
    if gives:
        parts.append(_block("Gives", gives))
    if one.holds:
        parts.append(_block("Range and notes", [_wrapped(each) for each in one.holds]))
    parts.append(_block("Source", [_wrapped(each) for each in one.sources]))
    related = "Formulas behind its numbers" if one.kind is Kind.RULE else "Used by the rules"
    if one.related:
        parts.append(_block(related, [_wrapped(", ".join(one.related))]))
    if one.published:
        rows = [
            _wrapped(f"{row.printed or row.case}: {row.case} ({row.source})")
            for row in one.published
        ]
        parts.append(_block("Compared with, as printed there", rows))
    if one.second_paths:
        words = ", ".join(one.second_paths)
        parts.append(_block("Second path, with no formula in common", [_wrapped(words)]))
    parts.append(_block("Tests", [f"  {each}" for each in one.tests]))
    parts.append(f"The code is in {one.lives_in}; tests are in the source of the program.")
    return "\n\n".join(parts)


def _result(name: str) -> str:
    """Name a result that its docstring names by its type alone."""
    return "result" if name.split(" ")[0] in _TYPES else name


def _block(title: str, lines: list[str]) -> str:
    return "\n".join((title, *lines))


def _wrapped(text: str) -> str:
    return fill(text, width=_WIDTH, initial_indent="  ", subsequent_indent="    ")


def _count(number: int, what: str) -> str:
    return f"{number} {what}" if number == 1 else f"{number} {what}s"
