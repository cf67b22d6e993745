"""Which tests name an entry: read from a list made beside the tests, which are not shipped."""

import csv
from collections import defaultdict
from dataclasses import dataclass
from functools import cache
from importlib.resources import files

from models.handbook.entry import Published

__all__ = ["Tested", "tested"]

LISTED = "handbook_tests.tsv"


@dataclass(frozen=True)
class Tested:
    """What is known about the tests of one entry."""

    tests: tuple[str, ...] = ()
    second_paths: tuple[str, ...] = ()
    published: tuple[Published, ...] = ()


def tested(name: str) -> Tested:
    """Give the tests of an entry; none where it is not listed."""
    return _read().get(name, Tested())


@cache
def _read() -> dict[str, Tested]:
    tests, paths, lists = defaultdict(list), defaultdict(list), defaultdict(list)
    rows: dict[str, list[Published]] = defaultdict(list)
    text = files("models.data").joinpath(LISTED).read_text(encoding="utf-8")
    for kind, of, *more in sorted(
        set(map(tuple, csv.reader(text.splitlines(), delimiter="\t", quoting=csv.QUOTE_NONE)))
    ):
        if kind == "test":
            tests[of].append(more[0])
        elif kind == "second path":
            paths[of].append(more[0])
        elif kind == "published":
            lists[of].append(more[0])
        elif kind == "row":
            rows[of].append(Published(case=more[0], printed=more[1], source=more[2]))
    return {
        name: Tested(
            tests=tuple(tests[name]),
            second_paths=tuple(paths[name]),
            published=tuple(row for one in lists[name] for row in rows[one]),
        )
        for name in {*tests, *paths, *lists}
    }
