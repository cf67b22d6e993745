"""Tables of the record. All are insert-only except those named in `CHANGEABLE`."""

from sqlalchemy import CheckConstraint, Table

from models.record.tables.acceptance import *  # noqa: F403
from models.record.tables.assembly import *  # noqa: F403
from models.record.tables.backups import *  # noqa: F403
from models.record.tables.balance import *  # noqa: F403
from models.record.tables.base import SMALL_UNITS, Base
from models.record.tables.chains import *  # noqa: F403
from models.record.tables.entries import *  # noqa: F403
from models.record.tables.events import *  # noqa: F403
from models.record.tables.facts import *  # noqa: F403
from models.record.tables.keys import *  # noqa: F403
from models.record.tables.readings import *  # noqa: F403
from models.record.tables.shop_materials import *  # noqa: F403

__all__ = ["CHANGEABLE", "OF_A_LIBRARY", "Base", "recorded_tables", "table"]

# The only tables whose rows may change; the trigger test reads this too.
CHANGEABLE = ("alembic_version", "key_wrap")
# Made by the library that brings a file from form to form.
OF_A_LIBRARY = ("alembic_version",)


def table(kind: type[Base]) -> Table:
    """Give the table of a mapped class."""
    found = kind.__table__
    assert isinstance(found, Table)
    return found


def recorded_tables() -> tuple[Table, ...]:
    """List the tables whose rows carry a line of an act, in a fixed order."""
    return tuple(
        Base.metadata.tables[name]
        for name in sorted(Base.metadata.tables)
        if name != "act" and name not in CHANGEABLE
    )


def _tie_quantities() -> None:
    """Demand that a quantity is there with text, unit and value, or not at all."""
    for each in Base.metadata.tables.values():
        for column in list(each.columns):
            stem = column.name.removesuffix("_typed")
            if stem == column.name or not column.nullable:
                continue
            whole = next(f"{stem}_{end}" for end in SMALL_UNITS if f"{stem}_{end}" in each.columns)
            each.append_constraint(
                CheckConstraint(
                    f"({column.name} IS NULL) = ({stem}_unit IS NULL)"
                    f" AND ({column.name} IS NULL) = ({whole} IS NULL)",
                    name=f"{stem}_is_whole",
                )
            )


_tie_quantities()
