"""Every rule, formula and number leads to a page of the handbook that says where it comes from."""

import re
from dataclasses import fields
from typing import Any

import pytest

from app.worked_out import worked_out
from models.assess import assess
from models.handbook import NUMBERS, Entry, Kind, entry, every_entry, find, formulas_of
from models.handbook.numbers import BY_RULE
from models.rules import ALL_RULES
from sample_data.load import compressor, pump
from tests.handbook import index

ENTRIES = every_entry()
UNIT = re.compile(r"^(.*) \[[^\]]+\]$")


def test_the_list_of_tests_is_the_one_of_these_tests() -> None:
    kept = set(index.LIST.read_text(encoding="utf-8").splitlines())
    made = index.lines()

    missing, gone = sorted(made - kept), sorted(kept - made)
    assert not missing, f"run python -m tests.handbook.index: {missing[:5]} are not listed"
    assert not gone, f"run python -m tests.handbook.index: {gone[:5]} are listed, and gone"


def test_every_rule_and_every_public_formula_has_its_page() -> None:
    names = [one.name for one in ENTRIES]

    assert names[: len(ALL_RULES)] == [one.id for one in ALL_RULES]
    assert len(names) == len(set(names))
    assert len(names) > 190


@pytest.mark.parametrize("one", ENTRIES, ids=lambda one: one.name)
def test_a_page_states_source_range_and_at_least_one_test(one: Entry) -> None:
    assert one.statement.endswith("."), f"{one.name}: its docstring begins with no sentence"
    assert one.sources, f"{one.name} names no source"
    assert all(len(words) >= 8 for words in one.sources), f"{one.name}: {one.sources}"
    assert one.tests, (
        f"{one.name}: no test names it; write one, then python -m tests.handbook.index"
    )
    if one.kind is Kind.FORMULA:
        assert one.formulas, f"{one.name}: no .. math:: and no Formula: in its docstring"
        assert one.takes, one.name
    # What sets mathematics in other signs would be unreadable here.
    words = (*one.formulas, *one.holds, *one.sources, *(each.words for each in one.takes))
    assert not [text for text in words if "\\" in text or ":math:" in text], one.name


@pytest.mark.parametrize("one", ENTRIES, ids=lambda one: one.name)
def test_a_page_is_found_by_any_of_its_names(one: Entry) -> None:
    assert find(one.name) == (one,)
    assert one in find(one.name.split(".")[-1])


def numbers_in(data: Any) -> set[str]:
    """Give the names of all numbers in plain data, without their units."""
    if isinstance(data, dict):
        own = {found.group(1) for key in data if (found := UNIT.match(key))}
        return own.union(*(numbers_in(value) for value in data.values()))
    if isinstance(data, list):
        return set().union(*(numbers_in(value) for value in data))
    return set()


@pytest.mark.parametrize("job", [compressor(), pump()], ids=lambda job: job.number)
def test_every_number_that_is_worked_out_leads_to_its_formula(job: Any) -> None:
    shown = numbers_in(worked_out(assess(job)))

    assert len(shown) > 30
    unknown = sorted(shown - set(NUMBERS))
    assert not unknown, f"name the formulas behind {unknown} in models/handbook/numbers.py"
    assert all(find(f"{name} [m]") for name in shown if NUMBERS[name])


@pytest.mark.parametrize("rule", ALL_RULES, ids=lambda rule: rule.id)
def test_every_number_that_a_rule_takes_leads_to_its_formula(rule: Any) -> None:
    numeric = {
        one.name
        for one in fields(rule.facts)
        if one.metadata.get("unit", "-") != "-" and one.name in rule.inputs
    }

    unknown = sorted(numeric - set(NUMBERS))
    assert not unknown, f"name the formulas behind {unknown} in models/handbook/numbers.py"


def test_what_stands_behind_a_number_has_a_page() -> None:
    named = {one for formulas in (*NUMBERS.values(), *BY_RULE.values()) for one in formulas}

    assert {entry(name).kind for name in named} == {Kind.FORMULA}


def test_a_number_of_one_name_in_two_rules_leads_to_two_formulas() -> None:
    of_a_fit = formulas_of("expanded_uncertainty", rule="interference-within")
    of_a_change = formulas_of("expanded_uncertainty", rule="runout-changed")

    assert "size_uncertainty.interference_uncertainty" in of_a_fit
    assert "mount_change.change_at_stations" in of_a_change
    assert not set(of_a_fit) & set(of_a_change)


def test_a_rule_and_its_formulas_name_each_other() -> None:
    rule = entry("fit-holds-torque")

    assert "holding.holding_torque" in rule.related
    assert all("fit-holds-torque" in entry(name).related for name in rule.related)


@pytest.mark.parametrize(
    ("words", "first"),
    [
        ("least_pressure [Pa]", "fits.contact_pressure"),
        ("Least pressure", "fits.contact_pressure"),
        ("release speed uniform discs", "rotation.release_speed"),
        ("Shigley torque friction", "holding.holding_torque"),
        ("CONTACT_PRESSURE", "fits.contact_pressure"),
        ("closed circle", "reading_blunders.unclosed_circle"),
    ],
)
def test_words_find_the_page_a_reader_means(words: str, first: str) -> None:
    assert first in [one.name for one in find(words)][:3]


def test_words_that_stand_nowhere_find_nothing() -> None:
    assert find("contact zyzzyva") == ()
    with pytest.raises(LookupError, match="zyzzyva"):
        entry("zyzzyva")


def test_the_pressure_s_page_shows_what_it_was_compared_with() -> None:
    page = entry("fits.contact_pressure")

    assert ("Brown in SI", "12.6") in [(row.case, row.printed) for row in page.published]
    assert "tests/second_paths/ring.py" in page.second_paths
    assert any(one.endswith("::test_the_pressure_is_the_one_printed") for one in page.tests)
