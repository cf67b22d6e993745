"""List every kind of act that the program has, from the program itself."""

import ast
import importlib
import inspect
import typing
from collections.abc import Iterator
from pathlib import Path

import msgspec

import models.acts

__all__ = ["kinds_of_acts"]

# A write transaction, or a record put in the place of another.
_WRITES = {"writing", "put_back"}
_FOLDER = Path(models.acts.__path__[0])


def kinds_of_acts() -> set[str]:
    """Name every public function that ends in a write transaction, and each thing it may take.

    A function that takes one of several kinds of entry or reading counts once for each kind; one
    that also takes a reason counts again, as a correction.
    """
    found = {}
    for path in sorted(_FOLDER.rglob("*.py")):
        for name, node in _functions(ast.parse(path.read_text(encoding="utf-8"))):
            found[path, name] = _called(node)
    writers = {place for place, called in found.items() if called & _WRITES}
    while True:
        names = {name.split(".")[-1] for _, name in writers}
        more = {place for place, called in found.items() if called & names} - writers
        if not more:
            break
        writers |= more
    return {kind for path, name in writers if _is_public(name) for kind in _kinds(path, name)}


def _functions(tree: ast.AST, inside: str = "") -> Iterator[tuple[str, ast.AST]]:
    for node in ast.iter_child_nodes(tree):
        if isinstance(node, ast.ClassDef):
            yield from _functions(node, f"{inside}{node.name}.")
        elif isinstance(node, ast.FunctionDef):
            yield f"{inside}{node.name}", node


def _called(node: ast.AST) -> set[str]:
    return {
        one.func.attr if isinstance(one.func, ast.Attribute) else getattr(one.func, "id", "")
        for one in ast.walk(node)
        if isinstance(one, ast.Call)
    }


def _is_public(name: str) -> bool:
    return not any(part.startswith("_") for part in name.split("."))


def _kinds(path: Path, name: str) -> Iterator[str]:
    module = ".".join(("models", "acts", *path.relative_to(_FOLDER).with_suffix("").parts))
    found = importlib.import_module(module.removesuffix(".__init__"))
    for part in name.split("."):
        found = getattr(found, part)
    short = name.split(".")[-1]
    kinds = [
        [one.__name__ for one in typing.get_args(hint)]
        for hint in typing.get_type_hints(found).values()
        if _is_one_of_several(hint)
    ]
    takes_reason = "reason" in inspect.signature(found).parameters
    for kind in kinds[0] if kinds else [""]:
        yield f"{short} {kind}".strip()
        if takes_reason and kind:
            yield f"{short} {kind} corrected"


def _is_one_of_several(hint: object) -> bool:
    members = typing.get_args(hint)
    return len(members) > 1 and all(
        isinstance(one, type) and issubclass(one, msgspec.Struct) for one in members
    )
