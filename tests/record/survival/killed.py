"""Kill the program's own writer at every statement boundary of every kind of act.

    python -m tests.record.survival.killed FOLDER PART OF [KINDS_OF]

Each boundary has a life of its own: a child forked warm opens the record, begins the act and is
killed (SIGKILL) before its n-th statement, those of triggers among them, or after the last one and
before it could tell anybody. A second child then looks at what is there, as the program would
after a restart, and repeats the act with the same identifier. Every KINDS_OF-th kind is taken, and
of their boundaries every OF-th, beginning with PART. What was found is printed as JSON: lives,
boundaries by kind, faults.
"""

import gc
import hashlib
import json
import os
import shutil
import signal
import sqlite3
import sys
from collections.abc import Callable, Iterable
from pathlib import Path
from typing import Any

from sqlalchemy import Engine, event

from models.record import making, store
from models.record.connections import engine_for
from models.record.store import FILE_NAME, Store
from tests.record.survival.cases import CASES, Case
from tests.record.survival.children import in_a_child
from tests.record.survival.openings import OPENINGS, Opening

__all__ = ["Killing", "State", "main", "state_of"]

# Table by table: how many rows, and a digest over all of them.
State = dict[str, tuple[int, str]]


def state_of(folder: Path) -> State:
    """Read every row of every table, in a child's own connection; nothing if there is no file."""
    path = folder / FILE_NAME
    if not path.exists():
        return {}
    raw = sqlite3.connect(path)
    names = raw.execute("SELECT name FROM sqlite_schema WHERE type = 'table' ORDER BY name")
    found: State = {}
    for (name,) in names.fetchall():
        rows = sorted(repr(row) for row in raw.execute(f'SELECT * FROM "{name}"'))
        found[name] = (len(rows), hashlib.sha256("\n".join(rows).encode()).hexdigest())
    raw.close()
    return found


def watch_statements(heard: Callable[[str], None]) -> None:
    """Let every connection that writes tell each statement before it runs."""

    def watched(path: Path, *, writing: bool, **more: Any) -> Engine:
        engine = engine_for(path, writing=writing, **more)
        if writing:
            event.listen(engine, "connect", lambda raw, _: raw.set_trace_callback(heard))
        return engine

    for module in (store, making):
        module.engine_for = watched  # type: ignore[assignment]


class Killing:
    """One kind of act: the record before it, and all that may be seen after it."""

    def __init__(self, case: Case | Opening, base: Path, work: Path) -> None:
        self.case = case
        self._base = base
        self._work = work
        ended = in_a_child(self._undisturbed)
        self.before: State = ended.told[0]
        self.after: State = ended.told[1]
        self.statements: list[str] = ended.told[2]

    def fresh(self) -> Path:
        """Lay the record as it stood before out anew; nobody has it open."""
        shutil.rmtree(self._work, ignore_errors=True)
        shutil.copytree(self._base, self._work)
        return self._work

    def _undisturbed(self, tell: Callable[[Any], None]) -> None:
        folder = self.fresh()
        tell(state_of(folder))
        statements: list[str] = []
        watch_statements(statements.append)
        with self.case.opened(folder) as act:
            statements.clear()
            act()
        tell(state_of(folder))
        tell(statements)

    @property
    def boundaries(self) -> int:
        """How many lives it takes: before each statement, after the last, after the answer."""
        return len(self.statements) + 2

    def life(self, number: int) -> str:
        """Kill at one boundary, look, and repeat; say what is wrong, or nothing."""
        folder = self.fresh()
        ended = in_a_child(lambda tell: self._until_killed(folder, number, tell))
        if not ended.killed:
            return "was not killed"
        acknowledged = ended.told == ("acknowledged",)
        if acknowledged != (number == self.boundaries - 1):
            return f"acknowledged: {acknowledged}"
        return self.look(folder, there=number >= len(self.statements))

    def _until_killed(self, folder: Path, number: int, tell: Callable[[Any], None]) -> None:
        left = [-1]

        def heard(_: str) -> None:
            if left[0] == 0:
                os.kill(os.getpid(), signal.SIGKILL)
            left[0] -= 1

        watch_statements(heard)
        with self.case.opened(folder) as act:
            left[0] = number
            act()
        if number > len(self.statements):
            tell("acknowledged")
        os.kill(os.getpid(), signal.SIGKILL)

    def look(self, folder: Path, *, there: bool | None) -> str:
        """Look at what a killed one left, repeat its act twice; say what is wrong, or nothing.

        `there` says whether the act must be there or must not; None where either may be.
        """
        first, again, troubles = in_a_child(lambda tell: self._look(folder, tell)).told
        if troubles:
            return f"the chain does not verify: {troubles}"
        is_there, is_absent = self.like_after(first), first == self.before
        if there is None and not is_there and not is_absent:
            return "the act is half there"
        if there is True and not is_there:
            return "what was on the disk is not wholly there"
        if there is False and not is_absent:
            return "what was not on the disk is not wholly absent"
        if not self.like_after(again):
            return "the act repeated is not there exactly once"
        return ""

    def _look(self, folder: Path, tell: Callable[[Any], None]) -> None:
        tell(state_of(folder))
        troubles = self.case.repeat(folder)
        tell(state_of(folder))
        tell(troubles)

    def like_after(self, state: State) -> bool:
        """Whether each table has as many rows as after the act undisturbed."""
        return {name: rows for name, (rows, _) in state.items()} == {
            name: rows for name, (rows, _) in self.after.items()
        }


