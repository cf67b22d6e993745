"""Let the disk fail under the program's own writer, at every call that changes its files.

    LD_PRELOAD=shim.so python -m tests.record.survival.faults FOLDER PART OF

For each of some acts, small and large, and each opening that writes: a child forked warm opens the
record, and at the n-th write, sync, truncation, making or removing of a file it is killed, killed
in the middle of the write, or meets an I/O error or a full disk, once or from then on. One that
lives says what the program said, and tries again once the disk is well. Every OF-th life is taken,
beginning with PART. What was found is printed as JSON.
"""

import json
import sys
from collections import Counter
from collections.abc import Callable
from pathlib import Path
from typing import Any

from models.record.errors import CommitUnknownError, DiskFaultError, DiskFullError, RecordError
from models.record.tables import recorded_tables
from tests.record.survival.cases import CASES
from tests.record.survival.children import in_a_child
from tests.record.survival.killed import Bases, Killing, State, state_of, warm
from tests.record.survival.openings import OPENINGS
from tests.record.survival.shim import Fault, Shim

__all__ = ["main"]

# What they write is alike for all kinds: a few pages, many pages, many acts in one.
KINDS = {
    name: CASES[name]
    for name in ("bring_in", "record Mount", "add_reading RunoutReading", "close_survey", "restore")
} | OPENINGS
SENTENCES = {
    Fault.IO_ERROR_ONCE: (DiskFaultError, CommitUnknownError),
    Fault.IO_ERROR_FOR_EVER: (DiskFaultError, CommitUnknownError),
    Fault.FULL_ONCE: (DiskFullError,),
    Fault.FULL_FOR_EVER: (DiskFullError,),
}


_RECORDED = ("act", *(table.name for table in recorded_tables()))


class Failing(Killing):
    """One act on a disk that fails."""

    def __init__(self, *of: Any) -> None:
        super().__init__(*of)
        self._shim = Shim()
        (self.calls,) = in_a_child(self._count).told

    def _count(self, tell: Callable[[Any], None]) -> None:
        folder = self.fresh()
        with self.case.opened(folder) as act:
            self._shim.arm(folder, Fault.COUNT, 0)
            act()
            tell(self._shim.disarm())

    def fail(self, fault: Fault, at: int, said: "Counter[str]") -> str:
        """Let one call fail; say what is wrong, or nothing."""
        folder = self.fresh()
        try:
            ended = in_a_child(lambda tell: self._with_fault(folder, fault, at, tell))
        except RuntimeError as error:
            return str(error)
        if fault.kills != ended.killed:
            return f"killed: {ended.killed}"
        if fault.kills:
            return self.look(folder, there=None)
        sentence, kind, there = ended.told
        said[kind] += 1
        if kind and not any(kind == one.__name__ for one in SENTENCES[fault]):
            return f"says {kind}: {sentence}"
        if kind and "Nothing" in sentence and not _alike(there, self.before):
            return f"says “{sentence}”, but something was recorded"
        if not kind and not self.like_after(there):
            return "was acknowledged, but is not wholly there"
        return self.look(folder, there=True)

    def _with_fault(self, folder: Path, fault: Fault, at: int, tell: Callable[[Any], None]) -> None:
        sentence = kind = ""
        with self.case.opened(folder) as act:
            self._shim.arm(folder, fault, at)
            try:
                act()
            except RecordError as trouble:
                sentence, kind = str(trouble), type(trouble).__name__
            self._shim.disarm()
            tell(sentence)
            tell(kind)
            # In a connection of its own, while the one that met the fault is still open.
            tell(state_of(folder))
            act()


def _alike(state: State, before: State) -> bool:
    """Whether nothing was recorded; a record that is new and empty holds nothing either."""
    is_new = not before and all(not rows for name, (rows, _) in state.items() if name in _RECORDED)
    return is_new or state == before


def main(folder: Path, part: int, of: int) -> dict[str, Any]:
    """Take every `of`-th call, fault and kind of act in one row."""
    bases = Bases(folder / "bases")
    warm(bases, KINDS.values(), folder / "warm")
    lives = 0
    place = 0
    calls: dict[str, int] = {}
    said: Counter[str] = Counter()
    faults: list[str] = []
    for name, case in KINDS.items():
        failing = Failing(case, bases.before(case), folder / "work")
        calls[name] = failing.calls
        for at in range(1, failing.calls + 1):
            for fault in Fault:
                place += fault is not Fault.COUNT
                if fault is Fault.COUNT or place % of != part % of:
                    continue
                lives += 1
                wrong = failing.fail(fault, at, said)
                if wrong:
                    faults.append(f"{name}, {fault.name} at {at} of {failing.calls}: {wrong}")
    return {"lives": lives, "calls": calls, "said": said, "faults": faults}


if __name__ == "__main__":
    sys.stdout.write(json.dumps(main(Path(sys.argv[1]), int(sys.argv[2]), int(sys.argv[3]))))
