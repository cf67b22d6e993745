"""Children forked from a parent that has loaded everything and opened nothing."""

import os
import pickle
import signal
import traceback
from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

__all__ = ["Ended", "in_a_child"]


@dataclass(frozen=True)
class Ended:
    """How a child ended: what it told before that, in order, and whether it was killed."""

    told: tuple[Any, ...]
    killed: bool


def in_a_child(work: Callable[[Callable[[Any], None]], None]) -> Ended:
    """Run `work` in a forked child; it is given a function that tells the parent something.

    Raises
    ------
    RuntimeError
        If the child ended by an error of its own.
    """
    hears, tells = os.pipe()
    child = os.fork()
    if child == 0:
        os.close(hears)
        status = 1
        try:
            work(lambda what: _tell(tells, what))
            status = 0
        except BaseException:
            traceback.print_exc()
        finally:
            # Nothing is tidied up: neither is it when the power fails.
            os._exit(status)
    os.close(tells)
    with os.fdopen(hears, "rb") as pipe:
        text = pipe.read()
    _, status = os.waitpid(child, 0)
    killed = os.WIFSIGNALED(status) and os.WTERMSIG(status) == signal.SIGKILL
    if not killed and status != 0:
        raise RuntimeError(f"the child ended with {os.waitstatus_to_exitcode(status)}")
    return Ended(tuple(_parts(text)), killed)


def _tell(pipe: int, what: Any) -> None:
    text = pickle.dumps(what)
    os.write(pipe, len(text).to_bytes(4, "big") + text)


def _parts(text: bytes) -> list[Any]:
    parts = []
    while len(text) >= 4:
        length = int.from_bytes(text[:4], "big")
        parts.append(pickle.loads(text[4 : 4 + length]))
        text = text[4 + length :]
    return parts
