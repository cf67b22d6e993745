import json
import os
import re
from pathlib import Path
from typing import Any

import fastjsonschema
import msgspec
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models import jobfile, units
from models.job import Job
from models.jobfile import JobFileError, schema
from tests import small_job

LATE = "9026-10-05T07:30:00"
_STEP = re.compile(r"([^.\[\]]+)|\[(\d+)\]")


def _keys(place: str) -> list[str | int]:
    return [name or int(index) for name, index in _STEP.findall(place)]


def _spoiled(place: str, value: object) -> bytes:
    document = small_job.document()
    *way, last = _keys(place)
    node: Any = document
    for key in way:
        node = node[key]
    if value is DROP:
        del node[last]
    else:
        node[last] = value
    return small_job.as_bytes(document)


DROP = object()

# Where a value is put, the value, where the fault is named, what stands there, words expected.
SPOILED: list[tuple[str, object, str, object, str]] = [
    ("form", "another thing", "form", "another thing", "thirdjournal job"),
    ("form", DROP, "form", "missing", "thirdjournal job"),
    ("edition", DROP, "edition", "missing", "from 1 to 1"),
    ("edition", "1", "edition", "1", "from 1 to 1"),
    ("edition", True, "edition", True, "from 1 to 1"),
    ("edition", 0, "edition", 0, "from 1 to 1"),
    ("edition", 7, "edition", 7, "at most 1"),
    ("number", 12, "number", 12, "text"),
    ("number", "\ud800", "number", "half of a character", "text"),
    ("surprise", 1, "surprise", "unknown", "one of form, edition, number"),
    ("opened_at", "yesterday", "opened_at", "yesterday", "an instant with its offset"),
    ("opened_at", LATE, "opened_at", LATE, "an instant with its offset"),
    ("people", {}, "people", {}, "a list"),
    ("people[0].role", "boss", "people[0].role", "boss", "“engineer”"),
    ("people[0].name", DROP, "people[0].name", "missing", "a value here"),
    ("people[1].key", "AB", "people[1].key", "AB", "no earlier one has"),
    ("instruments[0].resolution", "0.1 K", "instruments[0].resolution", "0.1 K", "a length"),
    ("instruments[0].resolution", 0.1, "instruments[0].resolution", 0.1, "a length as text"),
    (
        "instruments[0].calibration.due_on",
        "soon",
        "instruments[0].calibration.due_on",
        "soon",
        "a date such as",
    ),
    ("components[0].item", "disc", "components[0].item", "disc", "a known item: “wheel”"),
    ("plans", [], "plans", "a list of 0", "at least 1"),
    ("plans[0].rotor", DROP, "plans[0].rotor", "missing", "a value here"),
    ("plans[0].stations[3].position", "4 kg", "plans[0].stations[3].position", "4 kg", "in, mm"),
    ("plans[0].stations[3].position", "4", "plans[0].stations[3].position", "4", "with its unit"),
    (
        "plans[0].stations[3].position",
        "four in",
        "plans[0].stations[3].position",
        "four in",
        "a length as text",
    ),
    (
        "plans[0].stations[3].position",
        "1" * 30 + " in",
        "plans[0].stations[3].position",
        "1" * 30 + " in",
        "too large for a length",
    ),
    ("plans[0].stations[1].key", "J1", "plans[0].stations[1].key", "J1", "no earlier one has"),
    (
        "plans[0].stations[1].covered_by",
        "tenth",
        "plans[0].stations[1].covered_by",
        "tenth",
        "a known step: “first”, “second”",
    ),
    (
        "plans[0].stations[2].reached_from",
        "second",
        "plans[0].stations[2].covered_by",
        "second",
        "a step after “second”",
    ),
    ("plans[0].first_journal", "J9", "plans[0].first_journal", "J9", "of kind journal"),
    ("plans[0].first_journal", "S1", "plans[0].first_journal", "S1", "of kind journal: “J1”, “J2”"),
    ("plans[0].second_journal", "J1", "plans[0].second_journal", "J1", "another journal"),
    (
        "plans[0].shaft.steps[1].start",
        "10.001 in",
        "plans[0].shaft.steps[1].start",
        "10.001 in",
        "10 in, where the step before it ends",
    ),
    (
        "plans[0].shaft.steps[0].end",
        "0 in",
        "plans[0].shaft.steps[0].end",
        "0 in",
        "more than start 0 in",
    ),
    (
        "plans[0].shaft.steps[0].diameter",
        "-3 in",
        "plans[0].shaft.steps[0].diameter",
        "-3 in",
        "more than 0",
    ),
    ("plans[0].shaft.steps", [], "plans[0].shaft.steps", "an empty list", "at least one step"),
    ("plans[0].steps[1].key", "first", "plans[0].steps[1].key", "first", "no earlier one has"),
    (
        "plans[0].steps[0].items[0].outline.end",
        "11 in",
        "plans[0].steps[0].items[0].outline.end",
        "11 in",
        "more than start 11 in",
    ),
    (
        "plans[0].steps[0].items[0].outline.outer",
        "3 in",
        "plans[0].steps[0].items[0].outline.outer",
        "3 in",
        "more than bore 3.995 in",
    ),
    (
        "plans[0].steps[0].items[0].lands[0].greatest_interference.value",
        "0.0009 in",
        "plans[0].steps[0].items[0].lands[0].greatest_interference.value",
        "0.0009 in",
        "not less than the least, 0.0010 in",
    ),
    (
        "plans[0].steps[0].change_limit.value",
        "0.0010 °F",
        "plans[0].steps[0].change_limit.value",
        "0.0010 °F",
        "a length as text",
    ),
    (
        "plans[0].steps[0].change_limit.origin.document",
        DROP,
        "plans[0].steps[0].change_limit.origin.document",
        "missing",
        "a value here",
    ),
    ("plans[0].runout.marks[3]", "360 °", "plans[0].runout.marks[3]", "360 °", "less than 360"),
    ("plans[0].runout.marks[3]", "180 °", "plans[0].runout.marks[3]", "180 °", "more than 180 °"),
    ("plans[0].runout.marks", [], "plans[0].runout.marks", "an empty list", "at least one angle"),
    ("entries[0].entry", "rumour", "entries[0].entry", "rumour", "“runout”"),
    ("entries[0].entry", DROP, "entries[0].entry", "missing", "a value here"),
    ("entries[0].words", "x", "entries[0].words", "unknown", "one of entry, id"),
    ("entries[1].id", "bare", "entries[1].id", "bare", "no earlier one has"),
    ("entries[1].plan", "B", "entries[1].plan", "B", "a known plan revision: “A”"),
    ("entries[1].by", "XY", "entries[1].by", "XY", "a known person: “AB”, “CD”"),
    ("entries[1].written_by", "XY", "entries[1].written_by", "XY", "a known person"),
    ("entries[1].done_at", "noon", "entries[1].done_at", "noon", "an instant"),
    ("entries[1].place.step", "third", "entries[1].place.step", "third", "a known step"),
    ("entries[1].place.step", DROP, "entries[1].place.step", "missing", "the step of the attempt"),
    ("entries[1].place.attempt", 0, "entries[1].place.attempt", 0, "counted from 1"),
    ("entries[1].place.attempt", DROP, "entries[1].place.attempt", "missing", "counted from 1"),
    ("entries[1].baseline", "bore", "entries[1].baseline", "bore", "earlier runout survey"),
    ("entries[1].components[0][0]", "disc", "entries[1].components[0][0]", "disc", "known item"),
    ("entries[1].components[0][1]", "W-2", "entries[1].components[0][1]", "W-2", "known component"),
    ("entries[1].components[0]", ["a"], "entries[1].components[0]", "a list of 1", "at least 2"),
    ("entries[2].item", "disc", "entries[2].item", "disc", "a known item: “wheel”"),
    ("entries[2].land", "eye", "entries[2].land", "eye", "land of the item: “only”"),
    ("entries[2].instrument", "M-9", "entries[2].instrument", "M-9", "a known instrument: “DI-1”"),
    ("entries[2].unit", "kg", "entries[2].unit", "kg", "a unit of length"),
    ("entries[2].typed[1]", ["3.9950"], "entries[2].typed[1]", "a list of 1", "2 readings"),
    ("entries[2].typed", [], "entries[2].typed", "a list of 0", "2 rows"),
    ("entries[2].typed[1][0]", "3,995", "entries[2].typed[1][0]", "3,995", "decimal point"),
    ("entries[2].typed[1][0]", "", "entries[2].typed[1][0]", "", "nothing typed"),
    ("entries[2].typed[1][0]", 3.995, "entries[2].typed[1][0]", 3.995, "text or null"),
    ("entries[2].corrections[0].by", "XY", "entries[2].corrections[0].by", "XY", "known person"),
    ("entries[3].gauge[0].land", "eye", "entries[3].gauge[0].land", "eye", "land of the item"),
    (
        "entries[3].temperatures[0].temperature",
        "390 in",
        "entries[3].temperatures[0].temperature",
        "390 in",
        "°C, °F, K",
    ),
    ("entries[4].clock_position", "-1 °", "entries[4].clock_position", "-1 °", "from 0"),
    (
        "entries[5].temperatures[0].angle",
        "400 °",
        "entries[5].temperatures[0].angle",
        "400 °",
        "less than 360",
    ),
    ("entries[6].survey", "a1", "entries[6].survey", "a1", "earlier runout survey: “bare”"),
    ("entries[7].supersedes", "n9", "entries[7].supersedes", "n9", "earlier entry"),
    ("entries[7].supersedes", "n1", "entries[7].supersedes", "n1", "earlier entry"),
    ("entries[0].stations[1].station", "S9", "entries[0].stations[1].station", "S9", "station"),
    ("entries[0].stations[1].station", "J1", "entries[0].stations[1].station", "J1", "no earlier"),
    (
        "entries[0].stations[1].typed",
        ["0"] * 5,
        "entries[0].stations[1].typed",
        "a list of 5",
        "4 readings",
    ),
    (
        "entries[0].stations[1].seconds",
        [1] * 5,
        "entries[0].stations[1].seconds",
        "a list of 5",
        "4 times",
    ),
    ("entries[0].stations[1].typed[2]", "O.5", "entries[0].stations[1].typed[2]", "O.5", "number"),
    ("entries[0].stations[1].typed[2]", "5 K", "entries[0].stations[1].typed[2]", "5 K", "in “K”"),
    ("entries[0].stations[1].again", "nil", "entries[0].stations[1].again", "nil", "a number"),
    ("entries[0].stations[1].high_spot", "361 °", "entries[0].stations[1].high_spot", "361 °", "3"),
    ("entries[0].angles[1]", "0 °", "entries[0].angles[1]", "0 °", "more than 0 °"),
    ("entries[0].set_up.attitude", "askew", "entries[0].set_up.attitude", "askew", "“vertical”"),
    ("entries[0].read_by", "XY", "entries[0].read_by", "XY", "a known person"),
    ("verdicts[0].step", "third", "verdicts[0].step", "third", "a known step"),
    (
        "verdicts[0].inputs.change",
        2**60,
        "verdicts[0].inputs.change",
        str(2**60),
        f"up to {2**53 - 1}",
    ),
    ("verdicts[0].inputs.change", [], "verdicts[0].inputs.change", [], "a number or text"),
    ("head.sequence", 2**53, "head.sequence", 2**53, f"up to {2**53 - 1}"),
    ("head.sequence", 1.5, "head.sequence", 1.5, "a whole number"),
]


