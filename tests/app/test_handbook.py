"""The handbook on the command line."""

import json

import pytest

from app.commands import main


def test_a_number_s_name_gives_its_formula_its_source_and_its_tests(capsys):
    assert main(["handbook", "holding_torque"]) == 0
    said = capsys.readouterr().out

    assert "T = μ π d² L p/2" in said
    assert "Shigley" in said
    assert "tests/engineering/test_holding.py::" in said
    # The rule that takes the number stands beside its formulas.
    assert "fit-holds-torque  (rule, edition 1)" in said


def test_no_words_list_everything_with_its_source(capsys):
    assert main(["handbook"]) == 0
    said = capsys.readouterr().out

    assert "runout-changed  (rule, edition 1;" in said
    assert said.count("Source: ") > 190


def test_entries_are_given_as_plain_data(capsys):
    assert main(["handbook", "runout-changed", "--json"]) == 0
    (one,) = json.loads(capsys.readouterr().out)

    assert one["kind"] == "rule"
    assert one["edition"] == "1"
    assert "mount_change.change_at_stations" in one["related"]


def test_words_that_stand_nowhere_are_answered_with_a_way_out(capsys):
    assert main(["handbook", "zyzzyva"]) == 2
    assert "“zyzzyva”. Try fewer words" in capsys.readouterr().err


@pytest.mark.parametrize("words", ["thermal bow", "soak.thermal_bow", "thermal_bow"])
def test_one_page_is_written_out_whole(words, capsys):
    assert main(["handbook", *words.split()]) == 0
    said = capsys.readouterr().out

    assert "y = α Δ T L²/(8 D)" in said
    assert "  result [m]: Bow towards the warm side" in said
