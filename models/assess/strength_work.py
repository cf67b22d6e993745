"""How pressure, stress, holding and release of a measured fit are worked out."""

from collections.abc import Sequence

from models.assess.sizes import LandFit
from models.assess.strength import FitStrength, LandStrength, Strength
from models.assess.strength_holding import friction_of, holding_of
from models.assess.strength_pair import Pair, pair_of, pressure_of, running_pair
from models.assess.strength_speed import lands_at_speed, release_of
from models.engineering.errors import OutOfRangeError
from models.engineering.fit_stress import hub_stresses, shaft_stresses, yield_margin
from models.engineering.fits import smoothing_loss
from models.engineering.materials import Material
from models.engineering.roughness import PEAKS_PER_AVERAGE, peak_to_valley
from models.engineering.yield_onset import hub_pressure_at_yield, shaft_pressure_at_yield
from models.job import Item, Plan, RoughnessKind
from models.units import Length, unit_set

__all__ = ["fit_strength"]


def fit_strength(plan: Plan, item: Item, fits: Sequence[LandFit]) -> FitStrength | None:
    """Work out pressure, stress, holding and release of an item; None where not enough is known.

    Every land must be measured: a part does not grip on half of its lands.
    """
    pair = pair_of(plan, item)
    if pair is None or not fits or any(fit.interference is None for fit in fits):
        return None
    if friction_of(item)[0] <= 0.0:
        return None
    try:
        lands = tuple(_land_strength(plan, item, pair, fit) for fit in fits)
        holding = holding_of(plan, item, lands)
    except OutOfRangeError:
        return None
    return FitStrength(
        item=item,
        lands=lands,
        smoothing_source=_smoothing_source(plan, item),
        holding=holding,
        hub_yield=_hub_yield(item, pair.hub),
        shaft_yield=_shaft_yield(plan, pair.shaft),
        trip_speed=plan.rotor.trip_speed.si if plan.rotor.trip_speed else None,
        units=unit_set(plan.rotor.units),
    )


def _land_strength(plan: Plan, item: Item, pair: Pair, fit: LandFit) -> LandStrength:
    assert fit.interference is not None
    land = fit.land
    loss = _smoothing(plan, item)
    least = fit.interference.least - loss
    greatest = fit.interference.greatest
    diameter, outer = land.nominal_diameter.si, land.hub_outer_diameter.si
    high = pressure_of(pair, land, greatest)
    hub = hub_stresses(pressure=high, interface_diameter=diameter, hub_outer_diameter=outer)
    shaft = shaft_stresses(
        pressure=high, interface_diameter=diameter, shaft_bore_diameter=pair.shaft_bore
    )
    worst = shaft.bore.von_mises if shaft.bore else shaft.seat.von_mises
    unsure = fit.expanded_uncertainty
    hub_yield, shaft_yield = _hub_yield(item, pair.hub), _shaft_yield(plan, pair.shaft)
    return LandStrength(
        key=land.key,
        least_interference=least,
        greatest_interference=greatest,
        smoothing_loss=loss,
        least_pressure=pressure_of(pair, land, least),
        greatest_pressure=high,
        # The pressure is proportional to the interference.
        pressure_uncertainty=None if unsure is None else pressure_of(pair, land, unsure),
        interference_uncertainty=unsure,
        hub=hub,
        shaft=shaft,
        hub_margin=_margin(hub.bore.von_mises, hub_yield),
        shaft_margin=_margin(worst, shaft_yield),
        hub_pressure_at_yield=(
            hub_pressure_at_yield(
                yield_strength=hub_yield.value,
                interface_diameter=diameter,
                hub_outer_diameter=outer,
            )
            if hub_yield
            else None
        ),
        shaft_pressure_at_yield=(
            shaft_pressure_at_yield(
                yield_strength=shaft_yield.value,
                interface_diameter=diameter,
                shaft_bore_diameter=pair.shaft_bore,
            )
            if shaft_yield
            else None
        ),
        at_speed=lands_at_speed(
            plan, item, pair, land, least=least, greatest=greatest, uncertainty=unsure
        ),
        release=release_of(item, pair, land, least),
        # What a metre more of interference presses, at running temperatures.
        pressure_per_interference=pressure_of(running_pair(item, pair), land, 1.0),
    )


def _margin(stress: float, strength: Strength | None) -> float | None:
    if strength is None:
        return None
    return yield_margin(equivalent_stress=stress, yield_strength=strength.value)


def _smoothing(plan: Plan, item: Item) -> float:
    """Tell what smoothing takes: nothing, unless the plan gives its factor and both roughnesses."""
    bore, seat, factor = item.roughness, plan.shaft.roughness, plan.smoothing_factor
    if bore is None or seat is None or factor is None:
        return 0.0
    return smoothing_loss(
        factor=factor,
        bore_roughness=_height(bore, item.roughness_kind),
        seat_roughness=_height(seat, plan.shaft.roughness_kind),
    )


def _height(roughness: Length, kind: RoughnessKind) -> float:
    return roughness.si if kind == "Rz" else peak_to_valley(average_roughness=roughness.si)


def _smoothing_source(plan: Plan, item: Item) -> str:
    bore, seat = item.roughness, plan.shaft.roughness
    if bore is None or seat is None or plan.smoothing_factor is None:
        return "smoothing not counted"
    edition = plan.smoothing_edition or "edition not named in the plan"
    kinds = {item.roughness_kind, plan.shaft.roughness_kind}
    taken = "both roughnesses, given as Rz"
    if kinds != {"Rz"}:
        taken = (
            f"bore {item.roughness_kind} {bore.written} and seat {plan.shaft.roughness_kind} "
            f"{seat.written}, Rz taken as {PEAKS_PER_AVERAGE:g} Ra"
        )
    return f"smoothing {plan.smoothing_factor:g} of {taken}, {edition}"


def _hub_yield(item: Item, hub: Material) -> Strength | None:
    if item.yield_strength is not None:
        return Strength(item.yield_strength.si, "the plan", by_plan=True)
    return _published_yield(hub)


def _shaft_yield(plan: Plan, shaft: Material) -> Strength | None:
    if plan.shaft.yield_strength is not None:
        return Strength(plan.shaft.yield_strength.si, "the plan", by_plan=True)
    return _published_yield(shaft)


def _published_yield(material: Material) -> Strength | None:
    if material.yield_strength is None:
        return None
    source = material.sources.yield_strength or material.name
    return Strength(
        material.yield_strength, f"published for {material.key}: {source}", by_plan=False
    )
