"""The content of an act as bytes, and its digest: what the journal writes and `verify` repeats.

The body holds every column of every row of the act that is not NULL, so that nothing recorded can
change unseen, and a column added later leaves old digests true.
"""

import json
from collections.abc import Iterable

from models.record.canonical import Plain, act_digest, canonical_bytes, canonical_text, short_digest
from models.record.flat import Cell, Row

__all__ = [
    "BODY_EDITION",
    "NamedRow",
    "digest_of",
    "digest_of_texts",
    "filled",
    "row_text",
    "rows_text",
]

BODY_EDITION = 1
_DUMPS = json.JSONEncoder(
    sort_keys=True, separators=(",", ":"), ensure_ascii=False, check_circular=False
).encode
NamedRow = tuple[str, Row]


def filled(row: Row) -> dict[str, Cell]:
    """Keep the columns that are not NULL."""
    return {name: cell for name, cell in row.items() if cell is not None}


def rows_text(rows: Iterable[NamedRow]) -> str:
    """List the rows of an act: table, key and short digest of each, in order."""
    return canonical_text(
        [[table, row["key"], short_digest(canonical_text(filled(row)))] for table, row in rows]
    )


def row_text(row: Row) -> str:
    """Write a recorded row in its canonical form without asking whether it has one.

    What is recorded had one when it was written; whatever was changed since gives another text, so
    that `verify` need not look at each cell first.
    """
    return _DUMPS(filled(row))


def digest_of_texts(act: Row, rows: Iterable[tuple[str, str]]) -> str:
    """Compute the digest of an act from its own row and its rows as `row_text` wrote them.

    Raises
    ------
    ValueError
        If a text holds half a character.
    """
    own = {name: cell for name, cell in filled(act).items() if name != "digest"}
    each = ",".join(f'["{table}",{text}]' for table, text in rows)
    body = f'{{"act":{_DUMPS(own)},"rows":[{each}]}}'
    return act_digest(str(act["previous_digest"]), body.encode())


def digest_of(act: Row, rows: Iterable[NamedRow]) -> str:
    """Compute the digest of an act from its own row and the rows that belong to it."""
    own = {name: cell for name, cell in filled(act).items() if name != "digest"}
    body: Plain = {"act": own, "rows": [[table, filled(row)] for table, row in rows]}
    return act_digest(act["previous_digest"], canonical_bytes(body))
