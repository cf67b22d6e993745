"""From a part's fit and what was measured on it to whether it may go on."""

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cached_property

from models.assess.heat_limits import highest_of
from models.assess.materials import expansion_of, material_of
from models.assess.sizes import LandFit
from models.engineering.cooling import HotPart
from models.engineering.drop_window import DropWindow, drop_window
from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import area_weighted_mean_temperature
from models.engineering.heating import gauge_diameter, target_temperature
from models.engineering.materials import EXPANSION_SPREAD
from models.engineering.over_seat import Seat
from models.job import Confirmation, GaugeTry, Heating, Hot, Item, Job, Plan
from models.rules.facts import HeatFacts
from models.units import unit_set

__all__ = ["Heat", "heat_facts", "item_heat", "land_gauge", "target_with"]

# Air in a workshop where nothing was recorded, for the drop window only (common practice).
_ROOM_TEMPERATURE = 20.0


@dataclass(frozen=True, eq=False)
class Heat:
    """What a hot item needs, may have, and has."""

    item: Item
    target: float | None
    plain_target: float | None
    # What the uncertainty of the interference (k = 2) would ask for beyond the target, in K.
    target_uncertainty: float | None
    highest: float | None
    highest_origin: str | None
    # Over the area, from bore to rim: a free bore follows it and not its own temperature.
    mean_temperature: float | None
    shaft_temperature: float | None
    gauge_sizes: tuple[tuple[str, float], ...]
    heating: Heating | None
    coldest_bore: float | None
    hottest: float | None
    spread: float | None
    fits: tuple[LandFit, ...]
    plan: Plan

    @cached_property
    def window(self) -> DropWindow | None:
        """How long the part may hang in the room and over its seat; None where not enough is known.

        Worked out when it is asked for: no rule rests on it, and it takes longer than all of them.
        """
        return _window(self)


def land_gauge(heat: Heat, land: str) -> float | None:
    """Look up the size of the hot-bore gauge for a land."""
    return next((size for key, size in heat.gauge_sizes if key == land), None)


def item_heat(job: Job, item: Item, fits: Sequence[LandFit], heatings: Sequence[Heating]) -> Heat:
    """Work out target, gauge sizes and drop window of a hot item from its measured fits."""
    mine = [one for one in heatings if one.item == item.key]
    heating = mine[-1] if mine else None
    latest = _latest_by_place(heating.temperatures if heating else ())
    bore = [one.temperature.si for one in latest if one.where == "bore"]
    everywhere = [one.temperature.si for one in latest]
    hottest = [one.temperature.si for one in heating.temperatures] if heating else []
    shaft_temperature = _shaft_temperature(heating, fits)
    target, plain, unsure = _targets(job.plan, item, fits, shaft_temperature)
    highest, highest_origin = highest_of(job.plan, item)
    return Heat(
        item=item,
        target=target,
        plain_target=plain,
        target_uncertainty=unsure,
        highest=highest,
        highest_origin=highest_origin,
        mean_temperature=_mean_temperature(item, latest),
        shaft_temperature=shaft_temperature,
        gauge_sizes=_gauge_sizes(job, item, fits, shaft_temperature),
        heating=heating,
        coldest_bore=min(bore, default=None),
        hottest=max(hottest, default=None),
        spread=max(everywhere) - min(everywhere) if len(everywhere) > 1 else None,
        fits=tuple(fits),
        plan=job.plan,
    )


