"""What a plan's copies of a shop's own materials must hold true in themselves."""

from collections.abc import Iterator

from models.job import OwnMaterial
from models.jobfile.faults import Fault, Words
from models.units import Quantity

__all__ = ["material_faults"]

# What no metal is beyond; the program refuses to work with it.
_MOST_POISSON = 0.5


def material_faults(place: str, own: OwnMaterial) -> Iterator[Fault]:
    """Find what keeps one material from being worked with."""
    for name in ("name", "source"):
        if not getattr(own, name).strip():
            yield Fault(f"{place}.{name}", getattr(own, name), "words")
    if not 0.0 < own.poisson.si < _MOST_POISSON:
        yield Fault(f"{place}.poisson", own.poisson.written, "more than 0 and less than 0.5")
    single = ("density", "conductivity", "specific_heat", "yield_strength")
    for name in single:
        yield from _positive(f"{place}.{name}", getattr(own, name))
    for name, part in (("expansions", "coefficient"), ("moduli", "modulus")):
        rows = getattr(own, name)
        if not rows:
            yield Fault(f"{place}.{name}", Words("an empty list"), "a value at one temperature")
        seen: set[int] = set()
        for index, row in enumerate(rows):
            here = f"{place}.{name}[{index}]"
            yield from _positive(f"{here}.{part}", getattr(row, part))
            if row.temperature.whole in seen:
                found = row.temperature.written
                yield Fault(f"{here}.temperature", found, "a temperature that no earlier row has")
            seen.add(row.temperature.whole)


def _positive(place: str, quantity: Quantity | None) -> Iterator[Fault]:
    if quantity is not None and quantity.whole <= 0:
        yield Fault(place, quantity.written, "more than 0")
