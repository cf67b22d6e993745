"""One invented hot part on one shaft, with a fit as measured, for what a job works out from it."""

from typing import Any

import msgspec

import sample_data
from models.assess import FitStrength, LandFit, strength_work
from models.engineering.materials import own_material
from models.engineering.sizes import Interference
from models.job import (
    Item,
    Land,
    LengthLimit,
    Origin,
    Outline,
    Plan,
    ShaftStep,
    Station,
    Step,
)
from models.units import Length, Mass, Speed

__all__ = ["ORIGIN", "a_land", "a_plan", "an_item", "fit", "mm", "rpm", "strength", "with_material"]

ORIGIN = Origin(document="plan sheet, invented")


def mm(value: float) -> Length:
    return Length.from_si(value * 1e-3, "mm", 6)


def rpm(value: float) -> Speed:
    return Speed.read(f"{value:.3f} r/min")


def a_land(
    diameter: float, outer: float, *, length: float = 100.0, key: str = "1", **more: Any
) -> Land:
    """Make a land; diameters and length in mm."""
    any_limit = LengthLimit(value=mm(0.1), origin=ORIGIN)
    return Land(
        key=key,
        start=mm(400.0),
        end=mm(400.0 + length),
        nominal_diameter=mm(diameter),
        hub_outer_diameter=mm(outer),
        least_interference=any_limit,
        greatest_interference=any_limit,
        **more,
    )


def an_item(*lands: Land, widest: float | None = None, **more: Any) -> Item:
    """Make a hot item around its lands, as wide as its hub unless told otherwise."""
    outer = widest or max(land.hub_outer_diameter.si for land in lands) * 1e3
    return Item(
        key="wheel",
        name="Wheel",
        kind="hot",
        material="own",
        outline=Outline(
            kind="impeller",
            start=lands[0].start,
            end=lands[-1].end,
            bore=lands[0].nominal_diameter,
            outer=mm(outer),
        ),
        lands=lands,
        **more,
    )


def a_plan(
    *, shaft: dict[str, Any] | None = None, rotor: dict[str, Any] | None = None, **more: Any
) -> Plan:
    """Take the pump's plan with a shaft of the test's own material."""
    plan = sample_data.pump().plan
    return msgspec.structs.replace(
        plan,
        shaft=msgspec.structs.replace(
            plan.shaft, **{"material": "own", "roughness": None, **(shaft or {})}
        ),
        rotor=msgspec.structs.replace(plan.rotor, **(rotor or {})),
        **more,
    )  # fmt: skip


def with_material(
    monkeypatch: Any, *, modulus: float, poisson: float, density: float = 7850.0, **more: Any
) -> None:
    """Let both parts be of a material with the numbers that a published example uses."""
    own = own_material(
        name="own",
        source="the example's own",
        density=density,
        poisson=poisson,
        mean_expansions=[(100.0, 12e-6)],
        moduli=[(20.0, modulus)],
        **more,
    )
    monkeypatch.setattr("models.assess.materials.MATERIALS", {"own": own})


def fit(land: Land, least: float, greatest: float, unsure: float | None = None) -> LandFit:
    """Give the measured interference of a land, in m."""
    middle = (least + greatest) / 2.0
    found = Interference(middle, least, greatest, middle / land.nominal_diameter.si)
    return LandFit(land, None, None, found, unsure)


def strength(plan: Plan, item: Item, *fits: LandFit) -> FitStrength:
    found = strength_work.fit_strength(plan, item, fits)
    assert found is not None
    return found


def on_a_shaft(
    *,
    steps: list[tuple[float, float, float]],
    parts: Any = (),
    first: float = 0.0,
    second: float = 1.0,
    between: tuple[float, ...] = (),
    **rotor: Any,
) -> Plan:
    """Give a plan with a shaft of steps (start, end, diameter) and parts (position, mass), in m.

    Each part goes on in a step of its own; stations S1, S2 … lie between the journals.
    """
    plan = a_plan(rotor=rotor)
    journals = [(plan.first_journal, first), (plan.second_journal, second)]
    stations = [
        Station(key=key, name=key, position=mm(1e3 * place), kind="journal")
        for key, place in journals
    ]
    stations += [
        Station(key=f"S{number}", name=f"S{number}", position=mm(1e3 * place))
        for number, place in enumerate(between, start=1)
    ]
    items = [_part(number, *one) for number, one in enumerate(parts, start=1)]
    stack = [Step(key=f"step-{item.key}", title=item.name, items=(item,)) for item in items]
    return msgspec.structs.replace(
        plan,
        stations=tuple(stations),
        steps=tuple(stack) or (Step(key="step-none", title="Nothing", items=()),),
        shaft=msgspec.structs.replace(
            plan.shaft,
            steps=tuple(
                ShaftStep(start=mm(1e3 * start), end=mm(1e3 * end), diameter=mm(1e3 * diameter))
                for start, end, diameter in steps
            ),
        ),
    )


def _part(number: int, position: float, mass: float | None) -> Item:
    item = an_item(a_land(50.0, 80.0), mass=None if mass is None else Mass.from_si(mass, "kg", 6))
    start, end = mm(1e3 * position - 10.0), mm(1e3 * position + 10.0)
    return msgspec.structs.replace(
        item,
        key=f"part-{number}",
        name=f"Part {number}",
        outline=msgspec.structs.replace(item.outline, start=start, end=end),
        lands=tuple(msgspec.structs.replace(land, start=start, end=end) for land in item.lands),
    )