def heat_facts(
    job: Job, heat: Heat, serial: str | None, confirmations: Sequence[Confirmation]
) -> HeatFacts:
    """State the facts of a hot item for the rules."""
    furnace = _confirmation(confirmations, heat.item.key, "before the furnace")
    door = _confirmation(confirmations, heat.item.key, "before the door")
    tries = _latest_tries(heat.heating.gauge if heat.heating else ())
    lands = [land.key for land in heat.item.lands]
    small = tuple(
        one.land
        for one in tries
        if (size := land_gauge(heat, one.land)) is not None and one.size.si < size - 1e-6
    )
    return HeatFacts(
        units=unit_set(job.plan.rotor.units),
        serial=serial,
        target_temperature=heat.target,
        highest_temperature=heat.highest,
        coldest_bore=heat.coldest_bore,
        mean_temperature=heat.mean_temperature,
        hottest_part=heat.hottest,
        spread=heat.spread,
        gauged_lands=tuple(one.land for one in tries if one.passed) if heat.heating else None,
        refused_lands=tuple(one.land for one in tries if not one.passed) if heat.heating else None,
        ungauged_lands=tuple(land for land in lands if land not in {one.land for one in tries}),
        small_gauges=small,
        confirmed_serial=furnace.serial if furnace else None,
        furnace_open_points=_not_in_order(furnace),
        door_serial=door.serial if door else None,
        door_open_points=_not_in_order(door),
        limit_origin=heat.highest_origin,
    )


def _confirmation(
    confirmations: Sequence[Confirmation], item: str, moment: str
) -> Confirmation | None:
    mine = [one for one in confirmations if (one.item, one.moment) == (item, moment)]
    return mine[-1] if mine else None


def _not_in_order(confirmation: Confirmation | None) -> tuple[str, ...] | None:
    if confirmation is None:
        return None
    return tuple(check.what for check in confirmation.checks if check.answer == "no")


def _latest_by_place(temperatures: Sequence[Hot]) -> list[Hot]:
    """Keep the last temperature of each place: a part that was heated on is as hot as it is now."""
    latest: dict[tuple[object, ...], Hot] = {}
    for one in temperatures:
        latest[one.where, one.land, one.angle.whole if one.angle else None] = one
    return list(latest.values())


def _latest_tries(tries: Sequence[GaugeTry]) -> list[GaugeTry]:
    return list({one.land: one for one in tries}.values())


def _shaft_temperature(heating: Heating | None, fits: Sequence[LandFit]) -> float | None:
    if heating is not None and heating.shaft_temperature is not None:
        return heating.shaft_temperature.si
    seats = [fit.seat.entry.part_temperature for fit in fits if fit.seat is not None]
    known = [one.si for one in seats if one is not None]
    return max(known, default=None)


def _targets(
    plan: Plan, item: Item, fits: Sequence[LandFit], shaft_temperature: float | None
) -> tuple[float | None, float | None, float | None]:
    """Find the temperature every land opens at, with and without the margin for the spread.

    The third figure is how much more the uncertainty of the interference would ask for.
    """
    if shaft_temperature is None:
        return None, None, None
    careful = target_with(plan, item, fits, shaft_temperature)
    plain = target_with(plan, item, fits, shaft_temperature, spread=0.0)
    tighter = target_with(plan, item, fits, shaft_temperature, tighter=True)
    unsure = None if careful is None or tighter is None else tighter - careful
    return careful, plain, unsure


def target_with(
    plan: Plan,
    item: Item,
    fits: Sequence[LandFit],
    shaft_temperature: float,
    *,
    spread: float = EXPANSION_SPREAD,
    tighter: bool = False,
) -> float | None:
    """Find the temperature at which every land opens on a shaft at a temperature, in °C.

    `tighter` counts the expanded uncertainty of each interference against the part; without one it
    gives None.
    """
    part, shaft = expansion_of(plan, item.material), expansion_of(plan, plan.shaft.material)
    measured = [fit for fit in fits if fit.interference is not None]
    clearance = item.mounting_clearance
    if part is None or shaft is None or clearance is None or not measured:
        return None
    if len(measured) < len(item.lands):
        return None
    found = []
    try:
        for fit in measured:
            assert fit.interference is not None
            more = 0.0
            if tighter:
                if fit.expanded_uncertainty is None:
                    return None
                more = fit.expanded_uncertainty
            found.append(
                target_temperature(
                    greatest_interference=fit.interference.greatest + more,
                    clearance=clearance.value.si,
                    diameter=fit.land.nominal_diameter.si,
                    shaft_temperature=shaft_temperature,
                    part_expansion=part,
                    shaft_expansion=shaft,
                    expansion_spread=spread,
                )
            )
    except OutOfRangeError:
        return None
    return max(found)


