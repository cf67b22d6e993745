"""The traveler: what each page says, that it is whole, that equal jobs give equal bytes."""

import hashlib
import re
import subprocess
import sys
from collections.abc import Callable
from io import BytesIO
from pathlib import Path

import msgspec
import pypdf
import pytest

from models.assess import assess
from models.job import AnyEntry, Head, Job, StationReadings
from models.units import Angle
from reports import traveler
from sample_data.load import compressor, pump
from tests.assess.test_acceptance import field
from tests.assess.test_acceptance import job as finished_job
from tests.assess.test_acceptance import run as run_at_speed
from tests.assess.test_balance import job as balanced
from tests.assess.test_balance import run, weighed

MILLIMETRE = 72.0 / 25.4


class Paper:
    """A rendered traveler and its words."""

    def __init__(self, job: Job, size: str = "A4") -> None:
        self.job = job
        self.data = traveler.render(assess(job), size=size)
        self.pdf = pypdf.PdfReader(BytesIO(self.data))
        self.pages = [" ".join(page.extract_text().split()) for page in self.pdf.pages]

    @property
    def words(self) -> str:
        return " ".join(self.pages)


@pytest.fixture(scope="module")
def unfinished() -> Paper:
    return Paper(compressor())


@pytest.fixture(scope="module")
def finished() -> Paper:
    return Paper(pump())


def test_every_page_says_which_of_how_many_it_is(unfinished: Paper, finished: Paper) -> None:
    for paper in (unfinished, finished):
        count = len(paper.pages)
        for number, page in enumerate(paper.pages, start=1):
            assert f"{number} of {count}" in page
            assert paper.job.plan.rotor.serial in page
            assert paper.job.number in page


def test_an_unfinished_rotor_says_so_and_what_is_next(unfinished: Paper) -> None:
    assert "Unfinished" in unfinished.pages[0]
    assert "6 of 15 steps are settled" in unfinished.pages[0]
    assert "This rotor is unfinished." in unfinished.words
    assert "not yet mounted" in unfinished.words


def test_a_finished_rotor_is_within_limits_and_leaves_acceptance_to_a_person(
    finished: Paper,
) -> None:
    assert "Within limits" in finished.pages[0]
    assert "a named person's act" in finished.pages[0]
    assert "unfinished" not in finished.words


def test_an_invented_rotor_is_called_invented_on_its_first_page(unfinished: Paper) -> None:
    assert "Invented:" in unfinished.pages[0]
    assert "(invented)" in unfinished.pages[0]


def test_every_station_of_every_attempt_stands_with_its_change(unfinished: Paper) -> None:
    for attempt in assess(unfinished.job).attempts:
        pages = [
            page
            for page in unfinished.pages
            if f"{unfinished.job.plan.step_number(attempt.step.key)} of 15, {attempt.step.title}"
            in page
            or "What the shaft did" in page
        ]
        for change in attempt.changes:
            assert any(re.search(rf"\b{change.key}\b", page) for page in pages), change.key


def test_the_remount_is_told_with_station_amount_and_limit(unfinished: Paper) -> None:
    spread = next(page for page in unfinished.pages if "Attempt 1: removed" in page)

    # The truth of the story: the total stands still while the high spot turns; limit 0.0010 in.
    assert "E1 changed 0.0013 in" in spread or "E1 changed 0.0014 in" in spread
    assert "limit 0.0010 in" in spread
    assert "plain total shows nothing of it" in spread
    assert "Attempt 2: within limits" in spread
    assert "Removal of attempt 1" in spread


def test_a_struck_reading_stands_beside_what_replaced_it(unfinished: Paper) -> None:
    struck = [one for entry in unfinished.job.entries for one in getattr(entry, "corrections", ())]
    assert struck
    for one in struck:
        page = next(page for page in unfinished.pages if one.reason in page)
        assert one.was.replace("-", "−") in page or one.was in page
        assert one.now.replace("-", "−") in page or one.now in page


def test_every_reading_stands_as_typed_in_the_appendix(finished: Paper) -> None:
    appendix = " ".join(
        page for page in finished.pages if "Readings as typed" in page or "again" in page
    )
    survey = next(one for one in finished.job.entries if one.title == "Runout survey")
    for station in survey.stations:
        row = " ".join(str(one).replace("-", "−") for one in station.typed)
        assert f"{station.station} {row}" in appendix


@pytest.mark.parametrize(
    "sentence",
    [
        "counted against the rotation, seen from the drive end",
        "TIR is the total indicator reading",
        "± is expanded, k = 2",
        "local codes and licensed practice",
        "Signed for the whole build",
        "Limits and where they come from",
        "drawing HR-4471-02, invented, revision C",
        "may be read: side to side",
        "made from a job file",
        "OM-06",
    ],
)
def test_what_every_traveler_says(unfinished: Paper, sentence: str) -> None:
    assert sentence in unfinished.words


def test_the_head_of_the_chain_stands_on_every_page() -> None:
    head = Head(sequence=291, digest="9c417e02b58d1fa6" + "0" * 48)
    paper = Paper(msgspec.structs.replace(compressor(), head=head))

    for page in paper.pages:
        assert "9c41 7e02 b58d 1fa6" in page
        assert "entries 1 to 291" in page


def test_step_spreads_open_on_even_pages(unfinished: Paper, finished: Paper) -> None:
    for paper in (unfinished, finished):
        starts = [
            number
            for number, page in enumerate(paper.pages, start=1)
            if re.match(r"Step \d+ ", page)
        ]
        assert starts
        assert all(number % 2 == 0 for number in starts)


