"""Every rule on made facts: within, outside, cannot tell, unknown, and exactly on the limit."""

from dataclasses import fields, replace
from typing import Any, NamedTuple

import pytest

from models.rules import ALL_RULES, rule
from models.rules.blunders import SURVEY_BLUNDERS
from models.rules.facts import (
    ClosureFacts,
    CoolFacts,
    FinalFacts,
    FitFacts,
    HeatFacts,
    InstrumentFacts,
    MountFacts,
    OrderFacts,
    PeopleFacts,
    ProgressFacts,
    SizeFacts,
    StandFacts,
    StationFacts,
    SurveyFacts,
)
from models.rules.rule import Subject, Verdict
from tests.rules import (
    acceptance_cases,
    balance_cases,
    blunder_cases,
    cold_cases,
    draw_up_cases,
    record_cases,
    strength_cases,
)

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
UM = 1e-6

GOOD: dict[type, Any] = {
    InstrumentFacts: InstrumentFacts(tag="OM-1", used_on="2026-11-02", due_on="2026-12-31"),
    SizeFacts: SizeFacts(
        feature="bore",
        mean_diameter=0.14985,
        least_diameter=0.149848,
        greatest_diameter=0.149852,
        nominal_diameter=0.150,
        part_temperature=20.5,
    ),
    FitFacts: FitFacts(
        least_interference=170 * UM,
        mean_interference=180 * UM,
        greatest_interference=190 * UM,
        expanded_uncertainty=5 * UM,
        least_allowed=150 * UM,
        greatest_allowed=215 * UM,
        proved=True,
    ),
    HeatFacts: HeatFacts(
        serial="W-4",
        target_temperature=250.0,
        highest_temperature=300.0,
        coldest_bore=255.0,
        hottest_part=270.0,
        spread=15.0,
        gauged_lands=(),
        refused_lands=(),
        ungauged_lands=("A", "B"),
        small_gauges=(),
        confirmed_serial="W-4",
        furnace_open_points=(),
        door_serial="W-4",
        door_open_points=(),
    ),
    MountFacts: MountFacts(
        outcome="seated",
        shoulder="felt all round",
        axial_position=0.4502,
        axial_target=0.450,
        axial_tolerance=0.0005,
    ),
    CoolFacts: CoolFacts(
        side_to_side=0.2,
        above_surroundings=1.0,
        side_to_side_allowed=0.5,
        above_surroundings_allowed=3.0,
        bow_per_kelvin=40 * UM,
    ),
    SurveyFacts: SurveyFacts(
        closed=True,
        stations_due=("J1", "S2", "J2"),
        stations_read=("J1", "S2", "J2"),
        set_up_differences=(),
        open_questions=(),
    ),
    ClosureFacts: ClosureFacts(station="S2", closure=1 * UM, closure_allowed=2 * UM),
    StationFacts: StationFacts(
        station="S2",
        change_tir=10 * UM,
        clock_angle=146.0,
        expanded_uncertainty=3 * UM,
        plain_change=2 * UM,
        limit=25 * UM,
        proved=True,
    ),
    FinalFacts: FinalFacts(
        station="S2", tir=20 * UM, expanded_uncertainty=3 * UM, limit=50 * UM, proved=True
    ),
    PeopleFacts: PeopleFacts(
        performers=("A",), inspectors=("B",), points_due=("inspector",), points_open=()
    ),
    OrderFacts: OrderFacts(entry="Mounted", out_of_order=""),
    ProgressFacts: ProgressFacts(steps_due=2, steps_waiting=()),
    StandFacts: StandFacts(visible_change=8 * UM, finest_limit=25 * UM),
    **strength_cases.GOOD,
    **draw_up_cases.GOOD,
    **cold_cases.GOOD,
    **blunder_cases.GOOD,
    **balance_cases.GOOD,
    **acceptance_cases.GOOD,
    **record_cases.GOOD,
}


class Case(NamedTuple):
    """One rule on good facts with a few changed; `kind` says what the row is for."""

    rule: str
    kind: str
    change: dict[str, Any]
    verdict: Verdict


