"""The commands that back up and put back: what they say, and that trouble is a sentence."""

import shutil
from pathlib import Path

import pytest

from app.commands import main
from models.acts import Acts
from models.record.store import FILE_NAME, Store
from sample_data.load import compressor, pump


@pytest.fixture
def shop(tmp_path: Path) -> Path:
    folder = tmp_path / "shop"
    folder.mkdir()
    with Store.open(folder) as store:
        Acts(store).bring_in(compressor(), by="AT", act_id="one")
    return folder


def test_a_backup_is_written_and_put_back_after_a_look(
    shop: Path, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    stick = tmp_path / "stick"
    assert main(["backup", str(shop), "--to", str(stick)]) == 0
    assert "compared with the record" in capsys.readouterr().out
    (backup,) = stick.iterdir()
    with Store.open(shop) as store:
        job = pump()
        Acts(store).bring_in(job, by=job.people[0].key, act_id="two")

    assert main(["restore", str(backup), str(shop), "--look"]) == 0
    said = capsys.readouterr().out
    assert "jobs 26-0417; last act" in said
    assert f"job {job.number}: " in said
    assert "all of it" in said
    with Store.open(shop) as store:
        assert {row.number for row in Acts(store).jobs()} == {"26-0417", job.number}

    assert main(["restore", str(backup), str(shop)]) == 0
    assert "What stood there is kept as" in capsys.readouterr().out
    with Store.open(shop) as store:
        assert [row.number for row in Acts(store).jobs()] == ["26-0417"]
    assert len(list(shop.glob("shop set aside *.thirdjournal"))) == 1
    assert main(["verify", str(shop)]) == 0


def test_verify_finds_a_record_that_was_rolled_back(
    shop: Path, tmp_path: Path, capsys: pytest.CaptureFixture[str]
) -> None:
    shutil.copy(shop / FILE_NAME, tmp_path / "older copy")
    job = pump()
    with Store.open(shop) as store:
        Acts(store).bring_in(job, by=job.people[0].key, act_id="two")
    main(["backup", str(shop)])
    assert main(["verify", str(shop)]) == 0
    shutil.copy(tmp_path / "older copy", shop / FILE_NAME)
    capsys.readouterr()

    assert main(["verify", str(shop)]) == 1
    said = capsys.readouterr().out
    assert f"job {job.number}, act" in said
    assert "was cut off: backup shop" in said


@pytest.mark.parametrize(
    ("words", "says"),
    [
        (["backup", "{shop}", "--to", "{tmp}/nowhere/deep"], "No backup was written into"),
        (["backup", "{tmp}"], "There is no record at"),
        (["restore", "{tmp}/nothing", "{shop}"], "There is no backup at"),
        (["restore", "{tmp}/text", "{shop}", "--look"], "no record of this program"),
    ],
)
def test_trouble_is_a_sentence(
    shop: Path, tmp_path: Path, capsys: pytest.CaptureFixture[str], words: list[str], says: str
) -> None:
    (tmp_path / "text").write_text("a shopping list\n" * 100)
    assert main([word.format(shop=shop, tmp=tmp_path) for word in words]) == 2
    said = capsys.readouterr().err
    assert says in said
    assert "Traceback" not in said
