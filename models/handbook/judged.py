"""Entries of the rules, read off their tuples."""

import inspect
from dataclasses import fields
from functools import cache

from models.handbook.docstrings import flowing
from models.handbook.entry import Entry, Kind, Quantity
from models.handbook.numbers import formulas_of
from models.handbook.tested import tested
from models.rules import ALL_RULES
from models.rules.rule import Rule

__all__ = ["formulas_behind", "rule_entries"]


def rule_entries() -> tuple[Entry, ...]:
    """Describe every rule."""
    return tuple(_entry(rule) for rule in ALL_RULES)


@cache
def formulas_behind(rule: Rule) -> tuple[str, ...]:
    """Name the formulas behind the numbers that a rule takes."""
    named = (one for name in rule.inputs for one in formulas_of(name, rule=rule.id))
    return tuple(dict.fromkeys(named))


def _entry(rule: Rule) -> Entry:
    known = tested(rule.id)
    listed = {one.name: one.metadata for one in fields(rule.facts)}
    needed = [name for name in rule.inputs if name != "units"]
    takes = tuple(
        Quantity(
            name=name,
            words=str(listed[name].get("words", name.replace("_", " ")))
            + (" (may be missing)" if name in rule.may_lack else ""),
            unit=str(listed[name].get("unit", "-")),
        )
        for name in needed
    )
    return Entry(
        name=rule.id,
        kind=Kind.RULE,
        statement=rule.statement,
        formulas=(),
        takes=takes,
        gives=(Quantity("verdict", "within, outside, cannot tell or not judged", "-"),),
        holds=(
            flowing(inspect.getdoc(rule.judge) or ""),
            "Not judged where an input is missing; a missing input is never within.",
        ),
        sources=(rule.source,),
        edition=str(rule.edition),
        lives_in=rule.judge.__module__.replace(".", "/") + ".py",
        related=formulas_behind(rule),
        tests=known.tests,
        second_paths=known.second_paths,
        published=known.published,
    )
