"""What the program does when it is told to on the command line."""

import argparse
import json
import os
import sys
from collections.abc import Callable, Sequence
from pathlib import Path
from typing import Any

from app import findings_text
from models.assess import Assessment, assess
from models.job import Job
from models.rules.rule import Verdict

__all__ = ["main"]

_WITHIN, _NOT_WITHIN, _UNUSABLE = 0, 1, 2

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


class _UnusableError(Exception):
    """Input that nothing can be done with; its message is one sentence with the way out."""


def main(arguments: Sequence[str]) -> int:
    """Run one command and give its exit status; trouble is a sentence, never a traceback."""
    given = _parser().parse_args(list(arguments))
    run: Callable[[argparse.Namespace], int] = given.run
    try:
        return run(given)
    except _UnusableError as trouble:
        print(f"thirdjournal: {trouble}", file=sys.stderr)  # noqa: T201  (a command speaks)
        return _UNUSABLE
    except BrokenPipeError:
        # Whoever read the output has seen enough; the interpreter must not write to it at its end.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        return _WITHIN
    except OSError as trouble:
        where = f" ({trouble.filename})" if trouble.filename else ""
        print(  # noqa: T201
            f"thirdjournal: {trouble.strerror or trouble}{where}. Check the path, the free space "
            "and the permission there, and try again.",
            file=sys.stderr,
        )
        return _UNUSABLE


def _parser() -> argparse.ArgumentParser:
    parser = argparse.ArgumentParser(
        prog="thirdjournal",
        description="Build and runout logbook for rotors whose parts are shrunk onto the shaft.",
        epilog=_EXAMPLES,
        formatter_class=argparse.RawDescriptionHelpFormatter,
    )
    parser.add_argument(
        "--shop",
        type=Path,
        metavar="FOLDER",
        help="folder of the shop's record (default: the user's data folder)",
    )
    parser.set_defaults(run=_window)
    commands = parser.add_subparsers(title="commands", metavar="")

    demo = commands.add_parser("demo", help="make the invented demo shop, say what was found")
    demo.add_argument(
        "--folder", type=Path, metavar="F", help="where to make it (default: a new folder here)"
    )
    demo.add_argument("--no-window", action="store_true", help="make it, and open nothing")
    demo.set_defaults(run=_demo)

    check = commands.add_parser("check", help="judge a job file without a record")
    check.add_argument("jobfile", type=Path)
    check.add_argument("--json", action="store_true", help="every finding, with its SI values")
    check.set_defaults(run=_check)

    traveler = commands.add_parser("traveler", help="write the traveler of a job file")
    traveler.add_argument("jobfile", type=Path)
    traveler.add_argument("-o", "--output", type=Path, required=True, metavar="OUT.pdf")
    traveler.set_defaults(run=_traveler)
    moved = commands.add_parser(
        "in-service", help="compare a rotor as received with what an earlier job left"
    )
    moved.add_argument("earlier", type=Path, metavar="EARLIER", help="job file of the build")
    moved.add_argument("present", type=Path, metavar="PRESENT", help="job file it came back in")
    moved.set_defaults(run=_in_service)
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
    verify.set_defaults(run=_verify)
    handbook = commands.add_parser(
        "handbook", help="list every rule and formula with source, range and tests"
    )
    handbook.add_argument(
        "words", nargs="*", metavar="WORD", help="a rule, a formula, a number's name, or words"
    )
    handbook.add_argument("--json", action="store_true", help="the entries as plain data")
    handbook.set_defaults(run=_handbook)
    backup = commands.add_parser("backup", help="write a backup of a record, and compare it")
    backup.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    backup.add_argument(
        "--to", type=Path, metavar="FOLDER", help="where (default: backups beside the record)"
    )
    backup.set_defaults(run=_backup)
    restore = commands.add_parser(
        "restore", help="put a record back to a backup; what stands there is set aside"
    )
    restore.add_argument("backup", type=Path, metavar="BACKUP")
    restore.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    restore.add_argument(
        "--look", action="store_true", help="only say what it holds and what would be left behind"
    )
    restore.set_defaults(run=_restore)

    export = commands.add_parser("export", help="write a job file with the job's chain")
    export.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    export.add_argument("job", metavar="NUMBER")
    export.add_argument("-o", "--output", type=Path, required=True, metavar="FILE")
    export.set_defaults(run=_export)

    take = commands.add_parser(
        "take-in", help="lay a job file with its chain down in another shop's record"
    )
    take.add_argument("jobfile", type=Path)
    take.add_argument("record", type=Path, metavar="SHOP", help="folder of the record")
    take.add_argument("--by", metavar="PERSON", required=True, help="key of who takes it in")
    take.set_defaults(run=_take_in)
    return parser


def _say(text: str) -> None:
    print(text)  # noqa: T201  (a command speaks on standard output)


def _read(path: Path) -> Job:
    from models.jobfile import JobFileError, read

    try:
        return read(path)
    except JobFileError as trouble:
        raise _UnusableError(f"{path}: {trouble}") from None


def _status(view: Assessment) -> int:
    return _WITHIN if view.verdict is Verdict.WITHIN else _NOT_WITHIN


def _check(given: argparse.Namespace) -> int:
    job = _read(given.jobfile)
    view = assess(job)
    if given.json:
        _say(json.dumps(findings_text.as_data(view), indent=1, ensure_ascii=False))
    else:
        _say(findings_text.as_text(view))
    return _status(view)