class Bases:
    """Records as they stand before an act, each made once; an empty one to begin with."""

    def __init__(self, folder: Path) -> None:
        self._folder = folder
        self._made: dict[Any, Path] = {}
        folder.mkdir()
        with Store.open(folder):
            self._empty = (folder / FILE_NAME).read_bytes()
        (folder / FILE_NAME).unlink()

    def before(self, case: Case | Opening) -> Path:
        """Give the folder of the record as it stands before a case."""
        of = case.fill if isinstance(case, Case) else case.before
        if of not in self._made:
            made = self._folder / str(len(self._made))
            made.mkdir()
            if isinstance(case, Case):
                (made / FILE_NAME).write_bytes(self._empty)
            case.before(made)
            self._made[of] = made
        return self._made[of]


def warm(bases: Bases, cases: Iterable[Case | Opening], folder: Path) -> None:
    """Do one act of each kind, so that a child finds everything loaded and nothing open."""
    for number, case in enumerate(cases):
        work = folder / str(number)
        shutil.copytree(bases.before(case), work)
        with case.opened(work) as act:
            act()
        case.repeat(work)
    gc.collect()
    gc.freeze()


def main(folder: Path, part: int, of: int, kinds_of: int = 1) -> dict[str, Any]:
    """Take every `kinds_of`-th kind, and of all their boundaries in one row every `of`-th."""
    every = sorted({**CASES, **OPENINGS}.items())
    chosen = every[part % kinds_of :: kinds_of]
    bases = Bases(folder / "bases")
    warm(bases, (case for _, case in chosen), folder / "warm")
    lives = 0
    place = 0
    boundaries: dict[str, int] = {}
    faults: list[str] = []
    for name, case in chosen:
        killing = Killing(case, bases.before(case), folder / "work")
        boundaries[name] = killing.boundaries
        for boundary in range(killing.boundaries):
            place += 1
            if place % of != part % of:
                continue
            lives += 1
            said = killing.life(boundary)
            if said:
                statement = [*killing.statements, "the answer", "the end"][boundary]
                faults.append(f"{name}, killed at {boundary} ({statement[:80]}): {said}")
    return {"lives": lives, "boundaries": boundaries, "faults": faults}


if __name__ == "__main__":
    sys.stdout.write(json.dumps(main(Path(sys.argv[1]), *map(int, sys.argv[2:]))))