CASES = [
    Case("instrument-in-calibration", "within", {}, IN),
    Case("instrument-in-calibration", "outside", {"used_on": "2027-01-01"}, OUT),
    Case("instrument-in-calibration", "on the limit", {"used_on": "2026-12-31"}, IN),
    Case("instrument-in-calibration", "unknown", {"due_on": None}, UNKNOWN),
    Case("sizes-plausible", "within", {}, IN),
    Case("sizes-plausible", "outside", {"least_diameter": 0.0059}, OUT),
    Case("sizes-plausible", "on the limit", {"greatest_diameter": 0.15075}, IN),
    Case("sizes-plausible", "just over", {"greatest_diameter": 0.15076}, OUT),
    Case("sizes-plausible", "unknown", {"least_diameter": None}, UNKNOWN),
    Case("part-temperature-known", "within", {}, IN),
    Case("part-temperature-known", "outside", {"part_temperature": 150.0}, OUT),
    Case("part-temperature-known", "on the limit", {"part_temperature": 60.0}, IN),
    Case("part-temperature-known", "unknown", {"part_temperature": None}, UNKNOWN),
    Case("seat-larger-than-bore", "within", {}, IN),
    Case("seat-larger-than-bore", "outside", {"mean_interference": -180 * UM}, OUT),
    Case("seat-larger-than-bore", "on the limit", {"mean_interference": 0.0}, OUT),
    Case("seat-larger-than-bore", "unknown", {"mean_interference": None}, UNKNOWN),
    Case("interference-within", "within", {}, IN),
    Case("interference-within", "outside", {"greatest_interference": 230 * UM}, OUT),
    Case("interference-within", "outside below", {"least_interference": 140 * UM}, OUT),
    Case("interference-within", "cannot tell", {"greatest_interference": 212 * UM}, DOUBT),
    Case("interference-within", "simple acceptance",
         {"greatest_interference": 212 * UM, "proved": False}, IN),
    Case("interference-within", "on the limit",
         {"greatest_interference": 210 * UM, "least_interference": 155 * UM}, IN),
    Case("interference-within", "unknown", {"least_interference": None}, UNKNOWN),
    Case("interference-within", "no uncertainty", {"expanded_uncertainty": None}, UNKNOWN),
    Case("confirmed-before-furnace", "within", {}, IN),
    Case("confirmed-before-furnace", "outside", {"confirmed_serial": "W-5"}, OUT),
    Case("confirmed-before-furnace", "a check is no", {"furnace_open_points": ("key",)}, OUT),
    Case("confirmed-before-furnace", "unknown", {"confirmed_serial": None}, UNKNOWN),
    Case("confirmed-before-door", "within", {}, IN),
    Case("confirmed-before-door", "outside", {"door_serial": "W-5"}, OUT),
    Case("confirmed-before-door", "unknown", {"door_serial": None}, UNKNOWN),
    Case("target-below-highest", "within", {}, IN),
    Case("target-below-highest", "outside", {"target_temperature": 301.0}, OUT),
    Case("target-below-highest", "on the limit", {"target_temperature": 300.0}, IN),
    Case("target-below-highest", "unknown", {"highest_temperature": None}, UNKNOWN),
    Case("not-overheated", "within", {}, IN),
    Case("not-overheated", "outside", {"hottest_part": 300.1}, OUT),
    Case("not-overheated", "on the limit", {"hottest_part": 300.0}, IN),
    Case("not-overheated", "unknown", {"hottest_part": None}, UNKNOWN),
    Case("bore-open", "hot bore in a cool disc",
         {"mean_temperature": 100.0}, OUT),
    Case("bore-open", "warm through, not gauged",
         {"mean_temperature": 250.0}, IN),
    Case("bore-open", "hot bore in a cool disc, gauged",
         {"mean_temperature": 100.0, "gauged_lands": ("A", "B"), "ungauged_lands": ()}, IN),
    Case("bore-open", "within", {}, IN),
    Case("bore-open", "outside", {"coldest_bore": 249.0}, OUT),
    Case("bore-open", "on the limit", {"coldest_bore": 250.0}, IN),
    Case("bore-open", "gauge refused", {"refused_lands": ("B",)}, OUT),
    Case("bore-open", "gauge entered everywhere, though cooler",
         {"gauged_lands": ("A", "B"), "ungauged_lands": (), "coldest_bore": 240.0}, IN),
    Case("bore-open", "gauge too small does not count",
         {"gauged_lands": ("A", "B"), "ungauged_lands": (), "small_gauges": ("B",),
          "coldest_bore": 240.0}, OUT),
    Case("bore-open", "unknown", {"coldest_bore": None}, UNKNOWN),
    Case("bore-open", "no target", {"target_temperature": None}, UNKNOWN),
    Case("heated-through", "within", {}, IN),
    Case("heated-through", "cannot tell", {"spread": 40.0}, DOUBT),
    Case("heated-through", "on the limit", {"spread": 25.0}, IN),
    Case("heated-through", "gauged", {"spread": 40.0, "gauged_lands": ("A",),
                                      "ungauged_lands": ()}, IN),
    Case("heated-through", "unknown", {"spread": None}, UNKNOWN),
    Case("part-seated", "within", {}, IN),
    Case("part-seated", "outside", {"outcome": "stopped short"}, OUT),
    Case("part-seated", "gap at the shoulder", {"shoulder": "gap"}, OUT),
    Case("part-seated", "shoulder not felt", {"shoulder": "not judged"}, UNKNOWN),
    Case("part-seated", "unknown", {"outcome": None}, UNKNOWN),
    Case("axial-position-right", "within", {}, IN),
    Case("axial-position-right", "outside", {"axial_position": 0.4506}, OUT),
    Case("axial-position-right", "on the limit", {"axial_position": 0.4505}, IN),
    Case("axial-position-right", "unknown", {"axial_position": None}, UNKNOWN),
    Case("may-be-read", "within", {}, IN),
    Case("may-be-read", "outside", {"side_to_side": 0.6}, OUT),
    Case("may-be-read", "warm all round", {"above_surroundings": 3.1}, OUT),
    Case("may-be-read", "on the limit", {"side_to_side": 0.5, "above_surroundings": 3.0}, IN),
    Case("may-be-read", "unknown", {"side_to_side": None}, UNKNOWN),
    Case("survey-whole", "within", {}, IN),
    Case("survey-whole", "station missing", {"stations_read": ("J1", "J2")}, UNKNOWN),
    Case("survey-whole", "question open", {"open_questions": ("S2 at 90°",)}, UNKNOWN),
    Case("survey-whole", "unknown", {"closed": None}, UNKNOWN),
    Case("set-up-same", "within", {}, IN),
    Case("set-up-same", "cannot tell", {"set_up_differences": ("supports",)}, DOUBT),
    Case("set-up-same", "unknown", {"set_up_differences": None}, UNKNOWN),
    Case("circle-closed", "within", {}, IN),
    Case("circle-closed", "cannot tell", {"closure": -3 * UM}, DOUBT),
    Case("circle-closed", "on the limit", {"closure": -2 * UM}, IN),
    Case("circle-closed", "unknown", {"closure": None}, UNKNOWN),
    Case("runout-changed", "within", {}, IN),
    Case("runout-changed", "outside", {"change_tir": 40 * UM}, OUT),
    Case("runout-changed", "cannot tell", {"change_tir": 23 * UM}, DOUBT),
    Case("runout-changed", "on the limit", {"change_tir": 25 * UM, "expanded_uncertainty": 0}, IN),
    Case("runout-changed", "on the guarded limit", {"change_tir": 22 * UM}, IN),
    Case("runout-changed", "simple acceptance", {"change_tir": 24 * UM, "proved": False}, IN),
    Case("runout-changed", "same total, high spot turned",
         {"change_tir": 40 * UM, "plain_change": 0.0}, OUT),
    Case("runout-changed", "totals alone, surely within",
         {"change_tir": None, "least_change": 4 * UM, "greatest_change": 20 * UM}, IN),
    Case("runout-changed", "totals alone, surely outside",
         {"change_tir": None, "least_change": 30 * UM, "greatest_change": 90 * UM}, OUT),
    Case("runout-changed", "totals alone, cannot tell",
         {"change_tir": None, "least_change": 4 * UM, "greatest_change": 90 * UM}, DOUBT),
    Case("runout-changed", "unknown", {"change_tir": None}, UNKNOWN),
    Case("runout-changed", "no limit", {"limit": None}, UNKNOWN),
    Case("runout-drifted", "within", {}, IN),
    Case("runout-drifted", "outside", {"change_tir": 40 * UM}, OUT),
    Case("runout-drifted", "cannot tell", {"change_tir": 24 * UM}, DOUBT),
    Case("runout-drifted", "on the limit", {"change_tir": 25 * UM, "expanded_uncertainty": 0}, IN),
    Case("runout-drifted", "unknown", {"change_tir": None}, UNKNOWN),
    Case("seat-came-back", "within", {}, IN),
    Case("seat-came-back", "outside", {"change_tir": 40 * UM}, OUT),
    Case("seat-came-back", "cannot tell", {"change_tir": 24 * UM}, DOUBT),
    Case("seat-came-back", "on the limit", {"change_tir": 25 * UM, "expanded_uncertainty": 0}, IN),
    Case("seat-came-back", "unknown", {"change_tir": None}, UNKNOWN),
    Case("stand-sees-limit", "within", {}, IN),
    Case("stand-sees-limit", "cannot tell", {"visible_change": 26 * UM}, DOUBT),
    Case("stand-sees-limit", "on the limit", {"visible_change": 25 * UM}, IN),
    Case("stand-sees-limit", "unknown", {"visible_change": None}, UNKNOWN),
    Case("final-runout", "within", {}, IN),
    Case("final-runout", "outside", {"tir": 60 * UM}, OUT),
    Case("final-runout", "cannot tell", {"tir": 49 * UM}, DOUBT),
    Case("final-runout", "on the limit", {"tir": 50 * UM, "expanded_uncertainty": 0}, IN),
    Case("final-runout", "unknown", {"tir": None}, UNKNOWN),
    Case("performer-not-inspector", "within", {}, IN),
    Case("performer-not-inspector", "outside", {"inspectors": ("A",)}, OUT),
    Case("performer-not-inspector", "nobody inspected yet", {"inspectors": ()}, IN),
    Case("performer-not-inspector", "unknown", {"performers": None}, UNKNOWN),
    Case("points-signed", "within", {}, IN),
    Case("points-signed", "open", {"points_open": ("inspector",)}, UNKNOWN),
    Case("points-signed", "unknown", {"points_open": None}, UNKNOWN),
    Case("in-order", "within", {}, IN),
    Case("in-order", "cannot tell", {"out_of_order": "the crane was leaving"}, DOUBT),
    Case("in-order", "unknown", {"out_of_order": None}, UNKNOWN),
    Case("every-step-settled", "within", {}, IN),
    Case("every-step-settled", "waiting", {"steps_waiting": ("Impeller 2",)}, UNKNOWN),
    Case("every-step-settled", "unknown", {"steps_due": None}, UNKNOWN),
    *(Case(*row) for row in strength_cases.CASES),
    *(Case(*row) for row in draw_up_cases.CASES),
    *(Case(*row) for row in cold_cases.CASES),
    *(Case(*row) for row in blunder_cases.CASES),
    *(Case(*row) for row in balance_cases.CASES),
    *(Case(*row) for row in acceptance_cases.CASES),
    *(Case(*row) for row in record_cases.CASES),
]  # fmt: skip

