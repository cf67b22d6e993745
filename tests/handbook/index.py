"""Write down which tests name a rule or a formula, for the handbook of the installed program.

`python -m tests.handbook.index` writes `models/data/handbook_tests.tsv` from the tests' syntax
trees. Lines are independent, so that two people's lists join without a conflict.
"""

import ast
import importlib
import sys
from collections.abc import Iterator
from decimal import Decimal, InvalidOperation
from functools import cache
from pathlib import Path
from typing import Any

from models.handbook.formulas import public_functions
from models.rules import ALL_RULES

ROOT = Path(__file__).resolve().parents[2]
LIST = ROOT / "models/data/handbook_tests.tsv"
# Folders of which a test may judge a formula or a rule.
FOLDERS = ("app", "assess", "engineering", "journeys", "published", "rules", "second_paths")


class Module:
    """One file of tests: what it imports, and what each of its tests reaches."""

    def __init__(self, path: Path) -> None:
        self.path = path
        self.text = path.read_text(encoding="utf-8").splitlines()
        tree = ast.parse("\n".join(self.text))
        self.imported: dict[str, str] = {}
        self.local: dict[str, ast.AST] = {}
        self.tests: list[ast.FunctionDef] = []
        for node in tree.body:
            self._take(node)

    def _take(self, node: ast.stmt) -> None:
        if isinstance(node, ast.ImportFrom) and node.module and node.level == 0:
            for one in node.names:
                self.imported[one.asname or one.name] = f"{node.module}.{one.name}"
        elif isinstance(node, ast.FunctionDef):
            self.local[node.name] = node
            if node.name.startswith("test_"):
                self.tests.append(node)
        elif isinstance(node, ast.ClassDef):
            self.local[node.name] = node
        elif isinstance(node, ast.Assign | ast.AnnAssign) and node.value is not None:
            targets = node.targets if isinstance(node, ast.Assign) else [node.target]
            for target in targets:
                for inner in ast.walk(target):
                    if isinstance(inner, ast.Name):
                        self.local[inner.id] = node

    def reached(self, node: ast.AST, seen: set[str] | None = None) -> Iterator[str]:
        """Name what a test reaches: imported things by path, and plain texts in quotes."""
        seen = set() if seen is None else seen
        for inner in ast.walk(node):
            if isinstance(inner, ast.Constant) and isinstance(inner.value, str):
                yield f'"{inner.value}"'
            elif isinstance(inner, ast.Attribute) and isinstance(inner.value, ast.Name):
                whole = self.imported.get(inner.value.id)
                yield from _followed(f"{whole}.{inner.attr}", seen) if whole else ()
            names = []
            if isinstance(inner, ast.Name):
                names = [inner.id]
            elif isinstance(inner, ast.arg):
                # A fixture goes by the name of its parameter.
                names = [inner.arg]
            for name in names:
                if name in self.imported:
                    yield from _followed(self.imported[name], seen)
                elif name in self.local and name not in seen and self.local[name] is not node:
                    seen.add(name)
                    yield from self.reached(self.local[name], seen)


@cache
def module_at(path: Path) -> Module:
    """Read a file of tests once."""
    return Module(path)


def _followed(path: str, seen: set[str]) -> Iterator[str]:
    """Name an imported thing; what comes from a helper of the tests is followed into it."""
    yield path
    module, _, name = path.rpartition(".")
    place = ROOT / (module.replace(".", "/") + ".py")
    if not path.startswith("tests.") or path in seen or not place.is_file():
        return
    if path.startswith(("tests.published.", "tests.second_paths.")):
        return
    seen.add(path)
    helper = module_at(place)
    if name in helper.local:
        yield from helper.reached(helper.local[name], seen)


@cache
def homes() -> dict[int, str]:
    """Name each public formula by the object itself, wherever it is imported from."""
    return {id(one): name for name, one in public_functions()}