@pytest.mark.parametrize(("put", "value", "place", "found", "expected"), SPOILED)
def test_a_spoiled_job_is_refused_with_place_value_and_what_was_expected(
    put, value, place, found, expected
):
    if value == "\ud800":
        data = _spoiled(put, "?").replace(b'"?"', b'"\\ud800"')
    else:
        data = _spoiled(put, value)

    with pytest.raises(JobFileError) as refused:
        jobfile.loads(data)

    assert (refused.value.place, refused.value.value) == (place, found)
    assert expected in refused.value.expected
    assert str(refused.value).startswith(f"{place} is ")
    assert "\n" not in str(refused.value)


GOOD = small_job.as_bytes(small_job.document())

RAW: list[tuple[str, bytes, str, object, str]] = [
    ("empty", b"", "the file", "empty", "a job in JSON"),
    ("blank", b" \n\t", "the file", "empty", "a job in JSON"),
    ("binary", b"\x89PNG\r\n\x1a\n\x00", "byte 0", "0x89", "text in UTF-8"),
    ("Latin-1", GOOD.replace("°".encode(), b"\xb0"), None, "0xb0", "text in UTF-8"),
    ("prose", b"the rotor is fine", "line 1, column 1", "the rotor is fine", "JSON"),
    ("torn", GOOD[:200], None, None, "JSON"),
    ("torn before the last bracket", GOOD[:-1], None, "the end of the file", "JSON"),
    ("two in one", GOOD + GOOD, None, None, "JSON (extra data)"),
    ("a list", b"[1, 2]", "the file", [1, 2], "a job"),
    ("foreign", b'{"type": "FeatureCollection"}', "form", "missing", "thirdjournal job"),
    (
        "a name twice",
        GOOD.replace(b'"number": "J-1"', b'"number": "J-1", "number": "J-2"'),
        "number",
        "given twice",
        "each name once",
    ),
    (
        "a name twice deep inside",
        GOOD.replace(b'"serial": "S-1"', b'"serial": "S-1", "serial": "S-2"'),
        "plans[0].shaft.serial",
        "given twice",
        "each name once",
    ),
    (
        "not a number",
        GOOD.replace(b"1.016e-05", b"NaN"),
        "verdicts[0].inputs.change",
        "NaN",
        "a finite number",
    ),
    (
        "endless",
        GOOD.replace(b"1.016e-05", b"-Infinity"),
        "verdicts[0].inputs.change",
        "-Infinity",
        "a finite number",
    ),
    (
        "beyond floats",
        GOOD.replace(b"1.016e-05", b"1e999"),
        "verdicts[0].inputs.change",
        "1e999",
        "a finite number",
    ),
    (
        "five thousand digits",
        GOOD.replace(b"1.016e-05", b"9" * 5000),
        "verdicts[0].inputs.change",
        "9" * 5000,
        f"a number up to {2**53 - 1}",
    ),
    ("a deep hole", b"[" * 100_000, "the file", "nested too deeply", "a job in JSON"),
]


