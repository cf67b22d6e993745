"""Every section of the check values went somewhere, and every table came from one."""

import importlib
import pkgutil

import pytest

import tests.published
from tests.published.sections import CONTRADICTIONS, LEFT_OUT, TABLES

HELPERS = ("printed", "sections", "test_printed", "test_sections")


def tables_here() -> set[str]:
    found = set()
    for module in pkgutil.iter_modules(tests.published.__path__):
        if module.name not in HELPERS:
            loaded = importlib.import_module(f"tests.published.{module.name}")
            for name, value in vars(loaded).items():
                if name.isupper() and not name.startswith("_") and isinstance(value, list):
                    found.add(f"{module.name}.{name}")
    return found


@pytest.mark.parametrize("section", TABLES)
def test_a_section_s_tables_are_there_with_rows(section: str) -> None:
    assert TABLES[section]
    assert [name for name in TABLES[section] if name not in tables_here()] == []


def test_no_table_is_left_without_its_section() -> None:
    named = {name for names in TABLES.values() for name in names}

    assert sorted(tables_here() - named) == [], "say where it came from in sections.py"


def test_what_is_left_out_or_contradicted_has_its_reason() -> None:
    assert all(len(reason) > 20 for reason in (*LEFT_OUT.values(), *CONTRADICTIONS.values()))
    assert not set(TABLES) & set(LEFT_OUT)
