"""Stored verdicts stay; what today's rules say otherwise is listed beside them."""

import dataclasses

import msgspec
import pytest

from models import rules
from models.acts.verdicts import stored_verdict
from models.assess import assess
from models.assess.rejudged import rejudged
from models.job import Job
from models.rules.rule import Judgement, Verdict
from sample_data.load import compressor, pump

AT = "2026-12-01T08:00:00+01:00"


def _with_verdicts(job: Job) -> Job:
    view = assess(job)
    kept = tuple(stored_verdict(one, "e001", AT) for one in view.findings)
    return msgspec.structs.replace(job, verdicts=kept)


@pytest.mark.parametrize("job", [compressor(), pump()], ids=["compressor", "pump"])
def test_the_same_rules_say_the_same(job: Job) -> None:
    told = _with_verdicts(job)
    assert len(told.verdicts) > 100
    assert list(rejudged(told)) == []


def test_a_stricter_rule_is_listed_with_old_and_new(monkeypatch: pytest.MonkeyPatch) -> None:
    told = _with_verdicts(compressor())
    old = rules.rule("runout-changed")

    def never(**_: object) -> Judgement:
        return Judgement(Verdict.OUTSIDE, "Nothing is ever good enough.")

    never.__signature__ = __import__("inspect").signature(old.judge)  # type: ignore[attr-defined]
    strict = dataclasses.replace(old, judge=never, edition=old.edition + 1)
    changed = tuple(strict if one is old else one for one in rules.ALL_RULES)
    monkeypatch.setattr("models.assess.rejudged.ALL_RULES", changed)

    found = list(rejudged(told))

    expected = [one.id for one in told.verdicts if one.rule == old.id and one.verdict == "within"]
    assert [one.stored.id for one in found] == expected
    assert expected
    assert {(one.stored.verdict, one.verdict) for one in found} == {("within", "outside")}
    assert {one.edition for one in found} == {old.edition + 1}


def test_a_rule_that_went_and_a_fact_that_was_not_stored_are_told() -> None:
    told = _with_verdicts(compressor())
    gone = msgspec.structs.replace(told.verdicts[0], rule="went-away")
    bare = next(one for one in told.verdicts if one.rule == "part-seated")
    lacking = msgspec.structs.replace(bare, inputs={"outcome": "seated"})
    found = list(rejudged(msgspec.structs.replace(told, verdicts=(gone, lacking))))
    assert [one.verdict for one in found] == ["", ""]
    assert "went-away" in found[0].message
    assert "shoulder" in found[1].message
