"""The chain that a job file may carry: every act with all its rows, as the record holds them.

It stands beside the job, not in it: nothing that judges or draws needs it. Whoever reads the file
can recompute each digest from the rows alone (`models/record/links.py` says how).
"""

from typing import Any

import msgspec

from models.jobfile.faults import Fault, JobFileError
from models.jobfile.text import parsed

__all__ = ["KEY", "Cell", "Link", "chain_of", "plain_chain", "schema_of_chain"]

KEY = "chain"
Cell = str | int


class Link(msgspec.Struct, frozen=True, kw_only=True, forbid_unknown_fields=True):
    """An act with its digest, and its rows in order: table, then the columns that are filled."""

    act: dict[str, Cell]
    rows: tuple[tuple[str, dict[str, Cell]], ...] = ()


def chain_of(data: bytes) -> tuple[Link, ...]:
    """Read the chain of a job file; empty where it carries none.

    Raises
    ------
    JobFileError
        If what stands there is no chain.
    """
    document = parsed(data)
    found = document.get(KEY, []) if isinstance(document, dict) else []
    try:
        return msgspec.convert(found, tuple[Link, ...])
    except msgspec.ValidationError as problem:
        raise JobFileError(*Fault(KEY, str(problem), "acts with their rows")) from problem


def plain_chain(chain: tuple[Link, ...]) -> list[Any]:
    """Give a chain as plain JSON."""
    return [{"act": link.act, "rows": [list(row) for row in link.rows]} for link in chain]


def schema_of_chain() -> dict[str, Any]:
    """Describe the chain for the schema of job files."""
    cells = {"type": "object", "additionalProperties": {"type": ["string", "integer"]}}
    return {
        "type": "array",
        "description": "The record's chain of this job: each act with its digest and all its rows "
        "(table, then columns that are filled). A digest is SHA-256 over the words “third journal, "
        "act, edition 1” and a line feed, the 32 bytes of the previous digest, and the canonical "
        "JSON (RFC 8785) of {act, rows} without the act's own digest.",
        "items": {
            "type": "object",
            "required": ["act", "rows"],
            "additionalProperties": False,
            "properties": {
                "act": cells,
                "rows": {
                    "type": "array",
                    "items": {
                        "type": "array",
                        "items": [{"type": "string"}, cells],
                        "minItems": 2,
                        "maxItems": 2,
                    },
                },
            },
        },
    }
