"""Each mistake that a survey can show: a made example that its rule questions, and a clean one.

The surveys are those of a random rotor of known truth; each mistake is made on the typed readings,
as a person makes it.
"""

import msgspec
import pytest

from models.assess import assess
from models.job import Question, RunoutSurvey, StationReadings
from models.rules.blunders import SURVEY_BLUNDERS
from models.rules.rule import Verdict
from tests.journeys.random_rotors import START, make

SEED = 11
IDS = [one.id for one in SURVEY_BLUNDERS]


def scaled(factor, decimals=6):
    def work(stations, earlier):
        return tuple(
            each(one, [f"{float(text) * factor:.{decimals}f}" for text in whole(one)])
            for one in stations
        )

    return work


def whole(one):
    return [*one.typed, one.again]


def each(one, texts):
    return msgspec.structs.replace(one, typed=tuple(texts[:-1]), again=texts[-1])


def sign(stations, earlier):
    return tuple(each(one, [f"{-float(text):.4f}" for text in whole(one)]) for one in stations)


def mirrored(stations, earlier):
    return tuple(each(one, [one.typed[0], *reversed(one.typed[1:]), one.again]) for one in stations)


def turned(stations, earlier):
    return tuple(each(one, [*one.typed[3:], *one.typed[:3], one.typed[3]]) for one in stations)


def skipped(stations, earlier):
    first, second, *rest = stations
    late = each(second, [*second.typed[1:], second.typed[0], second.typed[1]])
    return (first, late, *rest)


def swapped(stations, earlier):
    first, second, third, *rest = stations
    return (
        first,
        StationReadings(station=second.station, typed=third.typed, again=third.again),
        StationReadings(station=third.station, typed=second.typed, again=second.again),
        *rest,
    )


def copied(stations, earlier):
    kept = {one.station: one for one in earlier}
    return tuple(kept.get(one.station, one) for one in stations)


def wild(stations, earlier):
    first, second, *rest = stations
    texts = whole(second)
    texts[2] = f"{float(texts[2]) + 0.0045:.4f}"
    return (first, each(second, texts), *rest)


def impossible(stations, earlier):
    first, second, *rest = stations
    texts = whole(second)
    texts[1] = "0.25"
    return (first, each(second, texts), *rest)


MADE = {
    "reading-possible": impossible,
    "reading-belongs": wild,
    "survey-read-anew": copied,
    "sign-kept": sign,
    "marks-counted-right": mirrored,
    "reference-mark-kept": turned,
    "no-mark-skipped": skipped,
    "stations-in-place": swapped,
    "decimal-kept": scaled(0.1),
    "unit-kept": scaled(25.4, 4),
    "totals-not-offsets": scaled(2.0, 4),
}


def judged(work=None, kept=()):
    job = make(SEED).job
    surveys = [one for one in job.entries if isinstance(one, RunoutSurvey)]
    last = surveys[-1]
    if work is not None:
        stations = work(last.stations, surveys[0].stations)
        changed = msgspec.structs.replace(last, stations=stations, kept=tuple(kept))
        entries = tuple(changed if one is last else one for one in job.entries)
        job = msgspec.structs.replace(job, entries=entries)
    attempt = assess(job).attempts[0]
    return {one.rule.id: one for one in attempt.findings if one.rule.id in IDS}


def test_every_mistake_has_a_made_example():
    assert MADE.keys() == set(IDS)


def test_a_clean_survey_is_within_every_one_of_them():
    found = judged()
    assert list(found) == IDS
    assert {one.verdict for one in found.values()} == {Verdict.WITHIN}


@pytest.mark.parametrize("rule_id", IDS)
def test_the_made_mistake_is_questioned_by_its_own_rule(rule_id):
    found = judged(MADE[rule_id])
    assert found[rule_id].verdict is Verdict.CANNOT_TELL
    assert found[rule_id].message.endswith(("?", "."))


def test_an_answer_settles_the_question_and_stands_in_the_finding():
    first = judged(MADE["sign-kept"])["sign-kept"]
    answer = Question(
        where=("survey",), question=first.message, answer="turned round, and noted", by="AT",
        at=START,
    )  # fmt: skip
    settled = judged(MADE["sign-kept"], kept=[answer])["sign-kept"]
    assert settled.verdict is Verdict.WITHIN
    assert settled.message == "Questioned, and answered: turned round, and noted."
