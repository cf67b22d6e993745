"""What the program does when it is told to on the command line."""

import argparse
import os
import sys
from collections.abc import Callable, Sequence

from app.commands.parsing import parser
from app.commands.spoken import UNUSABLE, WITHIN, UnusableError

__all__ = ["main"]


def main(arguments: Sequence[str]) -> int:
    """Run one command and give its exit status; trouble is a sentence, never a traceback."""
    given = parser().parse_args(list(arguments))
    run: Callable[[argparse.Namespace], int] = given.run
    try:
        return run(given)
    except UnusableError as trouble:
        print(f"thirdjournal: {trouble}", file=sys.stderr)  # noqa: T201  (a command speaks)
        return UNUSABLE
    except BrokenPipeError:
        # Whoever read the output has seen enough; the interpreter must not write to it at its end.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return WITHIN
    except OSError as trouble:
        where = f" ({trouble.filename})" if trouble.filename else ""
        print(  # noqa: T201
            f"thirdjournal: {trouble.strerror or trouble}{where}. Check the path, the free space "
            "and the permission there, and try again.",
            file=sys.stderr,
        )
        return UNUSABLE
