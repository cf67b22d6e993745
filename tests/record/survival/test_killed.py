"""Killed at every statement boundary of every kind of act: nothing acknowledged is lost."""

import json
import subprocess
import sys
from pathlib import Path
from typing import Any

import pytest

from tests.journeys.test_random_rotors import SLICE, slice_of_this_commit

ROOT = Path(__file__).resolve().parents[3]
# A run takes one kind in so many, and one of their boundaries in so many; which ones changes with
# the commit.
_KINDS_IN, _ONE_IN = 6, 13


def killed(folder: Path, *, part: int, of: int, kinds_of: int = 1) -> dict[str, Any]:
    """Run the program that kills, in a process that has nothing open."""
    done = subprocess.run(
        [sys.executable, "-m", "tests.record.survival.killed", str(folder)]
        + [str(one) for one in (part, of, kinds_of)],
        cwd=ROOT,
        capture_output=True,
        text=True,
        timeout=3000,
        check=False,
    )
    assert done.returncode == 0, done.stderr
    found: dict[str, Any] = json.loads(done.stdout)
    return found


def test_a_slice_of_all_boundaries_leaves_the_act_whole_or_absent(tmp_path: Path) -> None:
    found = killed(tmp_path, part=slice_of_this_commit() // SLICE, of=_ONE_IN, kinds_of=_KINDS_IN)

    assert found["faults"] == []
    assert min(found["boundaries"].values()) > 10
    assert found["lives"] >= sum(found["boundaries"].values()) // _ONE_IN


@pytest.mark.whole
def test_every_boundary_leaves_the_act_whole_or_absent(tmp_path: Path) -> None:
    found = killed(tmp_path, part=0, of=1)

    assert found["faults"] == []
    assert found["lives"] == sum(found["boundaries"].values()) > 2000
