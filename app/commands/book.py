"""The command that reads the handbook."""

import argparse
import json

from app.commands.spoken import WITHIN, UnusableError, say

__all__ = ["handbook"]


def handbook(given: argparse.Namespace) -> int:
    """Say where rules, formulas and numbers come from."""
    from app import handbook_text
    from models.handbook import find

    words = " ".join(given.words)
    found = find(words)
    if not found:
        raise UnusableError(
            f"the handbook has nothing on “{words}”. Try fewer words, or none for all of it"
        )
    if given.json:
        say(json.dumps(handbook_text.as_data(found), indent=1, ensure_ascii=False))
    else:
        say(handbook_text.told(words))
    return WITHIN
