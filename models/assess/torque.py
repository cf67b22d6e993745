"""The torque that each part carries, and what the shaft carries from the free end to the coupling.

Every part takes its share of the rotor's torque from the shaft; all of it passes the coupling hub.
"""

from dataclasses import dataclass

from models.engineering.holding import cumulated_torque, torque_from_power
from models.engineering.shaft import shaft_shear_stress
from models.job import Item, Land, Plan

__all__ = [
    "PartTorque",
    "SeatShear",
    "carries_torque",
    "coupling_hub",
    "rotor_torque",
    "seat_shears",
    "torque_to_carry",
    "torques_along",
]


@dataclass(frozen=True)
class PartTorque:
    """One part on the way from the free end to the coupling."""

    item: Item
    own: float
    """What it takes from the shaft; 0 where the plan gives it no share [N·m]."""
    in_shaft: float
    """What the shaft carries on the coupling's side of it [N·m]."""


@dataclass(frozen=True)
class SeatShear:
    """The shear in the shaft under one land."""

    item: Item
    land: Land
    torque: float
    """Torque in the shaft there [N·m]."""
    shear: float
    """Greatest shear stress [Pa]."""


def rotor_torque(plan: Plan) -> float | None:
    """Give the rotor's whole torque at maximum continuous speed, in N·m; None if unknown."""
    power, speed = plan.rotor.power, plan.rotor.maximum_continuous_speed
    if power is None or speed is None or speed.si <= 0.0:
        return None
    return torque_from_power(power=power.si, speed=speed.si)


def coupling_hub(plan: Plan) -> Item | None:
    """Find the part that all torque passes; None without exactly one coupling hub."""
    hubs = [item for item in _items(plan) if item.outline.kind == "hub"]
    return hubs[0] if len(hubs) == 1 else None


def torque_to_carry(plan: Plan, item: Item) -> float | None:
    """Tell the torque that a part must carry: its share, and all of it at the coupling, in N·m."""
    whole, share = rotor_torque(plan), item.carried_torque_share
    if whole is None:
        return None
    if share is not None:
        return share.si * whole
    hub = coupling_hub(plan)
    return whole if hub is not None and hub.key == item.key else None


def carries_torque(plan: Plan, item: Item) -> bool:
    """Say whether the plan gives a part torque to carry: a share, or as the coupling hub."""
    if item.carried_torque_share is not None:
        return True
    hub = coupling_hub(plan)
    return hub is not None and hub.key == item.key and rotor_torque(plan) is not None


def torques_along(plan: Plan) -> tuple[PartTorque, ...]:
    """Add the torques from the free end to the coupling; empty without power, speed or coupling."""
    whole, hub = rotor_torque(plan), coupling_hub(plan)
    if whole is None or hub is None:
        return ()
    items = sorted(_items(plan), key=_middle)
    journals = [plan.station(key).position.si for key in (plan.first_journal, plan.second_journal)]
    if _middle(hub) < sum(journals) / 2.0:
        items.reverse()
    own = [
        item.carried_torque_share.si * whole if item.carried_torque_share and item != hub else 0.0
        for item in items
    ]
    carried = cumulated_torque(torques=own)
    return tuple(
        # All of the rotor's torque passes the coupling, also what no share accounts for.
        PartTorque(item, mine, whole if item == hub else in_shaft)
        for item, mine, in_shaft in zip(items, own, carried, strict=True)
    )


def seat_shears(plan: Plan) -> tuple[SeatShear, ...]:
    """Work out the shear in the shaft under every land, with the torque on its coupling side."""
    bore = plan.shaft.bore.si if plan.shaft.bore else 0.0
    return tuple(
        SeatShear(
            item=part.item,
            land=land,
            torque=part.in_shaft,
            shear=shaft_shear_stress(
                torque=part.in_shaft,
                outer_diameter=land.nominal_diameter.si,
                inner_diameter=bore,
            ),
        )
        for part in torques_along(plan)
        for land in part.item.lands
        if land.nominal_diameter.si > bore
    )


def _items(plan: Plan) -> list[Item]:
    return [item for step in plan.steps for item in step.items]


def _middle(item: Item) -> float:
    return (item.outline.start.si + item.outline.end.si) / 2.0
