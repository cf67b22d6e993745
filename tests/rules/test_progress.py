"""What may start and what may not: every refusal by its name, and the way through."""

from dataclasses import replace
from typing import Any, NamedTuple

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.rules.progress import (
    Act,
    AttemptProgress,
    BuildProgress,
    ItemProgress,
    NextAct,
    Stage,
    may,
    next_act,
)
from models.rules.rule import Verdict

IN, OUT, DOUBT, UNKNOWN = (
    Verdict.WITHIN,
    Verdict.OUTSIDE,
    Verdict.CANNOT_TELL,
    Verdict.NOT_JUDGED,
)
STEPS = (("one", "Impeller 1"), ("two", "Impeller 2"))

READY = ItemProgress(
    key="w",
    name="Impeller 1",
    is_hot=True,
    fit=IN,
    furnace=IN,
    target=IN,
    opening=IN,
    door=IN,
    axial_due=True,
)
ON = replace(READY, mounted="seated", seated=IN, axial_due=False)
OPEN = AttemptProgress(step="one", number=1, items=(READY,))
COLD = AttemptProgress(step="one", number=1, items=(ON,), cooling=IN)
DONE = replace(COLD, verdict=IN, outcome="within limits", performed=True)
FAILED = replace(
    COLD, verdict=OUT, items=(replace(ON, removed=True),), seat_survey_closed=True,
    outcome="removed",
)  # fmt: skip


def build(*attempts: AttemptProgress, **more: Any) -> BuildProgress:
    return BuildProgress(steps=STEPS, attempts=attempts, **{"bare_shaft_surveyed": True, **more})


class Refused(NamedTuple):
    name: str
    build: BuildProgress
    act: Act
    step: str = "one"
    item: str | None = "w"


def with_item(**change: Any) -> BuildProgress:
    return build(replace(OPEN, items=(replace(READY, **change),)))


REFUSED = [
    Refused("bare-shaft-not-surveyed", build(bare_shaft_surveyed=False), Act.OPEN_ATTEMPT),
    Refused("shaft-not-bare", build(OPEN), Act.SURVEY_BARE_SHAFT),
    Refused("step-before-not-settled", build(COLD), Act.OPEN_ATTEMPT, "two"),
    Refused("step-before-not-settled", build(FAILED), Act.OPEN_ATTEMPT, "two"),
    Refused("step-before-not-signed", build(replace(DONE, performed=False)), Act.OPEN_ATTEMPT,
            "two"),
    Refused("point-open", build(replace(DONE, points_open=("inspector to sign",))),
            Act.OPEN_ATTEMPT, "two"),
    Refused("attempt-open", build(OPEN), Act.OPEN_ATTEMPT),
    Refused("step-settled", build(DONE), Act.OPEN_ATTEMPT),
    Refused("engineer-decides", build(FAILED, replace(FAILED, number=2)), Act.OPEN_ATTEMPT),
    Refused("no-attempt-open", build(), Act.HEAT),
    Refused("no-attempt-open", build(DONE), Act.SURVEY),
    Refused("no-such-item", build(OPEN), Act.HEAT, "one", "x"),
    Refused("part-is-on", build(COLD), Act.MEASURE),
    Refused("part-is-on", build(COLD), Act.MOUNT),
    Refused("sizes-missing", with_item(sizes_due=(("A", "bore"),)), Act.CONFIRM_FURNACE),
    Refused("fit-not-within", with_item(fit=OUT), Act.CONFIRM_FURNACE),
    Refused("fit-not-within", with_item(fit=DOUBT), Act.HEAT),
    Refused("fit-not-within", with_item(fit=UNKNOWN), Act.MOUNT),
    Refused("not-confirmed-before-furnace", with_item(furnace=UNKNOWN), Act.HEAT),
    Refused("not-confirmed-before-furnace", with_item(furnace=OUT), Act.MOUNT),
    Refused("too-hot", with_item(target=OUT), Act.HEAT),
    Refused("bore-not-open", with_item(opening=OUT), Act.CONFIRM_DOOR),
    Refused("bore-not-open", with_item(opening=UNKNOWN), Act.MOUNT),
    Refused("not-confirmed-before-door", with_item(door=UNKNOWN), Act.MOUNT),
    Refused("part-not-on", build(OPEN), Act.MEASURE_AXIAL),
    Refused("part-not-on", build(OPEN), Act.SURVEY, "one", None),
    Refused("part-not-on", build(OPEN), Act.COOL, "one", None),
    Refused("still-warm", build(replace(COLD, cooling=OUT)), Act.SURVEY, "one", None),
    Refused("still-warm", build(replace(COLD, cooling=UNKNOWN)), Act.SURVEY, "one", None),
    Refused("nothing-removed", build(COLD), Act.SURVEY_SEAT, "one", None),
    Refused("seat-not-surveyed",
            build(replace(COLD, verdict=OUT, items=(replace(ON, removed=True),))),
            Act.SETTLE, "one", None),
    Refused("remount-required", build(replace(COLD, verdict=OUT)), Act.SETTLE, "one", None),
    Refused("not-judged-within", build(COLD), Act.SETTLE, "one", None),
    Refused("not-judged-within", build(replace(COLD, verdict=DOUBT)), Act.SETTLE, "one", None),
    Refused("not-settled", build(COLD), Act.SIGN, "one", None),
]  # fmt: skip


