"""The whole handbook, and how one finds a page of it."""

from dataclasses import replace
from functools import cache

from models.handbook.entry import Entry, Kind
from models.handbook.formulas import formula_entries
from models.handbook.judged import rule_entries
from models.handbook.numbers import NUMBERS, formulas_of

__all__ = ["entry", "every_entry", "find"]


@cache
def every_entry() -> tuple[Entry, ...]:
    """Give the rules in the order people read them, then the formulas by module."""
    rules = rule_entries()
    used: dict[str, list[str]] = {}
    for one in rules:
        for name in one.related:
            used.setdefault(name, []).append(one.name)
    formulas = (replace(one, related=tuple(used.get(one.name, ()))) for one in formula_entries())
    return (*rules, *formulas)


def entry(name: str) -> Entry:
    """Give one entry by its whole name.

    Raises
    ------
    LookupError
        If nothing is called so.
    """
    for one in every_entry():
        if one.name == name:
            return one
    raise LookupError(f"The handbook has no entry named {name}; search it by a word of it.")


def find(words: str) -> tuple[Entry, ...]:
    """Find entries: by name, by the number they make, else by every word in their text.

    Parameters
    ----------
    words : str
        A rule's id, a function's name, the name of a number as any screen or file shows it
        (``least_pressure [Pa]``), or words.

    Returns
    -------
    tuple of Entry
        The best first; all of them for no words at all.
    """
    asked = words.split("[")[0].strip().casefold()
    if not asked:
        return every_entry()
    key = asked.replace(" ", "_")
    named = [one for one in every_entry() if key in _names(one) or asked in _names(one)]
    made = [entry(name) for name in formulas_of(key)] if key in NUMBERS else []
    if made:
        takers = [one for one in every_entry() if one.kind is Kind.RULE
                  and key in {taken.name for taken in one.takes}]  # fmt: skip
        return tuple(dict.fromkeys((*named, *made, *takers)))
    if named:
        return tuple(named)
    parts = asked.replace("_", " ").replace("-", " ").split()
    ranked = sorted(((_rank(one, parts), one) for one in every_entry()), key=lambda pair: -pair[0])
    return tuple(one for rank, one in ranked if rank > 0)


def _names(one: Entry) -> set[str]:
    return {one.name.casefold(), one.name.split(".")[-1].casefold()}


def _rank(one: Entry, parts: list[str]) -> int:
    """Weigh where the words stand; an entry that lacks one of them does not count."""
    name = one.name.replace("_", " ").replace("-", " ").casefold()
    statement = one.statement.casefold()
    rest = " ".join(
        (
            *one.formulas,
            *one.holds,
            *one.sources,
            *(f"{each.name} {each.words}" for each in (*one.takes, *one.gives)),
        )
    ).casefold()
    weights = [
        4 * (part in name) + 2 * (part in statement) + (part in rest) for part in parts
    ]  # fmt: skip
    return sum(weights) if all(weights) else 0