@pytest.mark.parametrize(("_name", "data", "place", "found", "expected"), RAW)
def test_a_file_that_is_no_job_is_refused_with_what_is_wrong(_name, data, place, found, expected):
    with pytest.raises(JobFileError) as refused:
        jobfile.loads(data)

    assert place is None or refused.value.place == place
    assert found is None or refused.value.value == found
    assert expected in refused.value.expected
    assert len(str(refused.value)) < 400


def test_a_newer_file_is_refused_with_both_editions():
    with pytest.raises(JobFileError) as refused:
        jobfile.loads(_spoiled("edition", 7))

    assert str(refused.value) == (
        "edition is 7; expected is at most 1, the newest that this program reads."
    )


def test_the_good_job_behind_the_table_is_read():
    job = jobfile.loads(GOOD)

    assert job.plan.station("S1").position.written == "10.5 in"
    assert job.entries[0].readings("S1").typed == ("0", "0.0003", "0.0005", "0.0002")


@pytest.mark.parametrize("cut", range(0, len(GOOD) - 1, 97))
def test_a_torn_file_is_refused_wherever_it_tears(cut):
    with pytest.raises(JobFileError):
        jobfile.loads(GOOD[:cut])


def test_what_is_read_and_written_is_read_as_the_same_job():
    job = jobfile.loads(GOOD)

    assert jobfile.loads(jobfile.dumps(job)) == job


