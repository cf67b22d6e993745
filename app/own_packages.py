"""Whether the program's packages are its own; their names are ordinary and easily shadowed."""

import importlib.util
from pathlib import Path

__all__ = ["foreign_package"]

_OWN = ("app", "models", "reports", "sample_data")


def foreign_package() -> str | None:
    """Say in a sentence which package comes from elsewhere, or nothing if all are the program's."""
    home = Path(__file__).resolve().parent.parent
    for name in _OWN:
        found = importlib.util.find_spec(name)
        if found is None or found.origin is None:
            return f"its package “{name}” is missing. Install the program again."
        place = Path(found.origin).resolve().parent.parent
        if place != home:
            return (
                f"its package “{name}” would come from {place} and not from {home}. Start it from "
                f"another folder, or take “{name}” out of PYTHONPATH."
            )
    return None
