"""Change one constant, sign or comparison at a time, and see whether any test notices.

Run it as `python -m tests.bench.mutants models/engineering/fits.py …` (folders are taken whole);
`--out FILE` keeps a line of JSON for each mutant. It asserts nothing.

Own, since the published tools start a new interpreter for each mutant, some 2 s on top of the
tests. Here a parent collects the tests that reach a module once; each mutant is a forked child in
which the module's functions are given the code of one changed syntax tree, and which runs those
tests, the quickest first, up to the first that fails. Tests by property run with few examples: a
mutant found by luck is no merit. What a test's table computes when it is loaded stays unchanged.
"""

import argparse
import ast
import copy
import functools
import gc
import importlib
import io
import json
import os
import signal
import sys
import time
import types
from collections.abc import Callable, Iterator
from contextlib import redirect_stderr, redirect_stdout
from dataclasses import dataclass
from pathlib import Path
from typing import Any

# Threads of the linear algebra do not survive a fork.
os.environ["OPENBLAS_NUM_THREADS"] = "1"

ROOT = Path(__file__).resolve().parents[2]
SECONDS = 60
# The project's own settings would load the window's library in every child.
_OPTIONS = (
    *("-x", "-q", "-c", "/dev/null", "--rootdir", str(ROOT), "-p", "no:cacheprovider"),
    *("-p", "no:pytestqt", "--doctest-modules", "--import-mode=importlib"),
    *("-o", "doctest_optionflags=NUMBER NORMALIZE_WHITESPACE"),
)
SWAPS: dict[type[ast.AST], tuple[type[ast.AST], ...]] = {
    ast.Add: (ast.Sub,),
    ast.Sub: (ast.Add,),
    ast.Mult: (ast.Div,),
    ast.Div: (ast.Mult,),
    ast.Pow: (ast.Mult,),
    ast.Lt: (ast.LtE, ast.Gt),
    ast.LtE: (ast.Lt, ast.Gt),
    ast.Gt: (ast.GtE, ast.Lt),
    ast.GtE: (ast.Gt, ast.Lt),
    ast.Eq: (ast.NotEq,),
    ast.NotEq: (ast.Eq,),
    ast.And: (ast.Or,),
    ast.Or: (ast.And,),
    ast.Is: (ast.IsNot,),
    ast.IsNot: (ast.Is,),
}


@dataclass(frozen=True)
class Mutant:
    """One change: where, in words, and the whole changed tree."""

    line: int
    words: str
    tree: ast.Module


def mutants(source: str) -> Iterator[Mutant]:
    """Change one thing at a time; texts, annotations and lists of names stay."""
    tree = ast.parse(source)
    places = [node for node in ast.walk(tree) if _may_change(node)]
    left_out = {
        id(inner)
        for node in ast.walk(tree)
        for part in _left_alone(node)
        for inner in ast.walk(part)
    }
    for node in places:
        if id(node) in left_out:
            continue
        for words, change in _changes(node):
            saved = copy.copy(node.__dict__)
            change(node)
            yield Mutant(getattr(node, "lineno", 0), words, copy.deepcopy(tree))
            node.__dict__.clear()
            node.__dict__.update(saved)


def _may_change(node: ast.AST) -> bool:
    return isinstance(
        node, ast.Constant | ast.BinOp | ast.UnaryOp | ast.Compare | ast.BoolOp | ast.Call
    )


def _left_alone(node: ast.AST) -> Iterator[ast.AST]:
    if isinstance(node, ast.arg) and node.annotation is not None:
        yield node.annotation
    if isinstance(node, ast.FunctionDef) and node.returns is not None:
        yield node.returns
    if isinstance(node, ast.AnnAssign):
        yield node.annotation
    # A message's figures are words.
    if isinstance(node, ast.Raise | ast.JoinedStr):
        yield node
    if isinstance(node, ast.FunctionDef | ast.ClassDef):
        yield from node.decorator_list


def _changes(node: ast.AST) -> Iterator[tuple[str, object]]:
    def put(name: str, value: object) -> object:
        return lambda one: setattr(one, name, value)

    if isinstance(node, ast.Constant):
        value = node.value
        if isinstance(value, bool):
            yield f"{value} to {not value}", put("value", not value)
        elif isinstance(value, int):
            yield f"{value} to {value + 1}", put("value", value + 1)
        elif isinstance(value, float):
            other = value * 1.1 if value else 1.0
            yield f"{value} to {other:.6g}", put("value", other)
    elif isinstance(node, ast.BinOp):
        for swap in SWAPS.get(type(node.op), ()):
            yield f"{_name(node.op)} to {swap.__name__}", put("op", swap())
    elif isinstance(node, ast.UnaryOp) and isinstance(node.op, ast.USub | ast.Not):
        other = ast.UAdd() if isinstance(node.op, ast.USub) else None
        if other is not None:
            yield "minus to plus", put("op", other)
        else:
            yield "not not", put("operand", ast.UnaryOp(op=ast.Not(), operand=node.operand))
    elif isinstance(node, ast.Compare):
        for index, old in enumerate(node.ops):
            for swap in SWAPS.get(type(old), ()):
                ops = [*node.ops[:index], swap(), *node.ops[index + 1 :]]
                yield f"{_name(old)} to {swap.__name__}", put("ops", ops)
    elif isinstance(node, ast.BoolOp):
        for swap in SWAPS[type(node.op)]:
            yield f"{_name(node.op)} to {swap.__name__}", put("op", swap())
    elif isinstance(node, ast.Call) and isinstance(node.func, ast.Name):
        other = {"min": "max", "max": "min"}.get(node.func.id)
        if other:
            yield f"{node.func.id} to {other}", put("func", ast.Name(id=other, ctx=ast.Load()))