def test_what_is_written_and_read_is_written_as_the_same_bytes():
    written = jobfile.dumps(jobfile.loads(GOOD))

    assert jobfile.dumps(jobfile.loads(written)) == written


def test_equal_jobs_give_equal_bytes_however_they_came_about():
    read = jobfile.loads(GOOD)
    rotor = read.plan.rotor
    end = "".join(["drive", " ", "end"])  # equal to the default, and another object
    spelled = msgspec.structs.replace(rotor, first_end=end)
    plan = msgspec.structs.replace(read.plan, rotor=spelled, approved_by=str(b"", "ascii"))
    made = msgspec.structs.replace(read, plans=(plan,))

    assert made == read
    assert jobfile.dumps(made) == jobfile.dumps(read)


def test_a_whole_number_among_the_inputs_of_a_verdict_is_written_as_it_is_read():
    job = jobfile.loads(GOOD)
    verdict = msgspec.structs.replace(job.verdicts[0], inputs={"marks": 8, "judged": True})
    written = jobfile.dumps(msgspec.structs.replace(job, verdicts=(verdict,)))

    assert jobfile.dumps(jobfile.loads(written)) == written


def test_names_stand_in_the_order_of_the_types_however_the_file_had_them():
    document = small_job.document()
    turned = dict(reversed(document.items()))

    assert jobfile.dumps(jobfile.loads(small_job.as_bytes(turned))) == jobfile.dumps(
        jobfile.loads(GOOD)
    )
    assert list(json.loads(jobfile.dumps(jobfile.loads(GOOD))))[:3] == ["form", "edition", "number"]


