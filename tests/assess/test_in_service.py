"""A rotor that comes back: what moved since it was left, made by hand and found again."""

import cmath
import math

import msgspec
import pytest

from app.commands import main
from models import jobfile
from models.assess import assess
from models.assess.in_service import InServiceError, in_service
from models.job import Place, RunoutSurvey, StationReadings
from models.units import Length
from sample_data.load import compressor, pump

LEFT = pump()
PLAN = LEFT.plan
MICRON = 1e-6
FINAL = next(one for one in LEFT.entries if getattr(one, "purpose", None) == "final")
RIGID = 30 * MICRON * cmath.exp(2.1j), 11 * MICRON * cmath.exp(-0.4j)


def back(moved, *, rotor=None, stations=None):
    """The same rotor back in a later job: the final readings, laid otherwise, plus what moved.

    The rotor lies on other blocks, so the whole line is shifted and tilted: that is no change.
    """
    read = []
    for one in FINAL.stations:
        place = PLAN.station(one.station).position.si
        vector = RIGID[0] + RIGID[1] * place + moved.get(one.station, 0j)
        typed = tuple(
            None if text is None else f"{as_typed(text, vector, math.radians(mark.si)):.7f}"
            for text, mark in zip(one.typed, FINAL.angles, strict=True)
        )
        read.append(StationReadings(station=one.station, typed=typed, again=typed[0]))
    survey = msgspec.structs.replace(
        FINAL, id="as received", place=Place(kind="as received"), stations=tuple(read),
        corrections=(),
    )  # fmt: skip
    plan = msgspec.structs.replace(PLAN, **({"rotor": rotor} if rotor else {}))
    if stations is not None:
        plan = msgspec.structs.replace(plan, stations=stations)
    return msgspec.structs.replace(
        LEFT, number="back again", plans=(plan,), entries=(survey,), verdicts=()
    )


def as_typed(text, vector, turn):
    unit = Length.read("1", FINAL.unit).si
    return float(text) + (vector * cmath.exp(-1j * turn)).real / unit


JOURNALS = {PLAN.first_journal, PLAN.second_journal}
INNER = next(one.station for one in FINAL.stations if one.station not in JOURNALS)


def test_a_rotor_that_only_lies_otherwise_has_not_moved():
    found = in_service(assess(LEFT), back({}))
    assert found.moved == ()
    assert found.sentence.startswith("No station moved")
    assert all(one.change.tir < 0.05 * MICRON for one in found.stations)


@pytest.mark.parametrize("angle", [0.0, 75.0, 200.0])
def test_what_moved_comes_back_in_size_and_angle(angle):
    made = 60 * MICRON * cmath.exp(1j * math.radians(angle))
    found = in_service(assess(LEFT), back({INNER: made}))
    (only,) = found.moved
    assert only.change.key == INNER
    # A total is twice the offset.
    assert only.change.tir == pytest.approx(120 * MICRON, abs=0.1 * MICRON)
    assert cmath.exp(1j * math.radians(only.change.clock_angle_degrees - angle)).real > 0.9999
    assert found.sentence.startswith(f"In service {INNER}: ")


def test_it_stands_beside_the_least_mean_interference_of_the_nearest_part():
    view = assess(LEFT)
    found = in_service(view, back({INNER: 60 * MICRON}))
    (only,) = found.moved
    place = PLAN.station(INNER).position.si
    items = [item for step in PLAN.steps for item in step.items]
    gaps = {
        one.key: max(one.outline.start.si - place, place - one.outline.end.si, 0) for one in items
    }
    assert gaps[only.item] == min(gaps.values())
    assert only.item in only.sentence


def test_another_reference_mark_leaves_totals_alone():
    rotor = msgspec.structs.replace(PLAN.rotor, reference_mark="another keyway")
    found = in_service(assess(LEFT), back({INNER: 60 * MICRON}, rotor=rotor))
    assert found.moved == ()
    assert any("reference mark" in words for words in found.cautions)
    assert found.sentence.startswith("What moved in service cannot be told")


def test_a_station_that_lies_elsewhere_is_left_out_and_told():
    stations = tuple(
        msgspec.structs.replace(one, position=Length.read(f"{one.position.si * 1e3 + 2.5}", "mm"))
        if one.key == INNER
        else one
        for one in PLAN.stations
    )
    found = in_service(assess(LEFT), back({INNER: 60 * MICRON}, stations=stations))
    assert INNER not in {one.change.key for one in found.stations}
    assert any(words.startswith(INNER) for words in found.cautions)


@pytest.mark.parametrize(
    ("earlier", "present", "said"),
    [
        (compressor(), back({}), "two jobs of one rotor"),
        (back({}), back({}), "no closed final survey"),
        (LEFT, LEFT, "no closed survey as received"),
    ],
)
def test_what_cannot_be_compared_is_said_with_the_way_out(earlier, present, said):
    with pytest.raises(InServiceError, match=said):
        in_service(assess(earlier), present)


@pytest.mark.parametrize(("moved", "status"), [({}, 0), ({INNER: 60 * MICRON}, 1)])
def test_the_command_says_it_and_its_status(tmp_path, capsys, moved, status):
    jobfile.write(LEFT, tmp_path / "left.json")
    jobfile.write(back(moved), tmp_path / "back.json")
    assert main(["in-service", str(tmp_path / "left.json"), str(tmp_path / "back.json")]) == status
    said = capsys.readouterr().out
    assert f"  {INNER}: " in said
    assert isinstance(FINAL, RunoutSurvey)


def test_a_missing_survey_is_unusable_input(tmp_path, capsys):
    jobfile.write(LEFT, tmp_path / "left.json")
    assert main(["in-service", str(tmp_path / "left.json"), str(tmp_path / "left.json")]) == 2
    assert "Read the rotor before anything is taken off" in capsys.readouterr().err
