"""The content of an act as bytes, and its digest: what the journal writes and `verify` repeats.

The body holds every column of every row of the act that is not NULL, so that nothing recorded can
change unseen, and a column added later leaves old digests true.
"""

from collections.abc import Iterable

from models.record.canonical import Plain, act_digest, canonical_bytes, canonical_text, short_digest
from models.record.flat import Cell, Row

__all__ = ["BODY_EDITION", "NamedRow", "digest_of", "filled", "rows_text"]

BODY_EDITION = 1
NamedRow = tuple[str, Row]


def filled(row: Row) -> dict[str, Cell]:
    """Keep the columns that are not NULL."""
    return {name: cell for name, cell in row.items() if cell is not None}


def rows_text(rows: Iterable[NamedRow]) -> str:
    """List the rows of an act: table, key and short digest of each, in order."""
    return canonical_text(
        [[table, row["key"], short_digest(canonical_text(filled(row)))] for table, row in rows]
    )


def digest_of(act: Row, rows: Iterable[NamedRow]) -> str:
    """Compute the digest of an act from its own row and the rows that belong to it."""
    own = {name: cell for name, cell in filled(act).items() if name != "digest"}
    body: Plain = {"act": own, "rows": [[table, filled(row)] for table, row in rows]}
    return act_digest(act["previous_digest"], canonical_bytes(body))