def _mean_temperature(item: Item, latest: Sequence[Hot]) -> float | None:
    """Give the mean over the area of the part, from its coldest places; None without a rim."""
    coldest = {
        where: min((one.temperature.si for one in latest if one.where == where), default=None)
        for where in ("bore", "web", "rim")
    }
    inner, outer = item.outline.bore.si / 2.0, item.outline.outer.si / 2.0
    places = (("bore", inner), ("web", (inner + outer) / 2.0), ("rim", outer))
    known = [(radius, value) for where, radius in places if (value := coldest[where]) is not None]
    if coldest["bore"] is None or coldest["rim"] is None:
        return None
    try:
        return area_weighted_mean_temperature(
            radii=[radius for radius, _ in known], temperatures=[value for _, value in known]
        )
    except OutOfRangeError:
        return None


def _gauge_sizes(
    job: Job, item: Item, fits: Sequence[LandFit], shaft_temperature: float | None
) -> tuple[tuple[str, float], ...]:
    """Size the gauge of each land: the greatest seat at its own temperature plus the clearance."""
    shaft = expansion_of(job.plan, job.plan.shaft.material)
    if shaft is None or shaft_temperature is None or item.mounting_clearance is None:
        return ()
    return tuple(
        (
            fit.land.key,
            gauge_diameter(
                seat_diameter=fit.seat.at_reference.greatest,
                shaft_temperature=shaft_temperature,
                shaft_expansion=shaft,
                clearance=item.mounting_clearance.value.si,
            ),
        )
        for fit in fits
        if fit.seat is not None and fit.seat.at_reference is not None
    )


def _window(heat: Heat) -> DropWindow | None:
    item = heat.item
    plan = heat.plan
    part, shaft = material_of(plan, item.material), material_of(plan, plan.shaft.material)
    part_expansion = expansion_of(plan, item.material)
    shaft_expansion = expansion_of(plan, plan.shaft.material)
    tight = [fit for fit in heat.fits if fit.interference is not None]
    if (
        part is None
        or shaft is None
        or part_expansion is None
        or shaft_expansion is None
        or part.conductivity is None
        or part.specific_heat is None
        or shaft.specific_heat is None
        or heat.coldest_bore is None
        or heat.shaft_temperature is None
        or not tight
    ):
        return None
    worst = max(tight, key=lambda fit: fit.interference.greatest if fit.interference else 0.0)
    if worst.seat is None or worst.seat.at_reference is None or worst.bore is None:
        return None
    if worst.bore.at_reference is None:
        return None
    try:
        return drop_window(
            part=HotPart(
                bore_diameter=worst.bore.at_reference.least,
                outer_diameter=worst.land.hub_outer_diameter.si,
                length=item.outline.end.si - item.outline.start.si,
                density=part.density,
                specific_heat=part.specific_heat,
                conductivity=part.conductivity,
            ),
            seat=Seat(
                diameter=worst.seat.at_reference.greatest,
                temperature=heat.shaft_temperature,
                density=shaft.density,
                specific_heat=shaft.specific_heat,
                expansion=shaft_expansion,
                inner_diameter=plan.shaft.bore.si if plan.shaft.bore else 0.0,
            ),
            part_expansion=part_expansion,
            # A bore follows the mean of its part; a hot bore in a cool disc closes sooner.
            bore_temperature=min(
                one for one in (heat.coldest_bore, heat.mean_temperature) if one is not None
            ),
            air_temperature=_ROOM_TEMPERATURE,
        )
    except OutOfRangeError:
        return None