def _name(node: ast.AST) -> str:
    return type(node).__name__


@functools.cache
def imports_of(path: Path) -> frozenset[Path]:
    """List the modules of models that a file imports, by path."""
    found = set()
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.ImportFrom) and node.module and node.level == 0:
            names = [node.module, *(f"{node.module}.{one.name}" for one in node.names)]
            for name in names:
                place = ROOT / (name.replace(".", "/") + ".py")
                if name.startswith(("models", "tests")) and place.is_file():
                    found.add(place)
    return frozenset(found)


@functools.cache
def reach(path: Path, steps: int) -> frozenset[Path]:
    """List what a file imports, directly or within so many steps more."""
    near = imports_of(path)
    return near if steps == 0 else near.union(*(reach(one, steps - 1) for one in near))


def tests_of(module: Path) -> list[str]:
    """List the test files that reach a module, nearest first, then its own examples."""
    folders = ("engineering", "published", "second_paths", "rules", "assess")
    files = [one for folder in folders for one in (ROOT / "tests" / folder).glob("test_*.py")]

    if "rules" in module.parts:
        # A rule is reached through its list, by every test of rules.
        return [str(one) for one in files if one.parent.name in ("rules", "assess")]
    distances = {
        one: next((steps for steps in range(4) if module in reach(one, steps)), 9) for one in files
    }
    # The nearest, and those one import further; a module behind a facade is two imports away.
    limit = min(3, min(distances.values()) + 1)
    near = sorted((one for one in files if distances[one] <= limit), key=distances.__getitem__)
    return [*(str(one) for one in near), str(module)]


class _Loop:
    """A plugin in whose place of running tests every mutant has its own child."""

    def __init__(
        self, module: Path, changed: list[Mutant], say: Callable[[int, str], None]
    ) -> None:
        self._module = module
        self._changed = changed
        self._say = say

    def pytest_runtestloop(self, session: Any) -> bool:
        """Run the tests as they stand, then each mutant on the quickest first."""
        items = _quickest_first(session)
        if items is None:
            self._say(-1, "fails")
            return True
        for number, mutant in enumerate(self._changed):
            self._say(
                number, "lives" if _in_child(lambda m=mutant: self._try(m, items)) else "dies"
            )
        return True

    def _try(self, mutant: Mutant, items: list[Any]) -> int:
        try:
            _swap(self._module, mutant.tree)
        except Exception:
            return 1
        return next((1 for item in items if not _passes(item)), 0)


def _passes(item: Any) -> bool:
    from _pytest.runner import runtestprotocol

    item._initrequest() if hasattr(item, "_initrequest") else None
    return all(report.passed for report in runtestprotocol(item, nextitem=None, log=False))


def _quickest_first(session: Any) -> list[Any] | None:
    """Put the tests in order by their time, found in a child; None where one of them fails."""
    read, write = os.pipe()

    def measure() -> int:
        for number, item in enumerate(session.items):
            begun = time.monotonic()
            if not _passes(item):
                return 1
            os.write(write, f"{number} {time.monotonic() - begun:.6f}\n".encode())
        return 0

    child = os.fork()
    if child == 0:
        os.close(read)
        os._exit(measure())
    os.close(write)
    with os.fdopen(read) as told:
        times = [line.split() for line in told]
    _, status = os.waitpid(child, 0)
    if os.waitstatus_to_exitcode(status) != 0:
        return None
    order = sorted(times, key=lambda one: float(one[1]))
    return [session.items[int(number)] for number, _ in order]


def _in_child(act: Callable[[], int]) -> bool:
    """Act in a child; whether it ended well. One without end is noticed by whoever waits."""
    child = os.fork()
    if child == 0:
        os._exit(act())
    begun = time.monotonic()
    while time.monotonic() - begun < SECONDS:
        done, status = os.waitpid(child, os.WNOHANG)
        if done:
            return os.waitstatus_to_exitcode(status) == 0
        time.sleep(0.002)
    os.kill(child, signal.SIGKILL)
    os.waitpid(child, 0)
    return False


