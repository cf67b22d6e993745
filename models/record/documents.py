"""Whole documents as canonical JSON text: plans as issued, materials, the inputs of verdicts.

Every field is written, also one at its default, so that a later default cannot change what was
issued. A number with a fraction stands as text in an object of its own.
"""

from collections.abc import Mapping
from typing import Any

import msgspec

from models.job import OwnMaterial, Plan
from models.record.canonical import Plain, canonical_text, normal
from models.units import Quantity, decode

__all__ = [
    "inputs_from",
    "inputs_text",
    "material_from",
    "material_text",
    "plan_from",
    "plan_text",
]

_FRACTION = "decimal"


def plan_text(plan: Plan) -> str:
    """Write a plan as canonical JSON."""
    return canonical_text(_plain(plan))


def plan_from(text: str) -> Plan:
    """Read a plan back."""
    return msgspec.convert(_with_fractions(msgspec.json.decode(text)), Plan, dec_hook=decode)


def material_text(material: OwnMaterial) -> str:
    """Write a material of the shop's own as canonical JSON."""
    return canonical_text(_plain(material))


def material_from(text: str) -> OwnMaterial:
    """Read a material back."""
    return msgspec.convert(_with_fractions(msgspec.json.decode(text)), OwnMaterial, dec_hook=decode)


def inputs_text(inputs: Mapping[str, float | str | bool | None]) -> str:
    """Write the inputs of a verdict as canonical JSON, each as a pair, so names may be any text."""
    return canonical_text([[normal(name), _plain(inputs[name])] for name in sorted(inputs)])


def inputs_from(text: str) -> dict[str, float | str | bool | None]:
    """Read the inputs of a verdict back."""
    return {name: _with_fractions(value) for name, value in msgspec.json.decode(text)}


def _plain(value: Any) -> Plain:  # noqa: ANN401  (fields are of any type)
    if isinstance(value, msgspec.Struct):
        fields = {name: getattr(value, name) for name in value.__struct_fields__}
        return {name: _plain(part) for name, part in fields.items() if part is not None}
    if isinstance(value, Quantity):
        return normal(value.written)
    if isinstance(value, float):
        return {_FRACTION: repr(float(value))}
    if isinstance(value, str):
        return normal(value)
    if isinstance(value, tuple):
        return [_plain(part) for part in value]
    if value is None or isinstance(value, int):
        return value
    raise TypeError(f"{value!r} has no place in a document")


def _with_fractions(value: Any) -> Any:  # noqa: ANN401
    if isinstance(value, dict):
        if value.keys() == {_FRACTION}:
            return float(value[_FRACTION])
        return {name: _with_fractions(part) for name, part in value.items()}
    if isinstance(value, list):
        return [_with_fractions(part) for part in value]
    return value
