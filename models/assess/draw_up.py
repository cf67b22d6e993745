"""A hub on its taper: what its draw-up must be, what it was, and the fit that it made."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from models.assess.land_limits import limits_of
from models.assess.sizes import LandFit
from models.assess.strength_pair import Pair, pair_of, pressure_of
from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import hub_stresses
from models.engineering.hub_growth import pressure_from_outer_growth
from models.engineering.sizes import Interference
from models.engineering.taper_fits import (
    advance_for_interference,
    axial_release_force,
    dilation_pressure,
    interference_from_advance,
    seating_loss,
)
from models.job import DrawUp, Item, Job, Land, TaperFit

__all__ = ["DrawnUp", "drawn_up", "taper_fits"]


@dataclass(frozen=True, eq=False)
class DrawnUp:
    """What a taper asks for, and what was measured when the hub was drawn up; SI numbers."""

    item: Item
    taper: TaperFit
    entry: DrawUp | None
    least_advance: float | None
    greatest_advance: float | None
    advance_uncertainty: float | None
    """Expanded, of one advance [m]."""
    wanted: tuple[float, float]
    """Advances that the limits of the interference stand for, without seating loss [m]."""
    expected_pressure: float | None
    """Dilation pressure that floats the hub at its greatest interference allowed [Pa]."""
    pressure_at_yield: float | None
    """Oil pressure at which the bore begins to yield [Pa]."""
    push_off: float | None
    """Force with which the floating hub pushes itself off [N]."""
    seating_loss: float | None
    """Diameter lost in bedding in, where the growth of the hub was measured [m]."""

    @property
    def spread(self) -> float | None:
        """Greatest less least advance around the hub, in m: a hub that sits askew shows here."""
        if self.least_advance is None or self.greatest_advance is None:
            return None
        return self.greatest_advance - self.least_advance


def drawn_up(job: Job, item: Item, entries: Sequence[object]) -> DrawnUp | None:
    """Work out a taper's draw-up; None for an item without a taper."""
    taper = item.taper
    if taper is None or not item.lands:
        return None
    mine = [one for one in entries if isinstance(one, DrawUp) and one.item == item.key]
    entry = mine[-1] if mine else None
    advances = _advances(entry)
    limits = [limits_of(land) for land in item.lands]
    wanted = (
        advance_for_interference(
            interference=max(one.least.value.si for one in limits), taper=taper.taper.si
        ),
        advance_for_interference(
            interference=min(one.greatest.value.si for one in limits), taper=taper.taper.si
        ),
    )
    pair = pair_of(job.plan, item)
    return DrawnUp(
        item=item,
        taper=taper,
        entry=entry,
        least_advance=min(advances, default=None),
        greatest_advance=max(advances, default=None),
        advance_uncertainty=_advance_uncertainty(job, entry),
        wanted=wanted,
        expected_pressure=_expected_pressure(pair, item),
        pressure_at_yield=_pressure_at_yield(pair, item),
        push_off=_push_off(pair, item, taper),
        seating_loss=_seating_loss(pair, item, taper, entry, advances),
    )


def taper_fits(item: Item, found: DrawnUp) -> tuple[LandFit, ...]:
    """Give the fits of a part on its taper: the interference is what the advance has made."""
    if found.least_advance is None or found.greatest_advance is None:
        return tuple(LandFit(land, None, None, None, None) for land in item.lands)
    slope = found.taper.taper.si
    least = interference_from_advance(advance=found.least_advance, taper=slope)
    greatest = interference_from_advance(advance=found.greatest_advance, taper=slope)
    unsure = found.advance_uncertainty
    return tuple(
        LandFit(
            land,
            None,
            None,
            _interference(land, least, greatest),
            None if unsure is None else slope * unsure,
        )
        for land in item.lands
    )


def _interference(land: Land, least: float, greatest: float) -> Interference:
    middle = (least + greatest) / 2.0
    return Interference(middle, least, greatest, middle / land.nominal_diameter.si)


def _advances(entry: DrawUp | None) -> list[float]:
    # The hub moves towards or away from the face that its stand-off is taken from; either way the
    # difference is what it has advanced.
    if entry is None:
        return []
    return [abs(one.drawn_up.si - one.zero.si) for one in entry.advances]


def _advance_uncertainty(job: Job, entry: DrawUp | None) -> float | None:
    if entry is None or entry.instrument is None:
        return None
    instrument = job.instrument(entry.instrument)
    if instrument is None or instrument.uncertainty is None:
        return None
    # Two readings of one instrument; what it shows wrongly by its scale falls out, the rest stays.
    return math.sqrt(2.0) * instrument.uncertainty.si


def _expected_pressure(pair: Pair | None, item: Item) -> float | None:
    if pair is None:
        return None
    try:
        sections = [
            max(0.0, pressure_of(pair, land, limits_of(land).greatest.value.si))
            for land in item.lands
        ]
        return dilation_pressure(section_pressures=sections, margin=0.0)
    except OutOfRangeError:
        return None


def _pressure_at_yield(pair: Pair | None, item: Item) -> float | None:
    strength = item.yield_strength.si if item.yield_strength else None
    if strength is None and pair is not None:
        strength = pair.hub.yield_strength
    if strength is None:
        return None
    # Stress is proportional to pressure: what one pascal makes, at the thinnest section.
    made = max(
        hub_stresses(
            pressure=1.0,
            interface_diameter=land.nominal_diameter.si,
            hub_outer_diameter=land.hub_outer_diameter.si,
        ).bore.von_mises
        for land in item.lands
    )
    return strength / made


def _push_off(pair: Pair | None, item: Item, taper: TaperFit) -> float | None:
    pressure = _expected_pressure(pair, item)
    if pressure is None:
        return None
    try:
        return sum(
            axial_release_force(
                pressure=pressure,
                mean_diameter=land.nominal_diameter.si,
                contact_length=land.end.si - land.start.si,
                taper=taper.taper.si,
                friction=0.0,
            )
            for land in item.lands
        )
    except OutOfRangeError:
        return None


def _seating_loss(
    pair: Pair | None,
    item: Item,
    taper: TaperFit,
    entry: DrawUp | None,
    advances: Sequence[float],
) -> float | None:
    if pair is None or entry is None or entry.hub_growth is None or not advances:
        return None
    land = item.lands[0]
    try:
        pressure = pressure_from_outer_growth(
            growth=entry.hub_growth.si,
            interface_diameter=land.nominal_diameter.si,
            hub_outer_diameter=land.hub_outer_diameter.si,
            modulus=pair.hub_modulus,
        )
        # The pressure is proportional to the interference.
        made = pressure / pressure_of(pair, land, 1.0)
        return seating_loss(
            advance=sum(advances) / len(advances), interference=made, taper=taper.taper.si
        )
    except OutOfRangeError:
        return None