def test_only_the_one_family_is_set_and_every_font_is_embedded(unfinished: Paper) -> None:
    fonts = {}
    for page in unfinished.pdf.pages:
        for font in page["/Resources"]["/Font"].values():
            one = font.get_object()
            fonts[one["/BaseFont"]] = one
    assert fonts
    for name, one in fonts.items():
        assert "IBMPlexSans" in name
        assert "/FontFile2" in one["/FontDescriptor"].get_object()


def test_equal_jobs_give_equal_bytes_in_another_process_too(unfinished: Paper) -> None:
    again = subprocess.run(
        [
            sys.executable,
            "-c",
            "import hashlib; from models.assess import assess; from reports import traveler;"
            "from sample_data.load import compressor;"
            "print(hashlib.sha256(traveler.render(assess(compressor()))).hexdigest())",
        ],
        cwd=Path(__file__).resolve().parents[2],
        capture_output=True,
        text=True,
        check=True,
    )

    assert again.stdout.strip() == hashlib.sha256(unfinished.data).hexdigest()


def positions(paper: Paper) -> list[tuple[int, float, float, str]]:
    """Give where every run of words begins: page, mm from the left, mm from the foot."""
    found: list[tuple[int, float, float, str]] = []
    for number, page in enumerate(paper.pdf.pages, start=1):

        def note(
            text: str, matrix: list[float], own: list[float], *_: object, number: int = number
        ) -> None:
            if text.strip():
                x = (own[4] * matrix[0] + matrix[4]) / MILLIMETRE
                y = (own[5] * matrix[3] + matrix[5]) / MILLIMETRE
                found.append((number, x, y, text.strip()))

        page.extract_text(visitor_text=note)
    return found


def stays_in_the_frame(paper: Paper, height: float) -> None:
    # The frame: 20 mm binding margin, 180 mm wide, 10 mm elsewhere.
    for number, x, y, text in positions(paper):
        assert 20.0 <= x <= 200.0, (number, x, text)
        assert 10.0 <= y <= height - 10.0, (number, y, text)


def without_entries(job: Job) -> Job:
    return msgspec.structs.replace(job, entries=(), verdicts=())


def with_long_names(job: Job) -> Job:
    plan = job.plan
    steps = tuple(
        msgspec.structs.replace(one, title=f"{one.title} of the second casing, refurbished part")
        for one in plan.steps
    )
    rotor = msgspec.structs.replace(
        plan.rotor, name="Compressor rotor with an unreasonably long name " * 3
    )
    people = tuple(
        msgspec.structs.replace(one, name=f"{one.name}-Featherstonehaugh of Cholmondeley")
        for one in job.people
    )
    changed = msgspec.structs.replace(plan, steps=steps, rotor=rotor)
    return msgspec.structs.replace(job, plans=(changed,), people=people, customer="x" * 120)


def with_many_marks(job: Job) -> Job:
    """Read every station at three times as many marks."""

    def more(entry: AnyEntry) -> AnyEntry:
        if entry.title != "Runout survey":
            return entry
        marks = tuple(Angle.read(str(15 * one), "°") for one in range(24))
        stations = tuple(
            StationReadings(
                station=one.station,
                typed=tuple(value for value in one.typed for _ in range(3)),
                again=one.again,
            )
            for one in entry.stations
        )
        return msgspec.structs.replace(entry, angles=marks, stations=stations, corrections=())

    return msgspec.structs.replace(job, entries=tuple(more(one) for one in job.entries))


@pytest.mark.parametrize(
    ("change", "job"),
    [(lambda job: job, pump), (without_entries, compressor), (with_long_names, compressor),
     (with_many_marks, compressor)],
    ids=["as it is", "nothing done yet", "long names", "24 marks"],
)  # fmt: skip
def test_nothing_is_set_outside_the_frame(
    change: Callable[[Job], Job], job: Callable[[], Job]
) -> None:
    stays_in_the_frame(Paper(change(job())), 297.0)


def test_letter_carries_the_same_block(unfinished: Paper) -> None:
    letter = Paper(compressor(), size="Letter")

    stays_in_the_frame(letter, 279.4)
    assert "Unfinished" in letter.pages[0]


def test_a_traveler_is_written_whole_or_not_at_all(tmp_path: Path) -> None:
    view = assess(without_entries(compressor()))
    path = tmp_path / "a.pdf"

    traveler.write(view, path)
    assert path.read_bytes().startswith(b"%PDF")
    assert [one.name for one in tmp_path.iterdir()] == ["a.pdf"]

    with pytest.raises(OSError, match="No such file"):
        traveler.write(view, tmp_path / "nowhere" / "b.pdf")


def test_a_failing_traveler_leaves_the_old_one_alone(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    path = tmp_path / "a.pdf"
    path.write_bytes(b"the old one")
    monkeypatch.setattr(traveler, "render", lambda *_, **__: 1 / 0)

    with pytest.raises(ZeroDivisionError):
        traveler.write(assess(without_entries(compressor())), path)

    assert path.read_bytes() == b"the old one"
    assert [one.name for one in tmp_path.iterdir()] == ["a.pdf"]


def test_balance_stands_beside_its_limit_with_what_the_part_brought() -> None:
    paper = Paper(balanced(weighed(), run("one", 20e-6 + 0j, 10e-6j)))

    assert "Balance, attempt 1" in paper.words
    assert "as found 600 r/min" in paper.words
    assert "20.000 at 0.000°" in paper.words
    assert "journal loads weighed" in paper.words


def test_what_was_asked_at_speed_stands_on_the_closing_page() -> None:
    paper = Paper(finished_job(run_at_speed(12), field("1.4")))

    assert "At speed, and before it leaves" in paper.words
    assert "peak to peak, limit" in paper.words
    assert "1.4 gauss (0.14 mT) remain, limit 2.0 gauss" in paper.words
