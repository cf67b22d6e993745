"""What all parts of a job share: they are frozen, and a word they do not know is refused."""

import msgspec

__all__ = ["Frozen"]


class Frozen(
    msgspec.Struct, frozen=True, kw_only=True, forbid_unknown_fields=True, omit_defaults=True
):
    """A part of a job that cannot change once it is made."""
