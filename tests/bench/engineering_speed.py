"""Time the engineering: a station being typed, a whole survey with all rules, a whole job checked.

Run it as `python -m tests.bench.engineering_speed`; it prints milliseconds of processor time
(others may use the machine), each beside 40 separate least-squares solutions of one station by
`numpy.linalg.lstsq` in the same run, and asserts nothing.
"""

import math
import statistics
import sys
import time
from collections.abc import Callable

import numpy as np

from app.presenters.bench.reading import Reading
from models.assess import assess, ground, runout
from models.assess.attempts import work
from models.assess.attempts.on_runout import runout_findings
from models.assess.runout import compare_surveys, read_survey
from models.job import Job, RunoutSurvey
from tests.bench.wide_job import forty_parts, forty_stations

STATIONS, MARKS = 40, 24


def forget() -> None:
    """Drop everything that was worked out before, so that nothing is found ready."""
    ground._recent = ()
    for known in (runout._read_survey, runout._read_station, runout._metres, work._assess_attempt):
        known.cache_clear()


def timed(times: int, what: Callable[[], object], *, cold: bool = True) -> list[float]:
    spent = []
    for _ in range(times):
        if cold:
            forget()
        begun = time.process_time()
        what()
        spent.append((time.process_time() - begun) * 1000.0)
    return spent


def show(name: str, spent: list[float], base: float, target: str) -> None:
    middle = statistics.median(spent)
    sys.stdout.write(
        f"{name:<56} median {middle:9.2f} ms  worst {max(spent):9.2f}  "
        f"= {middle / base:6.1f} x lstsq   ({target})\n"
    )


def forty_lstsq() -> object:
    angles = np.arange(MARKS) * 2.0 * math.pi / MARKS
    columns = [np.ones(MARKS), np.cos(angles), np.sin(angles), np.cos(2 * angles)]
    design = np.column_stack([*columns, np.sin(2 * angles)])
    readings = np.cos(angles) * 1e-5
    return [np.linalg.lstsq(design, readings, rcond=None) for _ in range(STATIONS)]


def typed(job: Job) -> Callable[[], object]:
    """One station typed once more, with its change, its rules and its questions."""
    view = assess(job)
    attempt = view.attempts[-1]
    survey = attempt.surveys[-1].entry
    reading = Reading(job, survey, attempt)
    spot = next(one for one in reading.spots if one.station == survey.stations[20].station)
    reading.correcting = spot
    texts = iter(str(7.0 + 0.1 * count) for count in range(1_000_000))

    def once() -> object:
        reading.live = next(texts)
        return reading.so_far()

    return once


def main() -> None:
    """Print the figures."""
    base = statistics.median(timed(50, forty_lstsq))
    show("40 separate numpy.linalg.lstsq of 24 marks", [base], base, "the measure")
    job = forty_stations(STATIONS, MARKS)
    # At the bench the other stations of the survey were read before; only the typed one is new.
    key = timed(50, typed(job), cold=False)
    show("the station being typed, with its rules", key, base, "2 ms")
    view = assess(job)
    attempt = view.attempts[-1]
    assert attempt.judged is not None
    assert attempt.baseline is not None
    before, after = attempt.baseline.entry, attempt.judged.entry
    assert isinstance(after, RunoutSurvey)

    def whole() -> object:
        one, other = read_survey(job, before), read_survey(job, after)
        changes = compare_surveys(job, one, other)
        return list(runout_findings(job, attempt)), changes

    show("all rules on a survey of 40 stations × 24 marks", timed(30, whole), base, "16 ms")
    many = forty_parts(parts=40, attempts=3)
    show("check of 40 parts with 3 attempts each", timed(3, lambda: assess(many)), base, "1000 ms")


if __name__ == "__main__":
    main()