@pytest.mark.parametrize("case", REFUSED, ids=lambda case: f"{case.name}: {case.act.value}")
def test_an_act_out_of_its_order_is_refused_by_name(case: Refused) -> None:
    permission = may(case.build, case.act, step=case.step, item=case.item)

    assert not permission.allowed
    assert permission.name == case.name
    assert permission.words.endswith(".")


@pytest.mark.parametrize("attempts", [(), (OPEN,), (COLD,), (DONE,), (FAILED, FAILED)])
def test_nothing_ever_stands_before_a_removal(attempts: tuple[AttemptProgress, ...]) -> None:
    assert may(build(*attempts), Act.REMOVE, step="one", item="w").allowed


def test_the_engineer_can_let_a_third_attempt_begin() -> None:
    twice = (FAILED, replace(FAILED, number=2))

    decided = build(*twice, engineer_decided=frozenset({("one", 2)}))

    assert may(decided, Act.OPEN_ATTEMPT, step="one").allowed
    assert next_act(build(*twice)).act is Act.NOTHING


class Turn(NamedTuple):
    what: str
    build: BuildProgress
    stage: Stage
    act: Act


TURNS = [
    Turn("nothing yet", build(bare_shaft_surveyed=False), Stage.RUNOUT, Act.SURVEY_BARE_SHAFT),
    Turn("bare shaft read", build(), Stage.SIZES, Act.OPEN_ATTEMPT),
    Turn("sizes missing", with_item(sizes_due=(("A", "seat"),)), Stage.SIZES, Act.MEASURE),
    Turn("tight", with_item(fit=OUT), Stage.FIT, Act.DECIDE_FIT),
    Turn("not confirmed", with_item(furnace=UNKNOWN), Stage.HEAT, Act.CONFIRM_FURNACE),
    Turn("cold", with_item(opening=UNKNOWN), Stage.HEAT, Act.HEAT),
    Turn("not hot enough", with_item(opening=OUT), Stage.HEAT, Act.HEAT),
    Turn("hot", with_item(door=UNKNOWN), Stage.HEAT, Act.CONFIRM_DOOR),
    Turn("open", build(OPEN), Stage.MOUNT, Act.MOUNT),
    Turn("on", with_item(mounted="seated", seated=UNKNOWN), Stage.MOUNT, Act.COMPLETE_MOUNT),
    Turn(
        "on and cold",
        build(replace(COLD, items=(replace(ON, axial_due=True),))),
        Stage.COOL,
        Act.MEASURE_AXIAL,
    ),
    Turn("stopped short", with_item(mounted="stopped short", seated=OUT), Stage.RUNOUT,
         Act.REMOVE),
    Turn("warm", build(replace(COLD, cooling=OUT)), Stage.COOL, Act.COOL),
    Turn("cooled", build(COLD), Stage.RUNOUT, Act.SURVEY),
    Turn("moved", build(replace(COLD, verdict=OUT)), Stage.RUNOUT, Act.REMOVE),
    Turn("in doubt", build(replace(COLD, verdict=DOUBT)), Stage.RUNOUT, Act.SURVEY),
    Turn("taken off", build(replace(COLD, verdict=OUT, items=(replace(ON, removed=True),))),
         Stage.RUNOUT, Act.SURVEY_SEAT),
    Turn("seat read", build(replace(FAILED, outcome=None)), Stage.SETTLED, Act.SETTLE),
    Turn("came off", build(FAILED), Stage.SIZES, Act.OPEN_ATTEMPT),
    Turn("within", build(replace(COLD, verdict=IN)), Stage.SETTLED, Act.SETTLE),
    Turn("settled", build(replace(DONE, performed=False)), Stage.SETTLED, Act.SIGN),
    Turn("signed", build(DONE), Stage.SIZES, Act.OPEN_ATTEMPT),
    Turn("all done", build(DONE, replace(DONE, step="two")), Stage.SETTLED, Act.NOTHING),
]  # fmt: skip


