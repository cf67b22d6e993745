"""Openings of a record that write: a new one is made, an older form is brought up to today's."""

import gzip
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from functools import partial
from pathlib import Path

from models.record.store import FILE_NAME, Store
from tests.record.survival.cases import verified
from tests.record.test_kept_shapes import RELEASED, SHAPES

__all__ = ["OPENINGS", "Opening"]


@dataclass(frozen=True)
class Opening:
    """What lies in the folder before; to open it is the act."""

    before: Callable[[Path], None]

    @contextmanager
    def opened(self, folder: Path) -> Iterator[Callable[[], object]]:
        """Hand out the opening, which may be done again and again."""
        yield lambda: Store.open(folder).close()

    def repeat(self, folder: Path) -> list[str]:
        """Open it twice more, and say what does not verify."""
        Store.open(folder).close()
        with Store.open(folder) as store:
            return verified(store)


def _nothing(folder: Path) -> None:
    """Leave the folder empty."""


def _of_form(form: str, folder: Path) -> None:
    text = gzip.decompress((SHAPES / f"{form}.thirdjournal.gz").read_bytes())
    (folder / FILE_NAME).write_bytes(text)


OPENINGS: dict[str, Opening] = {
    "a new record": Opening(_nothing),
    **{f"bring up {form}": Opening(partial(_of_form, form)) for form in RELEASED},
}
