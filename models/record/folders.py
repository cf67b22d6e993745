"""What a folder lies on: a network or a disk of this computer, and whether there is room."""

import os
import re
import shutil
from pathlib import Path

__all__ = ["LEAST_FREE_BYTES", "low_space_words", "mount_table", "network_kind", "network_words"]

LEAST_FREE_BYTES = 200_000_000
"""Below this much room a person is warned before work begins [byte]."""

_MOUNTS = Path("/proc/self/mounts")
_NETWORK = frozenset(
    [
        "9p",
        "afs",
        "ceph",
        "cifs",
        "coda",
        "davfs",
        "fuse.ceph",
        "fuse.curlftpfs",
        "fuse.davfs2",
        "fuse.glusterfs",
        "fuse.rclone",
        "fuse.s3fs",
        "fuse.smbnetfs",
        "fuse.sshfs",
        "fuse.vmhgfs-fuse",
        "glusterfs",
        "gpfs",
        "lustre",
        "ncpfs",
        "nfs",
        "nfs4",
        "pvfs2",
        "smb3",
        "smbfs",
        "vboxsf",
        "vmhgfs",
    ]
)
_REMOTE_DRIVE = 4


def mount_table() -> str:
    """Read what is mounted where; nothing where the system tells it otherwise."""
    try:
        return _MOUNTS.read_text(encoding="utf-8", errors="surrogateescape")
    except OSError:
        return ""


def network_kind(folder: Path, *, mounts: str | None = None) -> str:
    """Name the network file system that a folder lies on; nothing for a disk of this computer.

    Parameters
    ----------
    folder : Path
        The folder.
    mounts : str or None
        A mount table as Linux writes it; the present one if absent.

    Returns
    -------
    str
        As the system calls it: "nfs4", "cifs"; nothing where it is none or nobody can tell.
    """
    if os.name == "nt":
        return _windows_kind(folder)
    place = folder.resolve()
    best = kind = ""
    for line in (mount_table() if mounts is None else mounts).splitlines():
        parts = line.split(" ")
        if len(parts) < 3:
            continue
        mounted = _plain(parts[1])
        # A later mount at the same place lies over the earlier one.
        if place.is_relative_to(mounted) and len(mounted) >= len(best):
            best, kind = mounted, parts[2]
    return kind if kind in _NETWORK else ""


def _plain(escaped: str) -> str:
    """Undo the octal marks for blanks and the like in a mount table."""
    return re.sub(r"\\([0-7]{3})", lambda found: chr(int(found[1], 8)), escaped)


def _windows_kind(folder: Path) -> str:
    import ctypes

    drive = folder.absolute().drive
    if drive.startswith("\\\\"):
        return "share"
    kernel = getattr(ctypes, "windll").kernel32  # noqa: B009  (there on Windows only)
    return "network drive" if kernel.GetDriveTypeW(f"{drive}\\") == _REMOTE_DRIVE else ""


def network_words(folder: Path, kind: str) -> str:
    """Say what follows from a record on a network folder, in sentences.

    Parameters
    ----------
    folder : Path
        Folder of the record.
    kind : str
        What it lies on.

    Returns
    -------
    str
        What it is, what may happen, and what holds when one goes on.
    """
    return (
        f"{folder} lies on a network ({kind}). Locks over a network cannot be trusted: two "
        "computers that write at once can damage the record, and a lost connection shows only at "
        "the next act. A folder on a disk of this computer, with backups on the network, is safe. "
        "Whoever goes on works alone: this computer keeps the record to itself while it is open."
    )


def low_space_words(folder: Path) -> str:
    """Warn where a folder has little room left; nothing where it has enough.

    Parameters
    ----------
    folder : Path
        Folder of the record.

    Returns
    -------
    str
        A sentence with the room left and the way out, or nothing.
    """
    try:
        free = shutil.disk_usage(folder).free
    except OSError:
        return ""
    if free >= LEAST_FREE_BYTES:
        return ""
    return (
        f"Only {free / 1e6:.0f} MB are free where {folder} lies. Make room before the work goes "
        "on: a reading that does not fit is not recorded."
    )