# Rules that compare a number with a limit, and so need a case exactly on it.
_COMPARING = {case.rule for case in CASES if case.kind == "on the limit"}
# Statements that are true, doubtful or missing; none of their cases is a stop.
_NEVER_STOPS = {"survey-whole", "set-up-same", "circle-closed", "heated-through", "points-signed",
                "piston-held", "second-survey-proves", "in-order", "every-step-settled",
                "balance-done", "stand-sees-limit", "size-not-taken-hot", "instrument-still-good",
                "indicator-resolves-limit", "entered-in-time", "record-complete",
                *(one.id for one in SURVEY_BLUNDERS)}  # fmt: skip


@pytest.mark.parametrize("case", CASES, ids=lambda case: f"{case.rule}: {case.kind}")
def test_rule_gives_the_verdict_a_person_would(case: Case) -> None:
    judged = rule(case.rule)
    facts = replace(GOOD[judged.facts], **case.change)

    finding = judged.apply(facts, Subject())

    assert finding.verdict is case.verdict, finding.message


@pytest.mark.parametrize("judged", ALL_RULES, ids=lambda judged: judged.id)
def test_rule_has_cases_for_all_that_can_happen(judged: Any) -> None:
    mine = [case for case in CASES if case.rule == judged.id]
    verdicts = {case.verdict for case in mine}

    assert {IN, UNKNOWN} <= verdicts
    assert any(case.kind == "unknown" and case.verdict is UNKNOWN for case in mine)
    if judged.id not in _NEVER_STOPS:
        assert OUT in verdicts
    limits = {"limit", "closure_allowed", "target_temperature", "side_to_side_allowed",
              "axial_tolerance", "least_allowed", "due_on", "hub_yield_strength",
              "shaft_yield_strength", "interference_at_trip", "torque_to_carry",
              "force_demanded", "force_demanded_at_speed", "shear_limit",
              "least_advance_allowed", "contact_wanted", "seating_loss", "hold_wanted",
              "agreement"}  # fmt: skip
    if limits & set(judged.inputs):
        assert judged.id in _COMPARING