def _traveler(given: argparse.Namespace) -> int:
    from reports.traveler import write

    job = _read(given.jobfile)
    write(assess(job), given.output)
    _say(f"Traveler written to {given.output}")
    return _WITHIN


def _in_service(given: argparse.Namespace) -> int:
    from app.in_service_text import compared
    from models.assess.in_service import InServiceError

    try:
        words, nothing_moved = compared(_read(given.earlier), _read(given.present))
    except InServiceError as trouble:
        raise _UnusableError(str(trouble)) from None
    _say(words)
    return _WITHIN if nothing_moved else _NOT_WITHIN


def _verify(given: argparse.Namespace) -> int:
    from app.verify_text import head_from, verified, verified_file
    from models.record.store import FILE_NAME

    in_file = given.record.is_file() and given.record.name != FILE_NAME
    if given.head is not None and given.job is None and not in_file:
        raise _UnusableError("--head belongs to one job; name it with --job")
    try:
        head = head_from(given.head) if given.head is not None else None
    except ValueError as trouble:
        raise _UnusableError(str(trouble)) from None
    if in_file:
        found = _with_record(lambda: verified_file(given.record, head=head))
    else:
        folder = given.record.parent if given.record.name == FILE_NAME else given.record
        _tell_network(folder)
        found = _with_record(
            lambda: verified(folder, job=given.job, head=head, progress=_say_progress)
        )
    _say(found.words)
    return _WITHIN if found.is_whole else _NOT_WITHIN


def _handbook(given: argparse.Namespace) -> int:
    from app import handbook_text
    from models.handbook import find

    words = " ".join(given.words)
    found = find(words)
    if not found:
        raise _UnusableError(
            f"the handbook has nothing on “{words}”. Try fewer words, or none for all of it"
        )
    if given.json:
        _say(json.dumps(handbook_text.as_data(found), indent=1, ensure_ascii=False))
    else:
        _say(handbook_text.told(words))
    return _WITHIN


def _tell_network(folder: Path) -> None:
    from models.record.folders import network_kind, network_words

    kind = network_kind(folder)
    if kind:
        print(f"thirdjournal: {network_words(folder, kind)}", file=sys.stderr)  # noqa: T201


def _backup(given: argparse.Namespace) -> int:
    from app.backup_text import backed_up

    _tell_network(given.record)
    _say(_with_record(lambda: backed_up(given.record, to=given.to)))
    return _WITHIN


def _restore(given: argparse.Namespace) -> int:
    from app.backup_text import looked_into, put_back

    _tell_network(given.record)
    act = looked_into if given.look else put_back
    _say(_with_record(lambda: act(given.backup, given.record)))
    return _WITHIN


def _say_progress(done: int, of: int) -> None:
    """Show a person at the screen how far a long verification is; Ctrl+C stops it."""
    if of > 20 and done % 10 == 0 and sys.stderr.isatty():
        print(f"\r{done} of {of} chains", end="", file=sys.stderr, flush=True)  # noqa: T201


def _export(given: argparse.Namespace) -> int:
    from models.acts import Acts
    from models.record.store import Store

    def work() -> int:
        with Store.open(given.record, create=False) as store:
            return Acts(store).write_file(given.job, given.output)

    acts = _with_record(work)
    _say(f"Job {given.job} with its chain of {acts} acts written to {given.output}")
    return _WITHIN


def _take_in(given: argparse.Namespace) -> int:
    from models.acts import Acts
    from models.jobfile import JobFileError
    from models.record.store import Store

    def work() -> str:
        with Store.open(given.record, create=False) as store:
            laid = Acts(store).take_in(given.jobfile.read_bytes(), by=given.by)
        new = f"{laid.new_acts} acts are new" if laid.new_acts else "all of it was there already"
        return f"Job {laid.number}: {new}; head {laid.head.sequence}:{laid.head.digest[:16]}"

    try:
        _say(_with_record(work))
    except JobFileError as trouble:
        raise _UnusableError(f"{given.jobfile}: {trouble}") from None
    return _WITHIN


def _demo(given: argparse.Namespace) -> int:
    from app.demo import make

    made = _with_record(lambda: make(given.folder))
    _say(made.words)
    if given.no_window or not has_screen():
        return _WITHIN
    return _open(made.folder, made.sign_in, made.job)


def _window(given: argparse.Namespace) -> int:
    if not has_screen():
        raise _UnusableError(
            "there is no screen to open a window on. Set DISPLAY, or use a command: "
            "thirdjournal --help"
        )
    from app.settings import shop_folder

    return _open(given.shop or shop_folder(), None, None)


def _open(folder: Path, sign_in: str | None, job: str | None) -> int:
    from app.start import run

    return int(_with_record(lambda: run(folder, sign_in=sign_in, job=job)))


def _with_record(act: Callable[[], Any]) -> Any:  # noqa: ANN401  (whatever the act returns)
    from models.record.errors import RecordError

    try:
        return act()
    except RecordError as trouble:
        raise _UnusableError(str(trouble)) from None


def has_screen() -> bool:
    """Tell whether a window can be opened: a display, and not the screenless platform of tests."""
    if os.environ.get("QT_QPA_PLATFORM") in ("offscreen", "minimal"):
        return False
    if sys.platform in ("win32", "darwin"):
        return True
    return bool(os.environ.get("DISPLAY") or os.environ.get("WAYLAND_DISPLAY"))
