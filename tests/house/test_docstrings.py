"""Public engineering functions state every parameter with its unit, an example and a reference."""

import importlib
import inspect
import pkgutil
import re
from collections.abc import Callable
from typing import Any

import pytest

import models.engineering

UNIT = re.compile(r"\[[^\[\]]+\]\s*$")
SECTIONS = ("Parameters", "Returns", "Examples", "References")


def public_functions() -> list[tuple[str, Callable[..., Any]]]:
    found = []
    for module in pkgutil.iter_modules(models.engineering.__path__):
        loaded = importlib.import_module(f"models.engineering.{module.name}")
        for name in loaded.__all__:
            one = getattr(loaded, name)
            # A range guard states no quantity: the formula that calls it documents what it raises.
            is_guard = name.startswith("demand_")
            if inspect.isfunction(one) and one.__module__ == loaded.__name__ and not is_guard:
                found.append((f"{module.name}.{name}", one))
    return found


FUNCTIONS = public_functions()


def section(text: str, title: str) -> str:
    """Give the body of a numpy-style section, up to the next underlined title."""
    found = re.search(
        rf"^{title}\n-+\n(.*?)(?=^\w[^\n]*\n-+\n|\Z)", text, flags=re.MULTILINE | re.DOTALL
    )
    return found.group(1) if found else ""


def described(body: str) -> dict[str, str]:
    """Split a parameters section into name -> description joined to one line."""
    entries: dict[str, str] = {}
    name = None
    for line in body.splitlines():
        if line and not line[0].isspace():
            name = line.split(":")[0].strip()
            entries[name] = ""
        elif name is not None and line.strip():
            entries[name] += " " + line.strip()
    return entries


@pytest.mark.parametrize(("name", "function"), FUNCTIONS, ids=[name for name, _ in FUNCTIONS])
def test_docstring_states_units_example_and_reference(
    name: str, function: Callable[..., Any]
) -> None:
    text = inspect.getdoc(function) or ""
    parameters = inspect.signature(function).parameters
    listed = described(section(text, "Parameters"))

    missing = [title for title in SECTIONS if not section(text, title).strip()]
    assert not missing, f"{name} lacks {missing}"
    assert list(listed) == list(parameters)
    without_unit = [one for one, words in listed.items() if not UNIT.search(words)]
    assert not without_unit, f"{name}: no unit in brackets for {without_unit}"
    assert ">>>" in section(text, "Examples")


@pytest.mark.parametrize(("name", "function"), FUNCTIONS, ids=[name for name, _ in FUNCTIONS])
def test_parameters_are_named_in_the_call(name: str, function: Callable[..., Any]) -> None:
    kinds = {one.kind for one in inspect.signature(function).parameters.values()}

    assert kinds <= {inspect.Parameter.KEYWORD_ONLY}, name


def test_the_walk_finds_the_engineering() -> None:
    assert len(FUNCTIONS) > 50
