"""Lay the parts of a frozen job flat into columns, and take them up again.

A field becomes the column of its name; a quantity becomes three (as typed, its unit, its whole
number with the small unit in the name); a list of words becomes JSON text; a part within a part
puts its name in front. A field that has no column raises at once, so none is lost in silence.
"""

import types
import typing
from collections.abc import Callable, Mapping
from functools import cache
from typing import Any, NamedTuple, TypeVar

import msgspec

from models.record.canonical import canonical_text, normal
from models.units import (
    Angle,
    Duration,
    Expansion,
    FieldStrength,
    Length,
    Mass,
    Pressure,
    Quantity,
    Ratio,
    Speed,
    Temperature,
    Torque,
    Unbalance,
)

__all__ = ["Cell", "Row", "columns_of", "quantity_columns", "quantity_from", "struct_from"]

Cell = str | int | None
Row = Mapping[Any, Any]
_Q = TypeVar("_Q", bound=Quantity)
_S = TypeVar("_S", bound=msgspec.Struct)

_ENDINGS: dict[type[Quantity], str] = {
    Length: "nm",
    Temperature: "mk",
    Angle: "mdeg",
    Expansion: "per_tera_kelvin",
    Pressure: "pa",
    Ratio: "ppm",
    Duration: "ms",
    Torque: "mnm",
    Unbalance: "ugm",
    Speed: "mrpm",
    Mass: "mg",
    FieldStrength: "nt",
}
# Field names that would be unclear, or words of SQL, as names of columns.
_RENAMED = {
    "allowed_by": "allowed_by_person",
    "by": "by_person",
    "order": "order_words",
    "plan": "plan_revision",
    "range": "range_words",
    "read_by": "read_by_person",
    "where": "where_on_part",
    "written_by": "written_by_person",
}


class _Field(NamedTuple):
    name: str
    column: str
    kind: Any


@cache
def _fields(kind: type[msgspec.Struct]) -> tuple[_Field, ...]:
    return tuple(
        _Field(field.name, _RENAMED.get(field.name, field.name), _bare(field.type))
        for field in msgspec.structs.fields(kind)
    )


def _bare(annotation: Any) -> Any:  # noqa: ANN401  (annotations are of any type)
    """Take `None` and `Literal` away from an annotation."""
    if isinstance(annotation, types.UnionType) or typing.get_origin(annotation) is typing.Union:
        (one,) = [part for part in typing.get_args(annotation) if part is not type(None)]
        return _bare(one)
    if typing.get_origin(annotation) is typing.Literal:
        return type(typing.get_args(annotation)[0])
    return annotation


def columns_of(part: msgspec.Struct, *, leave: tuple[str, ...] = ()) -> dict[str, Cell]:
    """Lay a part flat; fields named in `leave` are recorded elsewhere."""
    row: dict[str, Cell] = {}
    for name, column, kind in _fields(type(part)):
        if name not in leave:
            row.update(_cells(column, kind, getattr(part, name)))
    return row


def _cells(column: str, kind: Any, value: Any) -> dict[str, Cell]:  # noqa: ANN401
    if typing.get_origin(kind) is tuple:
        return {f"{column}_json": canonical_text([normal(word) for word in value])}
    if issubclass(kind, Quantity):
        return quantity_columns(column, kind, value)
    if issubclass(kind, msgspec.Struct):
        return {f"{column}_{name}": cell for name, cell in columns_of(value).items()}
    if isinstance(value, str):
        return {column: normal(value)}
    return {column: None if value is None else int(value)}


def quantity_columns(column: str, kind: type[Quantity], value: Quantity | None) -> dict[str, Cell]:
    """Lay a quantity into its three columns."""
    return {
        f"{column}_typed": None if value is None else normal(value.typed),
        f"{column}_unit": None if value is None else value.unit,
        f"{column}_{_ENDINGS[kind]}": None if value is None else value.whole,
    }


def quantity_from(kind: type[_Q], column: str, row: Row) -> _Q | None:
    """Take a quantity up from its three columns."""
    typed = row[f"{column}_typed"]
    if typed is None:
        return None
    return kind(typed=typed, unit=row[f"{column}_unit"], whole=row[f"{column}_{_ENDINGS[kind]}"])


@cache
def _makers(
    kind: type[msgspec.Struct], given: frozenset[str], prefix: str
) -> tuple[tuple[str, Callable[[Row], Any]], ...]:
    return tuple(
        (name, _maker(f"{prefix}{column}", of))
        for name, column, of in _fields(kind)
        if name not in given
    )


def _maker(column: str, kind: Any) -> Callable[[Row], Any]:  # noqa: ANN401
    if typing.get_origin(kind) is tuple:
        return lambda row: tuple(msgspec.json.decode(row[f"{column}_json"], type=list[str]))
    if issubclass(kind, Quantity):
        return lambda row: quantity_from(kind, column, row)
    if issubclass(kind, msgspec.Struct):
        return lambda row: struct_from(kind, row, prefix=f"{column}_")
    if kind is bool:
        return lambda row: bool(row[column])
    return lambda row: row[column]


def struct_from(
    kind: type[_S],
    row: Row,
    *,
    given: Mapping[str, Any] | None = None,
    prefix: str = "",
) -> _S:
    """Take a part up from its columns; fields in `given` are not looked for in the row."""
    more = given or {}
    makers = _makers(kind, frozenset(more), prefix)
    return kind(**{name: make(row) for name, make in makers}, **more)
