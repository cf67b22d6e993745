"""Entries of the public formulas, read off their docstrings."""

import importlib
import inspect
import pkgutil
import re
from collections.abc import Callable, Iterator
from dataclasses import replace
from typing import Any

import models.engineering
from models.handbook.docstrings import flowing, items, paragraphs, quantities, section
from models.handbook.entry import Entry, Kind, Quantity
from models.handbook.plain_signs import plain_formula
from models.handbook.tested import tested

__all__ = ["formula_entries", "public_functions"]

_MATH = re.compile(r":math:`([^`]*)`")
_TITLE = re.compile(r"^\w[^\n]*\n-+\n", flags=re.MULTILINE)


def public_functions() -> Iterator[tuple[str, Callable[..., Any]]]:
    """Name every public formula with its module; what only refuses bad input states none."""
    for module in pkgutil.iter_modules(models.engineering.__path__):
        loaded = importlib.import_module(f"models.engineering.{module.name}")
        for name in getattr(loaded, "__all__", ()):
            one = getattr(loaded, name)
            at_home = inspect.isfunction(one) and one.__module__ == loaded.__name__
            if at_home and not name.startswith("demand_"):
                yield f"{module.name}.{name}", one


def formula_entries() -> tuple[Entry, ...]:
    """Describe every public formula."""
    return tuple(_entry(name, one) for name, one in public_functions())


def _entry(name: str, function: Callable[..., Any]) -> Entry:
    text = inspect.getdoc(function) or ""
    first = _TITLE.search(text)
    parts = paragraphs(text[: first.start()] if first else text)
    formulas, words = [], []
    for part in parts[1:]:
        if part.lstrip().startswith(".. math::"):
            formulas.append(_signs(part.split("::", 1)[1]))
        elif part.startswith("Formula:"):
            formulas.append(_signs(part.removeprefix("Formula:")))
        else:
            words.append(_in_line(part))
    raises = [
        f"Refused: {_uncapped(one.words)}" for one in quantities(section(text, "Raises"))
    ]  # fmt: skip
    notes = [
        _signs(part.split("::", 1)[1]) if ".. math::" in part else _in_line(part)
        for part in paragraphs(section(text, "Notes"))
    ]
    known = tested(name)
    return Entry(
        name=name,
        kind=Kind.FORMULA,
        statement=flowing(parts[0]) if parts else "",
        formulas=tuple(formulas),
        takes=_plain(quantities(section(text, "Parameters"))),
        gives=_plain(quantities(section(text, "Returns"))),
        holds=(*words, *notes, *raises),
        sources=items(section(text, "References")),
        edition="",
        lives_in=function.__module__.replace(".", "/") + ".py",
        related=(),
        tests=known.tests,
        second_paths=known.second_paths,
        published=known.published,
    )


def _signs(text: str) -> str:
    return (
        _in_line(text)
        if ":math:" in text
        else plain_formula(text)
        if _is_set(text)
        else (flowing(text))
    )


def _is_set(text: str) -> bool:
    return "\\" in text or "^" in text


def _in_line(text: str) -> str:
    """Write the formulas inside a sentence in plain signs."""
    line = " ".join(text.split())
    return flowing(_MATH.sub(lambda found: plain_formula(found.group(1)), line))


def _plain(listed: tuple[Quantity, ...]) -> tuple[Quantity, ...]:
    return tuple(replace(one, words=_in_line(one.words)) for one in listed)


def _uncapped(words: str) -> str:
    return words[:1].lower() + words[1:]