def test_a_written_file_breaks_lines_between_readings_of_stations_not_within():
    lines = jobfile.dumps(jobfile.loads(GOOD)).decode().splitlines()

    assert any('"station": "S1"' in line and '"0.0003", "0.0005"' in line for line in lines)
    assert max(map(len, lines)) <= 120


def test_a_mark_at_the_front_of_the_file_is_read_over():
    assert jobfile.loads(b"\xef\xbb\xbf" + GOOD) == jobfile.loads(GOOD)


_LENGTHS = st.builds(
    lambda sign, number, decimals, unit: units.Length.read(
        f"{sign}{number / 10**decimals:.{decimals}f}", unit
    ),
    st.sampled_from(["", "+", "-", "−"]),
    st.integers(0, 10**6),
    st.integers(0, 6),
    st.sampled_from(["in", "mm", "µm", "mil", "m", '"', "thou"]),
)
_TEXTS = st.text(st.characters(codec="utf-8"), max_size=30)


@settings(max_examples=60, deadline=None)
@given(
    position=_LENGTHS,
    words=_TEXTS,
    number=_TEXTS,
    typed=st.lists(_LENGTHS, min_size=4, max_size=4),
    change=st.floats(allow_nan=False, allow_infinity=False),
)
def test_any_text_and_any_written_length_come_back_unchanged(
    position, words, number, typed, change
):
    document = small_job.document()
    document["number"] = number
    document["plans"][0]["stations"][1]["position"] = position.written
    document["entries"][0]["stations"][1]["typed"] = [one.written for one in typed]
    document["entries"][7]["words"] = words
    document["verdicts"][0]["inputs"]["change"] = change

    job = jobfile.loads(small_job.as_bytes(document))
    written = jobfile.dumps(job)

    assert (job.number, job.entries[7].words) == (number, words)
    assert job.plan.station("S1").position == position
    assert jobfile.loads(written) == job
    assert jobfile.dumps(jobfile.loads(written)) == written


@settings(max_examples=200, deadline=None)
@given(data=st.binary(max_size=200))
def test_any_bytes_at_all_are_read_or_refused_and_nothing_else(data):
    with pytest.raises(JobFileError):
        jobfile.loads(data)


@settings(max_examples=150, deadline=None)
@given(where=st.integers(0, len(GOOD) - 1), what=st.binary(max_size=6))
def test_a_file_spoiled_anywhere_is_read_or_refused_and_nothing_else(where, what):
    spoiled = GOOD[:where] + what + GOOD[where + 3 :]
    refused = job = None
    try:
        job = jobfile.loads(spoiled)
    except JobFileError as problem:
        refused = problem

    if job is None:
        assert refused.place
        assert refused.expected
    else:
        assert jobfile.loads(jobfile.dumps(job)) == job


def test_a_verdict_with_a_number_that_json_lacks_is_not_written():
    job = jobfile.loads(GOOD)
    spoiled = msgspec.structs.replace(job.verdicts[0], inputs={"change": float("nan")})

    with pytest.raises(JobFileError) as refused:
        jobfile.dumps(msgspec.structs.replace(job, verdicts=(spoiled,)))

    assert refused.value.place == "verdicts[0].inputs.change"


def test_a_job_is_written_to_a_file_and_read_from_it(tmp_path):
    job = jobfile.loads(GOOD)
    path = tmp_path / "a job.json"

    jobfile.write(job, path)

    assert jobfile.read(path) == job
    assert [one.name for one in tmp_path.iterdir()] == ["a job.json"]


