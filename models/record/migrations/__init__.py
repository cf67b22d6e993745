"""Steps that bring a file to the form that the program knows, one after the other.

Only plain operations: a move-and-copy of a table would silently drop its triggers. Recorded rows
are never rewritten; a new column stays NULL in old rows, and NULL stays out of every digest.
Importing this package costs nothing; Alembic is loaded when a step is due.
"""

from pathlib import Path
from typing import Any

from sqlalchemy import Connection, MetaData

from models.record.triggers import trigger_texts

__all__ = ["APPLICATION_ID", "FORM", "bring_up_to_date", "make_triggers"]

# The form that this program writes: the number of the last step.
FORM = 2
# "3JRN" in ASCII; marks the file as a record of this program.
APPLICATION_ID = 0x334A524E


def bring_up_to_date(connection: Connection, *, changeable: tuple[str, ...]) -> None:
    """Take every step that the file lacks, in the transaction that is open."""
    from alembic.config import Config
    from alembic.runtime.environment import EnvironmentContext
    from alembic.runtime.migration import MigrationContext, RevisionStep
    from alembic.script import ScriptDirectory

    folder = Path(__file__).parent
    scripts = ScriptDirectory(folder, version_locations=[folder / "steps"])

    def missing(found: Any, _: MigrationContext) -> list[RevisionStep]:  # noqa: ANN401
        return scripts._upgrade_revs("head", found)

    with EnvironmentContext(Config(), scripts, fn=missing) as environment:
        # The transaction is the store's own: all steps and triggers, or nothing.
        environment.configure(connection=connection, fn=missing, transactional_ddl=False)
        environment.run_migrations()
    make_triggers(connection, changeable=changeable)
    connection.exec_driver_sql(f"PRAGMA application_id = {APPLICATION_ID}")
    connection.exec_driver_sql(f"PRAGMA user_version = {FORM}")


def make_triggers(connection: Connection, *, changeable: tuple[str, ...]) -> None:
    """Make every trigger anew from the tables that are in the file, not from today's classes."""
    live = MetaData()
    live.reflect(connection)
    rows = connection.exec_driver_sql("SELECT name FROM sqlite_schema WHERE type = 'trigger'")
    for (name,) in rows.all():
        connection.exec_driver_sql(f'DROP TRIGGER "{name}"')
    for text in trigger_texts(live, changeable=changeable).values():
        connection.exec_driver_sql(text)
