"""Folders on a network, and disks with little room: recognised, and told."""

import shutil
import sqlite3
import threading
from collections import namedtuple
from pathlib import Path

import pytest

from models.acts import Acts
from models.acts.backups import back_up
from models.record import folders
from models.record.errors import LockedRecordError, NetworkFolderError
from models.record.folders import low_space_words, network_kind
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from sample_data.load import compressor
from tests.acts.test_acts import AHEAD
from tests.record.whole_record import fill, one_act

# As Linux writes them: device, place, kind, options; blanks as octal marks (man 5 fstab).
MOUNTS = r"""/dev/sda2 / ext4 rw,relatime 0 0
proc /proc proc rw 0 0
server:/export /srv/shop nfs4 rw,vers=4.2 0 0
/dev/sdb1 /srv/shop/local ext4 rw 0 0
//office/rotors /media/our\040share cifs rw 0 0
me@bench: /mnt/far fuse.sshfs rw 0 0
host /mnt/host 9p rw,trans=virtio 0 0
tmpfs /tmp tmpfs rw 0 0
/dev/sdc1 /media/stick vfat rw 0 0
/dev/sdd1 /twice ext4 rw 0 0
server:/other /twice nfs rw 0 0
half a line
"""


@pytest.mark.parametrize(
    ("folder", "kind"),
    [
        ("/srv/plain", ""),
        ("/srv/shop", "nfs4"),
        ("/srv/shop/a/b", "nfs4"),
        ("/srv/shopping", ""),
        ("/srv/shop/local/a", ""),
        ("/media/our share/a", "cifs"),
        ("/mnt/far/a", "fuse.sshfs"),
        ("/mnt/host", "9p"),
        ("/media/stick/shop", ""),
        ("/twice/a", "nfs"),
        ("/tmp/a", ""),
    ],
)
def test_a_folder_is_what_is_mounted_nearest_above_it(folder: str, kind: str) -> None:
    assert network_kind(Path(folder), mounts=MOUNTS) == kind


def test_the_folder_of_these_tests_is_on_a_disk(tmp_path: Path) -> None:
    assert network_kind(tmp_path) == ""
    assert " / " in folders.mount_table()


@pytest.fixture
def on_network(monkeypatch: pytest.MonkeyPatch, tmp_path: Path) -> Path:
    """Let a folder of this test lie on a network."""
    folder = tmp_path / "share"
    folder.mkdir()
    table = f"/dev/sda2 / ext4 rw 0 0\nserver:/x {folder.resolve()} nfs4 rw 0 0\n"
    monkeypatch.setattr(folders, "mount_table", lambda: table)
    return folder


def test_a_network_folder_is_told_and_opened_only_knowingly(on_network: Path) -> None:
    with pytest.raises(NetworkFolderError, match=r"lies on a network \(nfs4\).*works alone"):
        Store.open(on_network)
    assert list(on_network.iterdir()) == []
    with Store.open(on_network, on_network=True) as store:
        assert store.is_alone


def test_on_a_network_the_record_is_kept_to_one_process(on_network: Path) -> None:
    with Store.open(on_network, on_network=True, busy_seconds=0.2) as store:
        fill(store)
        raw = sqlite3.connect(on_network / FILE_NAME, timeout=0.2)
        with pytest.raises(sqlite3.OperationalError, match="locked"):
            raw.execute("SELECT count(*) FROM act")
        raw.close()
        with pytest.raises(LockedRecordError, match="in use"):
            Store.open(on_network, on_network=True, busy_seconds=0.2)
        with one_act(store, "goes on"):
            pass
        with store.reading() as session:
            assert verify(session).is_whole
    with Store.open(on_network, on_network=True) as store, store.reading() as session:
        assert verify(session).is_whole


def test_a_reader_of_the_one_connection_still_cannot_write(on_network: Path) -> None:
    with (
        Store.open(on_network, on_network=True) as store,
        pytest.raises(Exception, match="may only be read"),
        store.reading() as session,
    ):
        session.connection().exec_driver_sql("DELETE FROM alembic_version")


def test_readers_and_the_writer_take_turns_on_the_one_connection(on_network: Path) -> None:
    with Store.open(on_network, on_network=True) as store:
        acts = Acts(store)
        acts.bring_in(compressor(), by="AT", act_id="one")
        seen = []

        def read() -> None:
            seen.extend(len(acts.read("26-0417").entries) for _ in range(20))

        reader = threading.Thread(target=read)
        reader.start()
        for entry in AHEAD[:12]:
            acts.record("26-0417", entry)
        back_up(store, act_id="b")
        reader.join(60)
        assert len(seen) == 20
        assert seen == sorted(seen)
        with store.reading() as session:
            assert verify(session).is_whole


Usage = namedtuple("Usage", ("total", "used", "free"))


@pytest.mark.parametrize(
    ("free", "says"), [(199_999_999, "200 MB"), (12_300_000, "12 MB"), (200_000_000, "")]
)
def test_little_room_is_told_below_200_megabytes(
    monkeypatch: pytest.MonkeyPatch, tmp_path: Path, free: int, says: str
) -> None:
    monkeypatch.setattr(shutil, "disk_usage", lambda _: Usage(10**12, 0, free))
    words = low_space_words(tmp_path)
    assert (words == "") == (says == "")
    assert says in words
    assert not words or "Make room" in words