def test_a_write_that_fails_leaves_the_old_file_and_no_scraps(tmp_path, monkeypatch):
    path = tmp_path / "job.json"
    path.write_bytes(b"what stood here before")

    def full(_handle: int) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(os, "fsync", full)
    with pytest.raises(OSError, match="No space"):
        jobfile.write(jobfile.loads(GOOD), path)

    assert path.read_bytes() == b"what stood here before"
    assert [one.name for one in tmp_path.iterdir()] == ["job.json"]


def test_the_file_is_on_the_disk_before_its_name_points_at_it(tmp_path, monkeypatch):
    acts = []
    fsync, replace = os.fsync, Path.replace
    monkeypatch.setattr(os, "fsync", lambda handle: (acts.append("fsync"), fsync(handle))[1])
    monkeypatch.setattr(
        Path, "replace", lambda old, new: (acts.append("replace"), replace(old, new))[1]
    )

    jobfile.write(jobfile.loads(GOOD), tmp_path / "job.json")

    assert acts[:2] == ["fsync", "replace"]


def test_a_file_that_is_not_there_is_trouble_with_the_surroundings(tmp_path):
    with pytest.raises(FileNotFoundError):
        jobfile.read(tmp_path / "none.json")


def test_the_committed_schema_is_the_one_made_from_the_types():
    committed = Path(schema.__file__).parent.parent / "data" / "jobfile.schema.json"

    assert committed.read_text(encoding="utf-8") == schema.text(), (
        'write it anew: python -c "from models.jobfile import schema; schema.rewrite()"'
    )


def test_the_schema_lets_through_what_is_read_as_each_kind_and_nothing_else():
    for kind in units.KINDS:
        taken = fastjsonschema.compile(schema.quantity(kind), use_default=False)
        for symbol in kind.units:
            written = f"−12.50 {symbol}".rstrip()
            if symbol[:1].isdigit():
                continue
            assert taken(written) == written
            assert kind.read(written).typed == "−12.50"
        for other in ("12 furlongs", "in", "1e3 " + kind.symbols()[0], "12 12", "١٢ in"):
            with pytest.raises(fastjsonschema.JsonSchemaValueException):
                taken(other)


@pytest.mark.parametrize("unit", ["µm/(m·K)", "µin/(in·°F)"])
def test_a_coefficient_of_expansion_comes_back_in_its_unit(unit):
    document = small_job.document()
    job = jobfile.loads(small_job.as_bytes(document))
    expansion = units.Expansion(typed="11.5", unit=unit, whole=1)
    instrument = msgspec.structs.replace(job.instruments[0], expansion=expansion)
    job = msgspec.structs.replace(job, instruments=(instrument,))

    assert jobfile.loads(jobfile.dumps(job)).instruments[0].expansion == expansion


def test_every_part_of_the_schema_refuses_names_it_does_not_know():
    for name, definition in schema.document()["definitions"].items():
        assert definition["additionalProperties"] is False, name


def test_defaults_are_left_out_of_a_file_but_not_what_tells_it_from_others():
    written = json.loads(jobfile.dumps(jobfile.loads(GOOD)))

    assert "customer" not in written
    assert (written["form"], written["edition"]) == ("thirdjournal job", 1)
    assert isinstance(jobfile.loads(GOOD), Job)


GROWTH = {"value": "0.0008 in", "speed": "9000 r/min", "origin": small_job.ORIGIN}


def test_a_designers_growth_and_the_shafts_yield_strength_come_back_as_written():
    document = small_job.document()
    plan = document["plans"][0]
    plan["steps"][0]["items"][0]["lands"][0]["growth"] = GROWTH
    plan["shaft"]["yield_strength"] = "95 ksi"

    job = jobfile.loads(jobfile.dumps(jobfile.loads(small_job.as_bytes(document))))

    (land,) = job.plan.steps[0].items[0].lands
    assert (land.growth.value.written, land.growth.speed.written) == ("0.0008 in", "9000 r/min")
    assert job.plan.shaft.yield_strength.written == "95 ksi"


@pytest.mark.parametrize(("name", "none"), [("value", "0 in"), ("speed", "-9000 r/min")])
def test_a_growth_of_nothing_is_refused(name, none):
    document = small_job.document()
    (land,) = document["plans"][0]["steps"][0]["items"][0]["lands"]
    land["growth"] = GROWTH | {name: none}

    with pytest.raises(JobFileError, match="more than 0"):
        jobfile.loads(small_job.as_bytes(document))
