"""Where a limit comes from."""

from models.job.base import Frozen

__all__ = ["Origin"]


class Origin(Frozen, frozen=True, kw_only=True):
    """Where a limit comes from: a drawing with revision and note, or what else stands behind it."""

    document: str
    revision: str = ""
    note: str = ""

    @property
    def words(self) -> str:
        """The origin in one phrase."""
        revision = f"revision {self.revision}" if self.revision else ""
        return ", ".join(part for part in (self.document, revision, self.note) if part)
