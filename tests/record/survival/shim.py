"""The preloaded shim: compiled here, armed and disarmed from inside the process that has it."""

import ctypes
import subprocess
from enum import IntEnum
from pathlib import Path

__all__ = ["Fault", "Shim", "compiled"]

_SOURCE = Path(__file__).with_name("shim.c")


class Fault(IntEnum):
    """What happens at the n-th call that changes a file of the record."""

    COUNT = 0
    KILLED = 1
    TORN = 2
    IO_ERROR_ONCE = 3
    IO_ERROR_FOR_EVER = 4
    FULL_ONCE = 5
    FULL_FOR_EVER = 6

    @property
    def kills(self) -> bool:
        """Whether the process does not outlive it."""
        return self in (Fault.KILLED, Fault.TORN)


def compiled(folder: Path) -> Path:
    """Compile the shim; it is loaded by LD_PRELOAD."""
    library = folder / "shim.so"
    subprocess.run(
        ["gcc", "-O2", "-Wall", "-Wextra", "-Werror", "-shared", "-fPIC", "-o", str(library),
         str(_SOURCE), "-ldl"],
        check=True,
    )  # fmt: skip
    return library


class Shim:
    """The shim of this process, which must have been preloaded."""

    def __init__(self) -> None:
        loaded = ctypes.CDLL(None)
        self._arm = loaded.shim_arm
        self._arm.argtypes = (ctypes.c_char_p, ctypes.c_int, ctypes.c_long)
        self._arm.restype = None
        self._disarm = loaded.shim_disarm
        self._disarm.restype = ctypes.c_long

    def arm(self, folder: Path, fault: Fault, at: int) -> None:
        """Let the `at`-th call below a folder meet its fault, from 1."""
        self._arm(str(folder).encode(), int(fault), at)

    def disarm(self) -> int:
        """Go on without faults; give how many calls there were."""
        return int(self._disarm())
