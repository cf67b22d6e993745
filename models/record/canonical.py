"""One way to write a value as bytes, so that a digest over it can be computed by anybody.

The form is that of RFC 8785 (JSON canonicalisation) for values without fractions: whole numbers
up to 2**53 − 1, text in Unicode normal form C, truth values, null, lists, and objects with ASCII
names. Numbers with fractions stand as text, so no reader can round them.
"""

import hashlib
import json
import re
import unicodedata
from collections.abc import Mapping, Sequence

__all__ = [
    "FIRST_PREVIOUS",
    "Plain",
    "UnfitValueError",
    "act_digest",
    "canonical_bytes",
    "canonical_text",
    "normal",
    "parse",
    "short_digest",
]

Plain = None | bool | int | str | Sequence["Plain"] | Mapping[str, "Plain"]

FIRST_PREVIOUS = "0" * 64
_DOMAIN = b"third journal, act, edition 1\n"
_GREATEST_WHOLE = 2**53 - 1
_SURROGATE = re.compile("[\ud800-\udfff]")


class UnfitValueError(ValueError):
    """A value that has no canonical form here."""


def normal(text: str) -> str:
    """Bring text to Unicode normal form C, as everything recorded is."""
    return unicodedata.normalize("NFC", text)


def canonical_text(value: Plain) -> str:
    """Write a value in its one canonical form.

    Raises
    ------
    UnfitValueError
        If it holds a float, a whole number beyond 2**53 − 1, text outside normal form C, or a
        name outside ASCII.

    Examples
    --------
    >>> canonical_text({"b": 1, "a": ["µm", None]})
    '{"a":["µm",null],"b":1}'
    """
    _check(value)
    return json.dumps(value, sort_keys=True, separators=(",", ":"), ensure_ascii=False)


def canonical_bytes(value: Plain) -> bytes:
    """Write a value in its canonical form, as UTF-8."""
    return canonical_text(value).encode()


def parse(text: str) -> Plain:
    """Read canonical text back, and refuse any other form of the same value.

    Raises
    ------
    UnfitValueError
        If the text is no JSON, or not in the canonical form.
    """
    try:
        value: Plain = json.loads(text)
    except ValueError as error:
        raise UnfitValueError(f"no JSON: {error}") from error
    if canonical_text(value) != text:
        raise UnfitValueError("JSON, but not in its canonical form")
    return value


def short_digest(text: str) -> str:
    """Digest a row's canonical text so far that a change can be told and located."""
    return hashlib.sha256(text.encode()).hexdigest()[:16]


def act_digest(previous: str, body: bytes) -> str:
    """Digest an act over its canonical body and the digest of the act before it."""
    return hashlib.sha256(_DOMAIN + bytes.fromhex(previous) + body).hexdigest()


def _check(value: object) -> None:
    if value is None or isinstance(value, bool):
        return
    if isinstance(value, str):
        _check_text(value)
    elif isinstance(value, int):
        if abs(value) > _GREATEST_WHOLE:
            raise UnfitValueError(f"{value} is beyond the exact whole numbers of JSON")
    elif isinstance(value, Mapping):
        for name, part in value.items():
            _check_name(name)
            _check(part)
    elif isinstance(value, Sequence) and not isinstance(value, bytes):
        for part in value:
            _check(part)
    else:
        raise UnfitValueError(f"{value!r} has no canonical form; write it as text")


def _check_name(name: object) -> None:
    if not isinstance(name, str) or not name.isascii():
        raise UnfitValueError(f"the name {name!r} is not plain ASCII text")


def _check_text(text: str) -> None:
    if text.isascii():
        return
    if not unicodedata.is_normalized("NFC", text):
        raise UnfitValueError(f"{text!r} is not in normal form C")
    if _SURROGATE.search(text):
        raise UnfitValueError(f"{text!r} holds half a character")
