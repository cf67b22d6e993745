"""The portable form of a job: a JSON file that is read whole or refused whole.

A file is UTF-8 JSON. Quantities stand as text with their unit (``"4.0005 in"``), a survey carries
its unit once. A bad file is refused with the place, the value that stands there and what was
expected, in one sentence; nothing of it is taken.
"""

import functools
import os
import re
import tempfile
from collections.abc import Callable, Iterator
from pathlib import Path
from typing import Any

import fastjsonschema
import msgspec

from models import units
from models.job import Job
from models.jobfile import schema
from models.jobfile.chain import KEY, Link, plain_chain
from models.jobfile.checks import faults
from models.jobfile.faults import KIND_WORDS, MISSING, Fault, JobFileError, Words, refuse_first
from models.jobfile.text import joined, laid_out, odd_values, parsed

__all__ = ["EDITION", "dumps", "loads", "read", "write"]

EDITION = 1
"""The edition of job files that this program writes, and the newest that it reads."""

_FORM = "thirdjournal job"


def read(path: Path | str) -> Job:
    """Read a job file.

    Raises
    ------
    JobFileError
        If the file is no whole, consistent job of an edition that this program knows.
    OSError
        If the file cannot be opened.
    """
    return loads(Path(path).read_bytes())


def loads(data: bytes) -> Job:
    """Read a job from the bytes of a job file.

    Raises
    ------
    JobFileError
        If the bytes are no whole, consistent job of an edition that this program knows.
    """
    document = parsed(data)
    refuse_first(odd_values(document, ""))
    refuse_first(_foreign(document))
    _check_schema(document)
    if isinstance(document, dict):
        document.pop(KEY, None)
    try:
        job = msgspec.convert(document, Job, dec_hook=units.decode)
    except msgspec.ValidationError as problem:
        place, expected = _located(str(problem))
        raise JobFileError(place, _at(document, place), expected) from problem
    refuse_first(faults(job))
    return job


def dumps(job: Job, chain: tuple[Link, ...] = ()) -> bytes:
    """Write a job as the bytes of a job file, with its chain if there is one.

    Equal jobs with equal chains give equal bytes.

    Raises
    ------
    JobFileError
        If a stored verdict holds a number that JSON cannot hold.
    """
    document: dict[str, Any] = _plain(job)
    # Defaults are left out, but these two are what tells the file from any other JSON.
    document = {"form": job.form, "edition": job.edition} | document
    if chain:
        document[KEY] = plain_chain(chain)
    refuse_first(odd_values(document, ""))
    return (laid_out(document, 0, 0) + "\n").encode("utf-8")


def write(job: Job, path: Path | str, chain: tuple[Link, ...] = ()) -> None:
    """Write a job file so that at any instant the old or the new one stands there, whole.

    Raises
    ------
    JobFileError
        If a stored verdict holds a number that JSON cannot hold.
    OSError
        If the folder cannot be written; what stood at the path before is untouched.
    """
    target = Path(path)
    data = dumps(job, chain)
    handle, name = tempfile.mkstemp(prefix=f".{target.name}.", dir=target.parent)
    temporary = Path(name)
    try:
        with os.fdopen(handle, "wb") as file:
            file.write(data)
            file.flush()
            os.fsync(file.fileno())
        temporary.replace(target)
    except BaseException:
        temporary.unlink(missing_ok=True)
        raise
    _settle_folder(target.parent)


def _settle_folder(folder: Path) -> None:
    # A rename lasts through a power cut only once its folder is on the disk; Windows has no way
    # to ask for that, and needs none.
    if os.name == "posix":
        handle = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(handle)
        finally:
            os.close(handle)


def _foreign(document: object) -> Iterator[Fault]:
    if not isinstance(document, dict):
        yield Fault("the file", document, f"a job, which begins with the form “{_FORM}”")
        return
    form, edition = document.get("form", MISSING), document.get("edition", MISSING)
    if form != _FORM:
        yield Fault("form", form, f"“{_FORM}”")
    if isinstance(edition, bool) or not isinstance(edition, int) or edition < 1:
        yield Fault("edition", edition, f"a whole number from 1 to {EDITION}")
    elif edition > EDITION:
        yield Fault("edition", edition, f"at most {EDITION}, the newest that this program reads")


@functools.cache
def _validator() -> Callable[[object], object]:
    compiled: Callable[[object], object] = fastjsonschema.compile(
        schema.read_committed(), use_default=False, use_formats=False
    )
    return compiled


def _check_schema(document: object) -> None:
    try:
        _validator()(document)
    except fastjsonschema.JsonSchemaValueException as problem:
        raise JobFileError(*_explained(problem)) from problem


def _explained(problem: fastjsonschema.JsonSchemaValueException) -> Fault:
    place = str(problem.name).removeprefix("data").removeprefix(".")
    definition, value = problem.definition, problem.value
    if problem.rule == "required":
        name = next(name for name in problem.rule_definition if name not in value)
        return Fault(joined(place, name), MISSING, "a value here")
    if problem.rule == "additionalProperties":
        known = definition["properties"]
        name = next(name for name in value if name not in known)
        return Fault(joined(place, name), Words("unknown"), f"one of {', '.join(known)}")
    if problem.rule == "enum":
        return Fault(place, value, "one of " + ", ".join(f"“{one}”" for one in definition["enum"]))
    if problem.rule in ("minItems", "maxItems"):
        count = definition[problem.rule]
        bound = "at least" if problem.rule == "minItems" else "at most"
        return Fault(place, Words(f"a list of {len(value)}"), f"{bound} {count}")
    if "pattern" in definition:
        return Fault(place, value, definition["description"])
    kinds = definition["type"]
    named = [kinds] if isinstance(kinds, str) else kinds
    return Fault(place, value, " or ".join(KIND_WORDS[kind] for kind in named))


def _located(message: str) -> tuple[str, str]:
    found = re.fullmatch(r"(?P<what>.*?)(?: - at `\$\.?(?P<place>.*)`)?", message, re.DOTALL)
    if found is None:
        return "the file", message
    what = found["what"].rpartition("”: ")[2]
    return found["place"] or "the file", what[:1].lower() + what[1:]


def _at(document: Any, place: str) -> object:  # noqa: ANN401  (any JSON document)
    node = document
    for name, index in re.findall(r"([^.\[\]]+)|\[(\d+)\]", place):
        node = node[name] if name else node[int(index)]
    return node


def _plain(part: Any) -> Any:  # noqa: ANN401  (any part of a job, and its form in JSON)
    if isinstance(part, units.Quantity):
        return part.written
    if isinstance(part, msgspec.Struct):
        return _plain_struct(part)
    if isinstance(part, tuple):
        return [_plain(one) for one in part]
    if isinstance(part, dict):
        # Only the inputs of a verdict are named freely, and their numbers are floats when read.
        return {key: float(one) if type(one) is int else one for key, one in part.items()}
    return part


def _plain_struct(part: msgspec.Struct) -> dict[str, Any]:
    # msgspec's own omission of defaults goes by identity, so that one job read and one made would
    # be written differently.
    tag = part.__struct_config__.tag
    plain: dict[str, Any] = {str(part.__struct_config__.tag_field): tag} if tag else {}
    for field in msgspec.structs.fields(part):
        value = getattr(part, field.name)
        if field.default is msgspec.NODEFAULT or value != field.default:
            plain[field.encode_name] = _plain(value)
    return plain
