"""The command line: what it prints, how it ends, and that trouble is a sentence."""

import json
from pathlib import Path
from typing import Any

import pytest

from app.commands import main
from models import jobfile
from models.acts import Acts
from models.job import Job
from models.record.store import Store
from sample_data.load import compressor, pump


def written(job: Job, folder: Path) -> str:
    path = folder / "a job.json"
    jobfile.write(job, path)
    return str(path)


def test_a_clean_finished_job_ends_with_nothing_to_say(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    status = main(["check", written(pump(), tmp_path)])

    said = capsys.readouterr().out
    assert status == 0
    assert "within limits" in said.splitlines()[0]
    assert "EG-318 (invented)" in said


def test_an_unfinished_job_is_not_within_limits_and_says_what_is_next(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    status = main(["check", written(compressor(), tmp_path)])

    said = capsys.readouterr().out
    assert status == 1
    assert "Remount required [runout-changed] E1" in said
    assert "came off" in said
    assert said.rstrip().splitlines()[-1].startswith("Next: Begin attempt 1")


def test_every_finding_is_given_with_its_values_in_si(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    main(["check", written(compressor(), tmp_path), "--json"])

    told: dict[str, Any] = json.loads(capsys.readouterr().out)
    assert told["rotor"] == "HR-4471"
    changed = [one for one in told["findings"] if one["rule"] == "runout-changed"]
    assert {"rule", "step", "attempt", "station", "verdict", "message", "inputs"} <= set(changed[0])
    worst = max(changed, key=lambda one: one["inputs"]["change_tir"])
    # The limit of this invented plan: 0.0010 in.
    assert worst["inputs"]["limit"] == pytest.approx(25.4e-6)
    assert worst["verdict"] == "outside"
    assert 25.4e-6 < worst["inputs"]["change_tir"] < 100e-6


@pytest.mark.parametrize(
    ("content", "expected"),
    [
        (b"", "a.json"),
        (b"not a job", "JSON"),
        (b'{"form": "something else"}', "form"),
        (b"\x00\xff\xfe", "a.json"),
        (b"[1, 2", "JSON"),
    ],
)
def test_a_file_that_is_no_job_ends_with_two_and_one_sentence(
    tmp_path: Path, capsys: pytest.CaptureFixture[str], content: bytes, expected: str
) -> None:
    path = tmp_path / "a.json"
    path.write_bytes(content)

    for command in (["check", str(path)], ["traveler", str(path), "-o", str(tmp_path / "x.pdf")]):
        assert main(command) == 2
        said = capsys.readouterr()
        assert said.out == ""
        assert expected in said.err
        assert len(said.err.strip().splitlines()) == 1
        assert "Traceback" not in said.err
    assert not (tmp_path / "x.pdf").exists()


def test_a_torn_file_is_refused_whole(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    path = tmp_path / "torn.json"
    path.write_bytes(jobfile.dumps(pump())[:5000])

    assert main(["check", str(path)]) == 2
    assert "torn.json" in capsys.readouterr().err


def test_a_newer_file_names_both_numbers(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    path = tmp_path / "newer.json"
    path.write_bytes(jobfile.dumps(pump()).replace(b'"edition": 1', b'"edition": 7', 1))

    assert main(["check", str(path)]) == 2
    said = capsys.readouterr().err
    assert "7" in said
    assert "1" in said


def test_a_missing_file_is_a_sentence_with_the_path(capsys: pytest.CaptureFixture[str]) -> None:
    assert main(["check", "nowhere/at all.json"]) == 2
    assert "nowhere/at all.json" in capsys.readouterr().err


def test_a_reading_in_the_wrong_unit_is_questioned_and_not_within(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    document = json.loads(jobfile.dumps(compressor()))
    survey = [one for one in document["entries"] if one["entry"] == "runout"][-1]
    survey["stations"][3]["typed"][2] = "0.0254"
    path = tmp_path / "slip.json"
    path.write_text(json.dumps(document), encoding="utf-8")

    assert main(["check", str(path)]) == 1
    said = capsys.readouterr().out
    assert "questioned" in said


def test_without_a_screen_the_window_says_so(
    capsys: pytest.CaptureFixture[str], monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.delenv("DISPLAY", raising=False)
    monkeypatch.delenv("WAYLAND_DISPLAY", raising=False)

    assert main([]) == 2
    assert "no screen" in capsys.readouterr().err


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    with Store.open(tmp_path) as store:
        Acts(store).bring_in(compressor(), by="AT", act_id="demo")
    return tmp_path


def test_an_untouched_record_verifies_with_the_head_a_traveler_would_print(
    shop: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    with Store.open(shop) as store:
        head = Acts(store).read("26-0417").head
    assert head is not None
    printed = f"{head.sequence}:{head.digest[:16]}"

    assert main(["verify", str(shop)]) == 0
    assert main(["verify", str(shop), "--job", "26-0417", "--head", printed]) == 0
    assert "holds" in capsys.readouterr().out


def test_a_record_that_is_not_the_one_of_the_traveler_is_told(
    shop: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    asked = ["verify", str(shop), "--job", "26-0417", "--head"]

    assert main([*asked, "5:0123456789abcdef"]) == 1
    assert "written anew" in capsys.readouterr().out
    assert main([*asked, "5000:0123456789abcdef"]) == 1
    assert "cut off" in capsys.readouterr().out


@pytest.mark.parametrize("head", ["5", "x:0123456789abcdef", "5:xyz", "5:01"])
def test_what_is_no_head_is_refused(
    shop: Path, capsys: pytest.CaptureFixture[str], head: str
) -> None:
    assert main(["verify", str(shop), "--job", "26-0417", "--head", head]) == 2
    assert head in capsys.readouterr().err


def test_a_folder_without_a_record_is_said(
    tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    assert main(["verify", str(tmp_path)]) == 2
    assert str(tmp_path) in capsys.readouterr().err


def test_help_shows_every_command_and_an_example(capsys: pytest.CaptureFixture[str]) -> None:
    with pytest.raises(SystemExit) as ended:
        main(["--help"])

    said = capsys.readouterr().out
    assert ended.value.code == 0
    for word in ("demo", "check", "traveler", "--shop", "examples:", "exit status"):
        assert word in said


@pytest.mark.parametrize("arguments", [["weld"], ["check"], ["traveler", "x.json"], ["--shop"]])
def test_a_command_that_is_not_there_is_refused_with_the_usage(
    arguments: list[str], capsys: pytest.CaptureFixture[str]
) -> None:
    with pytest.raises(SystemExit) as ended:
        main(arguments)

    assert ended.value.code == 2
    assert "usage: thirdjournal" in capsys.readouterr().err


def test_a_job_goes_to_another_shop_by_command_and_is_verified_on_the_way(
    shop_folder, tmp_path, capsys
):
    file, other = tmp_path / "a.job.json", tmp_path / "other"
    other.mkdir()
    Store.open(other).close()
    assert main(["export", str(shop_folder), "26-0417", "-o", str(file)]) == 0
    assert main(["verify", str(file)]) == 0
    assert "job 26-0417, 116 acts: the file holds" in capsys.readouterr().out
    assert main(["take-in", str(file), str(other), "--by", "AT"]) == 0
    assert "116 acts are new; head 116:" in capsys.readouterr().out
    assert main(["take-in", str(file), str(other), "--by", "AT"]) == 0
    assert "all of it was there already" in capsys.readouterr().out
    assert main(["verify", str(other)]) == 0
    head = next(line for line in capsys.readouterr().out.splitlines() if "26-0417: 116" in line)
    kept = "116:" + head.split()[-1].rstrip("…")
    assert main(["verify", str(file), "--head", kept]) == 0
    assert main(["verify", str(file), "--head", "116:" + "0" * 16]) == 1
    assert "is not the one whose head was kept" in capsys.readouterr().out
    assert main(["verify", str(file), "--head", "999:" + "0" * 16]) == 1


def test_a_changed_file_is_refused_and_named(shop_folder, tmp_path, capsys):
    file, other = tmp_path / "a.job.json", tmp_path / "other"
    other.mkdir()
    Store.open(other).close()
    main(["export", str(shop_folder), "26-0417", "-o", str(file)])
    text = file.read_text(encoding="utf-8")
    at = text.rindex('"typed": "0.0')
    file.write_text(text[:at] + text[at:].replace('"0.0', '"0.1', 1), encoding="utf-8")
    capsys.readouterr()
    assert main(["verify", str(file)]) == 1
    assert "does not hold at act" in capsys.readouterr().out
    assert main(["take-in", str(file), str(other), "--by", "AT"]) == 2
    assert "does not hold at act" in capsys.readouterr().err
