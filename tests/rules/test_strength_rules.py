"""What the rules on strength say beyond their verdict, and that each is held to every demand."""

from dataclasses import fields, replace

import pytest

from models.rules import rule, strength
from models.rules.rule import Finding, Subject, Verdict
from models.units import inch_set
from tests.rules.strength_cases import CASES, GOOD


def judged(rule_id: str, **change: object) -> Finding:
    one = rule(rule_id)
    return one.apply(replace(GOOD[one.facts], **change), Subject())


@pytest.mark.parametrize("one", strength.RULES, ids=lambda one: one.id)
def test_each_rule_is_shown_within_outside_in_doubt_unknown_and_on_its_limit(one) -> None:
    mine = [(kind, verdict) for rule_id, kind, _, verdict in CASES if rule_id == one.id]

    assert {verdict for _, verdict in mine} == set(Verdict)
    assert ("unknown", Verdict.NOT_JUDGED) in mine
    assert ("on the limit", Verdict.WITHIN) in mine


@pytest.mark.parametrize("one", strength.RULES, ids=lambda one: one.id)
def test_each_missing_input_is_not_judged_and_named(one) -> None:
    words = {fact.name: fact.metadata.get("words") for fact in fields(one.facts)}

    for name in set(one.inputs) - one.may_lack - {"units"}:
        finding = judged(one.id, **{name: None})
        assert finding.verdict is Verdict.NOT_JUDGED
        assert words[name] in finding.message


def test_a_fit_that_opens_says_at_which_speed() -> None:
    # 1000 rad/s · 30/π = 9549.3 r/min, by hand.
    finding = judged("fit-stays-closed-at-trip", interference_at_trip=-20e-6, release_speed=1000.0)

    assert "opened by 20.0 µm" in finding.message
    assert "opens at 9549 r/min" in finding.message


def test_clearance_in_doubt_is_not_called_interference() -> None:
    assert (
        "3.0 µm (0.0001 in) of clearance"
        in judged("fit-stays-closed-at-trip", interference_at_trip=-3e-6).message
    )


def test_a_holding_finding_shows_the_coefficient_and_its_source() -> None:
    assert "Friction (0.12, DIN 7190, from memory)" in judged("fit-holds-torque").message


def test_an_inch_job_reads_its_own_units_first() -> None:
    # 366 MPa / 6.894757 MPa per ksi = 53.08 ksi, by hand.
    assert "53.1 ksi (366.0 MPa)" in judged("hub-not-yielding", units=inch_set).message


def test_room_is_what_is_left_to_the_limit() -> None:
    assert judged("hub-not-yielding").computed["room"] == pytest.approx(134e6)
    assert judged("fit-holds-torque", torque_to_carry=-1000.0).computed["room"] == pytest.approx(
        4000.0
    )
