"""Change one constant, sign or comparison at a time, and see whether any test notices.

Run it as `python -m tests.bench.mutants models/engineering/fits.py …` (folders are taken whole);
`--out FILE` keeps a line of JSON for each mutant. It asserts nothing.

Own, since the published tools start a new interpreter for each mutant, some 2 s on top of the
tests. Here a parent imports the libraries once; each mutant is a forked child that imports the
program anew with one changed syntax tree and runs the tests that reach the module, stopping at the
first that fails. Tests by property run with few examples: a mutant found by luck is no merit.
"""

import argparse
import ast
import copy
import functools
import importlib.machinery
import io
import json
import os
import signal
import sys
import time
from collections.abc import Iterator
from contextlib import redirect_stderr, redirect_stdout
from dataclasses import dataclass
from pathlib import Path

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


def survives(module: Path, mutant: Mutant, tests: list[str]) -> bool:
    """Run the tests on a mutant in a child; whether all of them pass."""
    child = os.fork()
    if child == 0:
        os._exit(_run(module, mutant, tests))
    begun = time.monotonic()
    while True:
        done, status = os.waitpid(child, os.WNOHANG)
        if done:
            return os.waitstatus_to_exitcode(status) == 0
        if time.monotonic() - begun > SECONDS:
            # A loop without end is noticed by whoever waits.
            os.kill(child, signal.SIGKILL)
            os.waitpid(child, 0)
            return False
        time.sleep(0.01)


def _run(module: Path, mutant: Mutant, tests: list[str]) -> int:
    import pytest
    from _pytest.assertion.rewrite import AssertionRewritingHook
    from hypothesis import settings

    settings.register_profile("few", max_examples=10, derandomize=True, deadline=None)
    settings.load_profile("few")
    usual = importlib.machinery.SourceFileLoader.get_code

    def get_code(self: importlib.machinery.SourceFileLoader, name: str) -> object:
        if Path(self.path) == module:
            return compile(ast.fix_missing_locations(mutant.tree), str(module), "exec")
        return usual(self, name)

    importlib.machinery.SourceFileLoader.get_code = get_code  # type: ignore[assignment]
    # What is named to pytest it would load itself, past the change.
    name = ".".join(module.relative_to(ROOT).with_suffix("").parts)
    found = AssertionRewritingHook.find_spec

    def find_spec(self: AssertionRewritingHook, wanted: str, *more: object) -> object:
        return None if wanted == name else found(self, wanted, *more)

    AssertionRewritingHook.find_spec = find_spec
    said = io.StringIO()
    with redirect_stdout(said), redirect_stderr(said):
        return int(pytest.main([*_OPTIONS, *tests]))


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
        tests = tests_of(module)
        source = module.read_text(encoding="utf-8")
        untouched = Mutant(0, "nothing", ast.parse(source))
        all_of_them = list(mutants(source))
        if not all_of_them:
            continue
        if not survives(module, untouched, tests):
            sys.stdout.write(f"{module.name}: its tests fail as it stands, or are too slow\n")
            continue
        left = 0
        for mutant in all_of_them:
            lives = survives(module, mutant, tests)
            left += lives
            if given.out is not None:
                row = {"module": module.name, "line": mutant.line, "change": mutant.words}
                with given.out.open("a", encoding="utf-8") as file:
                    file.write(json.dumps({**row, "survives": lives}) + "\n")
            if lives:
                text = source.splitlines()[mutant.line - 1].strip()
                sys.stdout.write(f"  {module.name}:{mutant.line}  {mutant.words}   {text}\n")
                sys.stdout.flush()
        total = len(all_of_them)
        sys.stdout.write(f"{module.name}: {total} mutants, {total - left} noticed, {left} not\n")
        sys.stdout.flush()


if __name__ == "__main__":
    main()
