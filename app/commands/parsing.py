"""The words of the command line."""

import argparse
from pathlib import Path

from app.commands import book, files, opening, record

__all__ = ["parser"]

_EXAMPLES = """\
examples:
  thirdjournal                                open the window on your own shop's record
  thirdjournal demo --folder demo             make the invented demo shop there, and open it
  thirdjournal check compressor.json          judge a job file, without any record
  thirdjournal traveler pump.json -o pump.pdf write a job's traveler
  thirdjournal verify demo                    recompute a record and compare
  thirdjournal handbook holding_torque        formula, source, range and tests of a number
  thirdjournal backup demo --to /media/stick  write a backup there, verified

exit status: 0 every rule within, 1 anything outside, in doubt or not judged, 2 unusable input
"""


def parser() -> argparse.ArgumentParser:
    """Say which commands there are, and what each takes."""
    made = argparse.ArgumentParser(
        prog="thirdjournal",
        description="Build and runout logbook for rotors whose parts are shrunk onto the shaft.",
        epilog=_EXAMPLES,
        formatter_class=argparse.RawDescriptionHelpFormatter,
    )
    made.add_argument(
        "--shop",
        type=Path,
        metavar="FOLDER",
        help="folder of the shop's record (default: the user's data folder)",
    )
    made.set_defaults(run=opening.window)
    commands = made.add_subparsers(title="commands", metavar="")

    demo = commands.add_parser("demo", help="make the invented demo shop, say what was found")
    demo.add_argument(
        "--folder", type=Path, metavar="F", help="where to make it (default: a new folder here)"
    )
    demo.add_argument("--no-window", action="store_true", help="make it, and open nothing")
    demo.set_defaults(run=opening.demo)

    check = commands.add_parser("check", help="judge a job file without a record")
    check.add_argument("jobfile", type=Path)
    check.add_argument("--json", action="store_true", help="every finding, with its SI values")
    check.set_defaults(run=files.check)

    traveler = commands.add_parser("traveler", help="write the traveler of a job file")
    traveler.add_argument("jobfile", type=Path)
    traveler.add_argument("-o", "--output", type=Path, required=True, metavar="OUT.pdf")
    traveler.set_defaults(run=files.traveler)
    moved = commands.add_parser(
        "in-service", help="compare a rotor as received with what an earlier job left"
    )
    moved.add_argument("earlier", type=Path, metavar="EARLIER", help="job file of the build")
    moved.add_argument("present", type=Path, metavar="PRESENT", help="job file it came back in")
    moved.set_defaults(run=files.in_service)
    verify = commands.add_parser(
        "verify", help="recompute a record from its rows and say what does not hold"
    )
    verify.add_argument(
        "record",
        type=Path,
        metavar="SHOP_OR_FILE",
        help="folder of the record, or a job file that carries its chain",
    )
    verify.add_argument("--job", metavar="NUMBER", help="one job only; “the shop” is its own chain")
    verify.add_argument(
        "--head", metavar="N:DIGEST", help="a head of that job, as a traveler prints it"
    )
    verify.set_defaults(run=record.verify)
    handbook = commands.add_parser(
        "handbook", help="list every rule and formula with source, range and tests"
    )
    handbook.add_argument(
        "words", nargs="*", metavar="WORD", help="a rule, a formula, a number's name, or words"
    )
    handbook.add_argument("--json", action="store_true", help="the entries as plain data")
    handbook.set_defaults(run=book.handbook)
    backup = commands.add_parser("backup", help="write a backup of a record, and compare it")
    backup.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    backup.add_argument(
        "--to", type=Path, metavar="FOLDER", help="where (default: backups beside the record)"
    )
    backup.set_defaults(run=record.backup)
    restore = commands.add_parser(
        "restore", help="put a record back to a backup; what stands there is set aside"
    )
    restore.add_argument("backup", type=Path, metavar="BACKUP")
    restore.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    restore.add_argument(
        "--look", action="store_true", help="only say what it holds and what would be left behind"
    )
    restore.set_defaults(run=record.restore)

    export = commands.add_parser("export", help="write a job file with the job's chain")
    export.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    export.add_argument("job", metavar="NUMBER")
    export.add_argument("-o", "--output", type=Path, required=True, metavar="FILE")
    export.set_defaults(run=record.export)

    take = commands.add_parser(
        "take-in", help="lay a job file with its chain down in another shop's record"
    )
    take.add_argument("jobfile", type=Path)
    take.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    take.add_argument("--by", metavar="PERSON", required=True, help="key of who takes it in")
    take.set_defaults(run=record.take_in)
    return made