@pytest.mark.parametrize("turn", TURNS, ids=lambda turn: turn.what)
def test_there_is_one_thing_to_do_now(turn: Turn) -> None:
    found = next_act(turn.build)

    assert (found.stage, found.act) == (turn.stage, turn.act), found.words


def test_the_second_attempt_is_numbered_two() -> None:
    assert next_act(build(FAILED)).attempt == 2


VERDICTS = st.sampled_from([None, IN, OUT, DOUBT, UNKNOWN])


@st.composite
def builds(draw: st.DrawFn) -> BuildProgress:
    mounted = draw(st.sampled_from([None, "seated", "stopped short"]))
    item = ItemProgress(
        key="w",
        name="Impeller 1",
        is_hot=draw(st.booleans()),
        sizes_due=draw(st.sampled_from([(), (("A", "seat"),)])),
        fit=draw(VERDICTS),
        furnace=draw(VERDICTS),
        target=draw(VERDICTS),
        opening=draw(VERDICTS),
        door=draw(VERDICTS),
        mounted=mounted,
        seated={None: None, "seated": IN, "stopped short": OUT}[mounted],
        axial_due=draw(st.booleans()),
        removed=mounted is not None and draw(st.booleans()),
    )
    attempt = AttemptProgress(
        step="one",
        number=1,
        items=(item,),
        cooling=draw(VERDICTS),
        verdict=draw(VERDICTS) if mounted else None,
        seat_survey_closed=item.removed and draw(st.booleans()),
    )
    return build(attempt)


@given(builds())
def test_the_one_thing_to_do_is_always_allowed(one: BuildProgress) -> None:
    found: NextAct = next_act(one)
    if found.act in (Act.DECIDE_FIT, Act.NOTHING):
        return

    permission = may(one, found.act, step=found.step or "one", item=found.item)

    assert permission.allowed, (found, permission)


@given(builds())
def test_the_next_part_never_starts_while_the_last_is_open(one: BuildProgress) -> None:
    assert not may(one, Act.OPEN_ATTEMPT, step="two").allowed


@given(builds())
def test_a_step_settles_only_within_limits_or_after_its_seat_was_read(one: BuildProgress) -> None:
    if may(one, Act.SETTLE, step="one").allowed:
        attempt = one.attempts[0]
        assert attempt.verdict is IN or (attempt.is_coming_off and attempt.seat_survey_closed)
