"""Attached files are backed up beside the record's copy, once, and come back with it."""

import gzip
import shutil
from collections.abc import Iterator
from pathlib import Path

import pytest

from app.backup_text import backed_up, put_back
from app.verify_text import verified
from models.acts import Acts
from models.acts.backups import back_up, restore
from models.record.backup_files import bring
from models.record.backups import FOLDER_NAME, BackupError, contents_of, copy_backup
from models.record.files import FOLDER
from models.record.store import FILE_NAME, Store
from tests.acts.test_things import JOB as A_JOB
from tests.acts.test_things import NUMBER, PEOPLE, picture
from tests.record.test_kept_shapes import SHAPES

# FIPS 180-2, appendix B.1: the digest of "abc".
CONTENT = b"abc"
DIGEST = "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"


@pytest.fixture
def shop(tmp_path: Path) -> Iterator[Store]:
    folder = tmp_path / "shop"
    folder.mkdir()
    with Store.open(folder) as store:
        Acts(store).bring_in(A_JOB, by=PEOPLE["technician"].key, act_id="in")
        Acts(store).attach(NUMBER, picture(), CONTENT)
        yield store


def beside(folder: Path) -> Path:
    return folder / FOLDER / DIGEST


def backups_of(store: Store) -> Path:
    return store.path.parent / FOLDER_NAME


def harm(path: Path, how: str) -> None:
    if how == "missing":
        path.unlink()
    else:
        path.write_bytes(b"abd")


def test_an_attached_file_lies_beside_the_backup_for_its_owner_only(shop: Store) -> None:
    backup = back_up(shop, act_id="b")

    kept = beside(backup.path.parent)
    assert kept.read_bytes() == CONTENT
    assert kept.stat().st_mode & 0o777 == 0o600
    assert backup.files >= 1
    assert [one.name for one in kept.parent.iterdir() if one.name.startswith(".")] == []


def test_generations_share_one_file_which_no_later_backup_writes_again(shop: Store) -> None:
    back_up(shop, act_id="b")
    first = beside(backups_of(shop)).stat()
    for number in range(14):
        back_up(shop, act_id=f"more {number}")

    last = beside(backups_of(shop)).stat()
    assert (first.st_ino, first.st_mtime_ns) == (last.st_ino, last.st_mtime_ns)
    assert len(list((backups_of(shop) / FOLDER).glob(f"*{DIGEST}*"))) == 1


def test_a_backup_s_file_is_a_copy_of_its_own_and_no_other_name_of_the_same(shop: Store) -> None:
    back_up(shop, act_id="b")
    beside(shop.path.parent).write_bytes(b"spoilt")

    assert beside(backups_of(shop)).read_bytes() == CONTENT


@pytest.mark.parametrize("how", ["missing", "changed"])
def test_what_is_not_as_attached_is_not_backed_up_and_is_counted(shop: Store, how: str) -> None:
    before = back_up(shop, act_id="a")
    shutil.rmtree(backups_of(shop) / FOLDER)
    harm(beside(shop.path.parent), how)
    after = back_up(shop, act_id="b")

    assert not beside(backups_of(shop)).exists()
    assert (after.files, after.files_lacking) == (before.files - 1, before.files_lacking + 1)


def test_a_changed_file_beside_the_backups_is_put_right_and_the_changed_one_kept(
    shop: Store,
) -> None:
    back_up(shop, act_id="a")
    harm(beside(backups_of(shop)), "changed")
    back_up(shop, act_id="b")

    assert beside(backups_of(shop)).read_bytes() == CONTENT
    (changed,) = (backups_of(shop) / FOLDER).glob(f"{DIGEST}.changed-*")
    assert changed.read_bytes() == b"abd"


@pytest.mark.parametrize("how", ["missing", "changed"])
def test_putting_back_brings_back_what_is_missing_or_changed(shop: Store, how: str) -> None:
    backup = back_up(shop, act_id="b")
    harm(beside(shop.path.parent), how)
    done = restore(backup.path, shop.path.parent, act_id="r")

    assert done.files_back == 1
    assert beside(shop.path.parent).read_bytes() == CONTENT


def test_putting_back_into_an_empty_folder_brings_every_file(shop: Store, tmp_path: Path) -> None:
    backup = back_up(shop, act_id="b")
    new = tmp_path / "new bench"
    new.mkdir()
    words = put_back(backup.path, new)

    assert "1 attached file brought back." in words
    with Store.open(new) as opened:
        kept = next(
            one for one in Acts(opened).read(NUMBER).entries if one.id == _attached_id(shop)
        )
        assert Acts(opened).attached(kept) == CONTENT  # type: ignore[arg-type]


def _attached_id(shop: Store) -> str:
    entries = Acts(shop).read(NUMBER).entries
    return next(one.id for one in entries if getattr(one, "file_digest", "") == DIGEST)


def test_a_second_folder_gets_the_files_too(shop: Store, tmp_path: Path) -> None:
    stick = tmp_path / "stick"
    stick.mkdir()
    backup = back_up(shop, act_id="b")
    copied = copy_backup(backup.path, stick)
    assert beside(stick).read_bytes() == CONTENT

    # The stick's own file is lost: the same backup is copied once more.
    beside(stick).unlink()
    assert copy_backup(backup.path, stick) == copied
    assert beside(stick).read_bytes() == CONTENT


def test_no_backup_has_its_name_where_its_files_cannot_be_kept(shop: Store) -> None:
    backups_of(shop).mkdir()
    (backups_of(shop) / FOLDER).write_bytes(b"in the way")
    with pytest.raises(BackupError, match="The record itself is whole"):
        back_up(shop, act_id="b")

    assert list(backups_of(shop).glob("*.thirdjournal")) == []


def test_verify_counts_the_files_beside_the_backups_and_names_what_is_missing(
    shop: Store,
) -> None:
    folder = shop.path.parent
    words = backed_up(folder, to=None)
    assert "1 attached file beside it, each as attached." in words
    assert "Compared with 1 backup; beside them 1 attached file whole." in (
        verified(folder, job=None, head=None).words
    )
    beside(backups_of(shop)).unlink()

    found = verified(folder, job=None, head=None)
    assert found.is_whole
    assert "the attached file “scratch.png” is missing or changed beside the backups" in found.words
    assert "beside them 0 attached files whole" in found.words


def test_a_name_that_is_no_digest_leads_nowhere(shop: Store, tmp_path: Path) -> None:
    (tmp_path / "mine.txt").write_bytes(CONTENT)
    assert (shop.path.parent / FOLDER / "../../mine.txt").is_file()

    assert bring(["../../mine.txt"], source=shop.path.parent, target=backups_of(shop)) == []


def test_a_record_of_the_first_form_names_no_files(tmp_path: Path) -> None:
    made = tmp_path / FILE_NAME
    made.write_bytes(gzip.decompress((SHAPES / "form_1.thirdjournal.gz").read_bytes()))

    assert contents_of(made).files == {}