def test_no_two_rules_share_an_id() -> None:
    ids = [one.id for one in ALL_RULES]

    assert len(ids) == len(set(ids))


@pytest.mark.parametrize("judged", ALL_RULES, ids=lambda judged: judged.id)
def test_every_input_of_a_rule_is_a_fact_with_words_and_a_unit(judged: Any) -> None:
    facts = {one.name: one for one in fields(judged.facts)}

    for name in judged.inputs:
        assert name in facts
        if name != "units":
            assert facts[name].metadata["words"]
            assert facts[name].metadata["unit"]


@pytest.mark.parametrize("case", CASES, ids=lambda case: f"{case.rule}: {case.kind}")
def test_message_is_one_or_more_whole_sentences(case: Case) -> None:
    judged = rule(case.rule)

    message = judged.apply(replace(GOOD[judged.facts], **case.change), Subject()).message

    assert message[0].isupper() or message[0].isdigit() or message.split()[0] in ("OM-1",)
    assert message.rstrip("”").endswith((".", "?"))
    assert "None" not in message
    assert "nan" not in message.split()


def test_a_missing_input_is_named_in_words() -> None:
    finding = rule("bore-open").apply(replace(GOOD[HeatFacts], target_temperature=None), Subject())

    assert "the temperature that opens the bore" in finding.message


def test_worst_of_nothing_is_not_judged_and_never_within() -> None:
    assert Verdict.worst([]) is UNKNOWN
    assert Verdict.worst([IN, UNKNOWN]) is UNKNOWN
    assert Verdict.worst([IN, DOUBT, UNKNOWN]) is DOUBT
    assert Verdict.worst([OUT, DOUBT]) is OUT


@pytest.mark.parametrize("nanometres", range(1, 400, 7))
def test_a_value_exactly_on_its_limit_is_within_whatever_its_float(nanometres: int) -> None:
    seat = (150_000_000 + nanometres) * 1e-9
    limit = nanometres * 1e-9
    facts = replace(
        GOOD[StationFacts],
        change_tir=seat - 150_000_000 * 1e-9,
        expanded_uncertainty=0.0,
        limit=limit,
    )

    assert rule("runout-changed").apply(facts, Subject()).verdict is IN
