"""What the interference limits of a land must hold true: figures in order, or a fit that exists."""

from collections.abc import Iterator

from models.engineering.errors import OutOfRangeError
from models.engineering.named_fits import named_fit
from models.job import Land
from models.jobfile.faults import MISSING, Fault

__all__ = ["interference_faults"]


def interference_faults(place: str, land: Land) -> Iterator[Fault]:
    """Find limits that are missing or contradict each other, and names that no table has."""
    limits = {"least": land.least_interference, "greatest": land.greatest_interference}
    missing = [name for name, limit in limits.items() if limit is None]
    if land.fit_by_name:
        try:
            named_fit(nominal_diameter=land.nominal_diameter.si, name=land.fit_by_name)
        except OutOfRangeError as problem:
            expected = f"a fit that the tables know; {problem}"
            yield Fault(f"{place}.fit_by_name", land.fit_by_name, expected)
    elif missing:
        expected = "a limit, or a fit by its name in fit_by_name"
        yield Fault(f"{place}.{missing[0]}_interference", MISSING, expected)
    if land.fit_by_name and len(missing) == 1:
        expected = "both figures, or the fit's name alone"
        yield Fault(f"{place}.{missing[0]}_interference", MISSING, expected)
    least, greatest = land.least_interference, land.greatest_interference
    if least is None or greatest is None:
        return
    if greatest.value.whole < least.value.whole:
        expected = f"not less than the least, {least.value.written}"
        yield Fault(f"{place}.greatest_interference.value", greatest.value.written, expected)
