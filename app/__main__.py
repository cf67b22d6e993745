"""Start of the program: `thirdjournal`, and `python -m app` the same."""

import sys

from app.own_packages import foreign_package

__all__ = ["run"]


def run() -> None:
    """Refuse a mixed installation with a sentence; else run what was asked for."""
    foreign = foreign_package()
    if foreign is not None:
        print(f"thirdjournal: {foreign}", file=sys.stderr)  # noqa: T201
        sys.exit(2)
    from app.commands import main

    sys.exit(main(sys.argv[1:]))


if __name__ == "__main__":
    run()
