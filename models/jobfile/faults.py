"""Faults of a job file: where, what stands there, what was expected."""

import json
from collections.abc import Iterator
from typing import NamedTuple

__all__ = ["KIND_WORDS", "MISSING", "Fault", "JobFileError", "Words", "refuse_first"]

_LONGEST_SHOWN = 60

KIND_WORDS = {
    "string": "text",
    "object": "a group of named values",
    "array": "a list",
    "integer": "a whole number",
    "number": "a number",
    "boolean": "true or false",
    "null": "null",
}
"""JSON's kinds of values, in plain words."""


class Words(str):
    """Words about a value, to stand without quotation marks."""

    __slots__ = ()


MISSING = Words("missing")
"""Stands for the value where there is none."""


class Fault(NamedTuple):
    """What is wrong with a job: where, what stands there, what was expected."""

    place: str
    value: object
    expected: str


class JobFileError(ValueError):
    """A job file that cannot be taken: the place, what stands there and what was expected."""

    def __init__(self, place: str, value: object, expected: str) -> None:
        self.place = place
        self.value = value
        self.expected = expected
        super().__init__(f"{place} is {_shown(value)}; expected is {expected}.")


def refuse_first(faults: Iterator[Fault]) -> None:
    """Refuse the job at its first fault, if there is one."""
    for fault in faults:
        raise JobFileError(*fault)


def _shown(value: object) -> str:
    if isinstance(value, dict | list):
        return KIND_WORDS["object" if isinstance(value, dict) else "array"]
    text = value if isinstance(value, str) else json.dumps(value)
    short = text if len(text) <= _LONGEST_SHOWN else text[:_LONGEST_SHOWN] + "…"
    quoted = isinstance(value, str) and not isinstance(value, Words)
    return f"“{short}”" if quoted else short