def _swap(path: Path, tree: ast.Module) -> None:
    """Put a changed module's code into the loaded one, wherever its functions are held."""
    name = ".".join(path.relative_to(ROOT).with_suffix("").parts)
    loaded = sys.modules[name]
    fresh: dict[str, Any] = {"__name__": name, "__file__": str(path)}
    exec(compile(ast.fix_missing_locations(tree), str(path), "exec"), fresh)
    holders = [one for key, one in list(sys.modules.items())
               if key.startswith(("models", "tests"))]  # fmt: skip
    for key, new in fresh.items():
        old = vars(loaded).get(key)
        if key.startswith("__") or _exchange(old, new, name):
            continue
        for holder in holders:
            if vars(holder).get(key, _NOTHING) is old:
                setattr(holder, key, new)
    for one in gc.get_objects():
        if isinstance(one, functools._lru_cache_wrapper):
            one.cache_clear()


_NOTHING = object()


def _exchange(old: Any, new: Any, name: str) -> bool:
    """Give an object new code in place; False where it is a value to be replaced."""
    old, new = getattr(old, "__wrapped__", old), getattr(new, "__wrapped__", new)
    if isinstance(old, types.FunctionType) and isinstance(new, types.FunctionType):
        if new.__module__ == name:
            old.__code__, old.__defaults__ = new.__code__, new.__defaults__
            old.__kwdefaults__ = new.__kwdefaults__
        return True
    if isinstance(old, type) and isinstance(new, type):
        if new.__module__ == name:
            for key, value in list(vars(new).items()):
                _exchange_member(old, key, value, name)
        return True
    return old is new or isinstance(old, types.ModuleType)


def _exchange_member(old: type, key: str, new: Any, name: str) -> None:
    kept = vars(old).get(key)
    for inner in ("fget", "__func__", "func"):
        if hasattr(kept, inner) and hasattr(new, inner):
            _exchange(getattr(kept, inner), getattr(new, inner), name)
            return
    if isinstance(kept, types.FunctionType):
        _exchange(kept, new, name)
    elif isinstance(new, int | float | str | tuple) and not key.startswith("__"):
        setattr(old, key, new)


def try_all(module: Path, changed: list[Mutant], tests: list[str]) -> Iterator[tuple[int, str]]:
    """Try mutants in a child that has the tests loaded; numbers as they are done with."""
    read, write = os.pipe()
    child = os.fork()
    if child == 0:
        os.close(read)

        def say(number: int, word: str) -> None:
            os.write(write, f"{number} {word}\n".encode())

        _run(module, changed, tests, say)
        os._exit(0)
    os.close(write)
    with os.fdopen(read) as told:
        for line in told:
            number, word = line.split()
            yield int(number), word
    os.waitpid(child, 0)


def _run(
    module: Path, changed: list[Mutant], tests: list[str], say: Callable[[int, str], None]
) -> None:
    import pytest
    from hypothesis import settings

    settings.register_profile("few", max_examples=10, derandomize=True, deadline=None)
    settings.load_profile("few")
    importlib.import_module(".".join(module.relative_to(ROOT).with_suffix("").parts))
    said = io.StringIO()
    with redirect_stdout(said), redirect_stderr(said):
        pytest.main([*_OPTIONS, *tests], plugins=[_Loop(module, changed, say)])


def main() -> None:
    """Print a line for each module and each survivor."""
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("paths", nargs="+", type=Path)
    parser.add_argument("--out", type=Path)
    given = parser.parse_args()
    for name in ("numpy", "scipy.integrate", "scipy.optimize", "msgspec", "hypothesis", "pytest"):
        __import__(name)
    files = [
        one.resolve()
        for path in given.paths
        for one in (sorted(path.rglob("*.py")) if path.is_dir() else [path])
    ]
    for module in files:
        source = module.read_text(encoding="utf-8")
        changed = list(mutants(source))
        left = done = 0
        for number, word in try_all(module, changed, tests_of(module)) if changed else ():
            if number < 0:
                sys.stdout.write(f"{module.name}: its tests fail as it stands\n")
                break
            mutant, lives = changed[number], word == "lives"
            done += 1
            left += lives
            if given.out is not None:
                row = {"module": module.name, "line": mutant.line, "change": mutant.words}
                with given.out.open("a", encoding="utf-8") as file:
                    file.write(json.dumps({**row, "survives": lives}) + "\n")
            if lives:
                text = source.splitlines()[mutant.line - 1].strip()
                sys.stdout.write(f"  {module.name}:{mutant.line}  {mutant.words}   {text}\n")
                sys.stdout.flush()
        if done:
            sys.stdout.write(f"{module.name}: {done} mutants, {done - left} noticed, {left} not\n")
            sys.stdout.flush()


if __name__ == "__main__":
    main()
