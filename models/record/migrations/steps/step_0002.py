"""Add what the second form knows beyond the first; nothing of the first form is touched."""

from collections.abc import Callable

from models.record.migrations.form_2 import (
    acceptance,
    assembly,
    backups,
    balance,
    carried,
    events,
    keys,
    shop_materials,
)

__all__: list[str] = []

revision = "0002"
down_revision = "0001"
branch_labels = None
depends_on = None

# In the order in which their tables rest on each other.
_LAID: tuple[Callable[[], None], ...] = (
    shop_materials.lay,
    keys.lay,
    assembly.lay,
    backups.lay,
    events.lay,
    carried.lay,
    balance.lay,
    acceptance.lay,
)


def upgrade() -> None:
    """Lay what each subject adds."""
    for lay in _LAID:
        lay()