@cache
def formula_named(path: str) -> str | None:
    """Name the formula behind an imported path, also through a module that gathers several."""
    if not path.startswith("models.engineering."):
        return None
    module, _, name = path.rpartition(".")
    try:
        return homes().get(id(getattr(importlib.import_module(module), name, None)))
    except ImportError:
        return None


@cache
def rows_of(path: str) -> tuple[tuple[str, str, str], ...]:
    """Give case, printed numbers and source of each row of a published table."""
    module, _, name = path.rpartition(".")
    try:
        table: Any = getattr(importlib.import_module(module), name, None)
    except ImportError:
        return ()
    if not isinstance(table, list | tuple):
        return ()
    return tuple(_row(name, place, row) for place, row in enumerate(table, 1)
                 if hasattr(row, "_fields"))  # fmt: skip


def _row(table: str, place: int, row: Any) -> tuple[str, str, str]:
    texts = {name: value for name, value in zip(row._fields, row, strict=True)
             if isinstance(value, str)}  # fmt: skip
    printed = [_number(one) for each in row for one in _flat(each) if _number(one)]
    source = texts.get("source", "stated beside the table")
    case = texts.get("case", texts.get("name", f"{table.lower().replace('_', ' ')}, row {place}"))
    if _number(case):
        case = f"{table.lower().replace('_', ' ')}, row {place}"
    return _plain(case), _plain("; ".join(printed)), _plain(source)


def _flat(value: Any) -> Iterator[str]:
    if isinstance(value, str):
        yield value
    elif hasattr(value, "expected") and hasattr(value, "abs"):
        # A comparison made by `printed`: the number in SI, to the digits that were printed.
        yield f"{value.expected:.4g}"
    elif isinstance(value, tuple):
        for one in value:
            yield from _flat(one)


def _number(text: str) -> str:
    try:
        Decimal(text)
    except InvalidOperation:
        return ""
    return text


def _plain(text: str) -> str:
    return " ".join(text.split())


def lines() -> set[str]:
    """Give every line of the list."""
    rules = {one.id for one in ALL_RULES}
    judges = {f"{one.judge.__module__}.{one.judge.__name__}": one.id for one in ALL_RULES}
    found: set[str] = set()
    files = [
        one
        for folder in FOLDERS
        for one in (ROOT / "tests" / folder).rglob("test_*.py")
        if one.name != "test_handbook.py"
    ]  # fmt: skip  (these test the handbook itself)
    for path in sorted(files):
        module = Module(path)
        place = path.relative_to(ROOT).as_posix()
        for test in module.tests:
            reached = set(module.reached(test))
            named = {name for one in reached if (name := formula_named(one))}
            named |= {one[1:-1] for one in reached if one[1:-1] in rules}
            named |= {judges[one] for one in reached if one in judges}
            seconds = {_second(one) for one in reached if one.startswith("tests.second_paths.")}
            tables = {one for one in reached if one.startswith("tests.published.") and rows_of(one)}
            if _says_second_path(module.text, test):
                seconds.add(f"{place}::{test.name}")
            for name in named:
                found.add(f"test\t{name}\t{place}::{test.name}")
                found |= {f"second path\t{name}\t{one}" for one in seconds}
                found |= {f"published\t{name}\t{_table(one)}" for one in tables}
            if named:
                found |= {
                    "\t".join(("row", _table(one), *row)) for one in tables for row in rows_of(one)
                }
    return found


def _says_second_path(lines: list[str], test: ast.FunctionDef) -> bool:
    """Whether a comment in a test says that it holds a second path of its own."""
    body = lines[test.lineno - 1 : test.end_lineno]
    return any("# second path" in line.casefold() for line in body)


def _second(path: str) -> str:
    return "/".join(path.split(".")[:3]) + ".py"


def _table(path: str) -> str:
    return path.removeprefix("tests.published.")


def main() -> None:
    """Write the list."""
    listed = lines()
    LIST.write_text("\n".join(sorted(listed)) + "\n", encoding="utf-8")
    sys.stdout.write(f"{len(listed)} lines written to {LIST.relative_to(ROOT)}\n")


if __name__ == "__main__":
    main()
