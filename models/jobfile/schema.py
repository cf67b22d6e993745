"""The JSON Schema of a job file, made from the types of the job.

The committed copy in `models/data/jobfile.schema.json` is what a reader elsewhere gets; `document`
makes it anew. It is draft 07, so that a validator of any language reads it, and it is arranged so
that a validator names the very place of a fault: a choice between kinds of entry is an if-chain
over their tag, never an `anyOf`, of which a validator can only say that none of it fits.
"""

import json
import re
from collections.abc import Iterator
from importlib.resources import files
from pathlib import Path
from typing import Any

import msgspec

from models.job import Job
from models.jobfile.chain import KEY, schema_of_chain
from models.units import KINDS, Quantity

__all__ = ["document", "quantity", "read_committed", "rewrite", "text"]

Node = dict[str, Any]

_NUMBER = r"[+\-−]?([0-9]+(\.[0-9]*)?|\.[0-9]+)"


def document() -> Node:
    """Make the schema from the types of the job."""
    made = msgspec.json.schema(Job, schema_hook=quantity, ref_template="#/definitions/{name}")
    definitions: dict[str, Node] = {
        name: _arranged(node) for name, node in sorted(made["$defs"].items())
    }
    job = definitions["Job"]
    # Defaults are left out of a file, but these two are what tells it from any other JSON.
    job["required"] = ["form", "edition", *job["required"]]
    job["properties"]["plans"]["minItems"] = 1
    job["properties"][KEY] = schema_of_chain()
    return {
        "$schema": "http://json-schema.org/draft-07/schema#",
        "$ref": "#/definitions/Job",
        "definitions": definitions,
    }


def text() -> str:
    """Write the schema as it is committed."""
    return json.dumps(document(), ensure_ascii=False, indent=1) + "\n"


def read_committed() -> Node:
    """Read the committed schema."""
    packaged = files("models").joinpath("data", "jobfile.schema.json")
    committed: Node = json.loads(packaged.read_text(encoding="utf-8"))
    return committed


def rewrite() -> None:
    """Write the committed copy anew; done by hand whenever the types of the job change."""
    path = Path(__file__).parent.parent / "data" / "jobfile.schema.json"
    path.write_text(text(), encoding="utf-8", newline="\n")


def quantity(kind: type) -> Node:
    """Say how a quantity is written: a number, and a unit of its kind."""
    if kind not in KINDS:
        raise NotImplementedError(f"{kind!r} is no quantity")
    return {"type": "string", "pattern": _pattern(kind), "description": _described(kind)}


def _pattern(kind: type[Quantity]) -> str:
    names = [name for name in kind.units if not name[:1].isdigit()]
    names.sort(key=lambda name: (-len(name), name))
    units = "|".join(re.sub(r"([.*+?^${}()|\[\]\\/])", r"\\\1", name) for name in names)
    return rf"^\s*{_NUMBER}\s*({units})\s*$"


def _described(kind: type[Quantity]) -> str:
    names = (
        unit.aliases[0] if unit.symbol[:1].isdigit() else unit.symbol
        for unit in dict.fromkeys(kind.units.values())
    )
    units = ", ".join(name for name in names if name)
    plain = "" in kind.symbols()
    return f"{kind.name} as text, {'alone or ' if plain else ''}with its unit: {units}"


def _arranged(node: Any) -> Any:  # noqa: ANN401  (any part of a JSON document)
    if isinstance(node, list):
        return [_arranged(part) for part in node]
    if not isinstance(node, dict):
        return node
    if "anyOf" in node:
        rest = {word: part for word, part in node.items() if word not in ("anyOf", "discriminator")}
        return {**_choice(node), **rest}
    if "prefixItems" in node:
        (first, *others) = node["prefixItems"]
        if any(other != first for other in others):
            raise NotImplementedError("a tuple of unlike parts")
        node = {**node, "items": first}
        del node["prefixItems"]
    return {word: _arranged(part) for word, part in node.items()}


def _choice(node: Node) -> Node:
    if "discriminator" in node:
        return _by_tag(**node["discriminator"])
    branches: list[Node] = [_arranged(branch) for branch in node["anyOf"]]
    if all(isinstance(branch.get("type"), str) for branch in branches):
        return _either(branches)
    (something,) = (branch for branch in branches if branch != {"type": "null"})
    # Keyed by whether it is null, so that a fault inside is named and not the whole.
    return {"if": {"type": "null"}, "else": something}


def _either(branches: list[Node]) -> Node:
    # A pattern binds text only and bounds bind numbers only, so one object can hold them all.
    merged = dict(_pairs(branches))
    return {**merged, "type": [branch["type"] for branch in branches]}


def _pairs(branches: list[Node]) -> Iterator[tuple[str, Any]]:
    return ((word, part) for branch in branches for word, part in branch.items())


def _by_tag(*, propertyName: str, mapping: dict[str, str]) -> Node:  # noqa: N803  (JSON's own name)
    return {
        "type": "object",
        "required": [propertyName],
        "properties": {propertyName: {"enum": list(mapping)}},
        "allOf": [
            {
                "if": {"properties": {propertyName: {"enum": [tag]}}},
                "then": {"$ref": reference},
            }
            for tag, reference in mapping.items()
        ],
    }
