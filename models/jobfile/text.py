"""Text of a job file: strict JSON in, evenly laid out JSON out."""

import json
import math
from collections.abc import Iterator
from typing import Any

from models.jobfile.faults import Fault, JobFileError, Words

__all__ = ["joined", "laid_out", "odd_values", "parsed"]

_WIDTH = 100
# Beyond 2**53 a whole number is no longer exact in every reader of JSON.
_GREATEST_WHOLE = 2**53 - 1


def _decoded(data: bytes) -> str:
    if not data.strip():
        raise JobFileError("the file", Words("empty"), "a job in JSON")
    try:
        return data.decode("utf-8-sig")
    except UnicodeDecodeError as problem:
        byte = Words(f"0x{data[problem.start]:02x}")
        raise JobFileError(f"byte {problem.start}", byte, "text in UTF-8") from problem


class _Doubled(dict[str, Any]):
    """A group in which a name stood twice."""

    def __init__(self, pairs: list[tuple[str, Any]], name: str) -> None:
        super().__init__(pairs)
        self.name = name


class _Odd(str):
    """A number that JSON does not have, or that no reader can keep, as it was written."""

    __slots__ = ()


def _group(pairs: list[tuple[str, Any]]) -> dict[str, Any]:
    seen: set[str] = set()
    for name, _ in pairs:
        if name in seen:
            return _Doubled(pairs, name)
        seen.add(name)
    return dict(pairs)


def _whole(written: str) -> int | _Odd:
    # Longer ones need not be read to be known as too large.
    return int(written) if len(written) <= 17 else _Odd(written)


def _decimal(written: str) -> float | _Odd:
    number = float(written)
    return number if math.isfinite(number) else _Odd(written)


def parsed(data: bytes) -> object:
    """Parse bytes as JSON; what JSON should not hold is left in place, for `odd_values` to find."""
    text = _decoded(data)
    try:
        return json.loads(
            text,
            object_pairs_hook=_group,
            parse_constant=_Odd,
            parse_int=_whole,
            parse_float=_decimal,
        )
    except json.JSONDecodeError as problem:
        place = f"line {problem.lineno}, column {problem.colno}"
        rest = text[problem.pos : problem.pos + 20].split("\n")[0]
        found = rest or Words("the end of the file" if problem.pos >= len(text) else "a line's end")
        raise JobFileError(place, found, f"JSON ({problem.msg.lower()})") from problem
    except RecursionError as problem:
        raise JobFileError("the file", Words("nested too deeply"), "a job in JSON") from problem


def odd_values(node: object, place: str) -> Iterator[Fault]:
    """Find doubled names, numbers that nobody can keep, and text that is none."""
    here = place or "the file"
    if isinstance(node, _Doubled):
        yield Fault(joined(place, node.name), Words("given twice"), "each name once")
    if isinstance(node, _Odd) or (isinstance(node, float) and not math.isfinite(node)):
        too_long = str(node).lstrip("-").isdigit()
        expected = f"a number up to {_GREATEST_WHOLE}" if too_long else "a finite number"
        yield Fault(here, Words(str(node)), expected)
    elif isinstance(node, str) and not node.isascii() and not _is_text(node):
        yield Fault(here, Words("half of a character"), "text")
    elif isinstance(node, int) and abs(node) > _GREATEST_WHOLE:
        yield Fault(here, node, f"a number up to {_GREATEST_WHOLE}")
    elif isinstance(node, dict):
        for name, part in node.items():
            yield from odd_values(part, joined(place, name))
    elif isinstance(node, list | tuple):
        for index, part in enumerate(node):
            yield from odd_values(part, f"{place}[{index}]")


def _is_text(text: str) -> bool:
    return not any("\ud800" <= character <= "\udfff" for character in text)


def joined(place: str, name: str) -> str:
    """Name a place inside another."""
    return f"{place}.{name}" if place else name


def _compact(node: object) -> str:
    return json.dumps(node, ensure_ascii=False, separators=(", ", ": "), allow_nan=False)


def laid_out(node: object, depth: int, lead: int) -> str:
    """Lay a group or a list on one line where it fits, and else each part on its own."""
    line = _compact(node)
    if depth + lead + len(line) <= _WIDTH or not isinstance(node, dict | list | tuple):
        return line
    within = " " * (depth + 1)
    if isinstance(node, dict):
        begins, ends = "{", "}"
        names = [f"{_compact(name)}: " for name in node]
        parts = [
            name + laid_out(part, depth + 1, len(name) + 1)
            for name, part in zip(names, node.values(), strict=True)
        ]
    else:
        begins, ends = "[", "]"
        parts = [laid_out(part, depth + 1, 1) for part in node]
    inside = f",\n{within}".join(parts)
    return f"{begins}\n{within}{inside}\n{' ' * depth}{ends}"
