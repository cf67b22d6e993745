"""What a job's calculations give, as plain numbers: each name carries its SI unit in brackets."""

import math
from typing import Any

from app.worked_out_taper import drawn_up_out
from models.assess import (
    Assessment,
    Attempt,
    BalanceView,
    Bend,
    BowUnbalance,
    FitStrength,
    ItemView,
    KinkSeat,
    LandStrength,
    ShaftView,
    lacks,
)
from models.assess.swept import swept_views

__all__ = ["worked_out"]

# More digits than anything here is known to, few enough to read.
_DIGITS = 6


def worked_out(view: Assessment) -> dict[str, Any]:
    """Give what was worked out of the rotor, its stand and each attempt's items; lengths in m."""
    stand = view.stand
    return {
        "rotor": _rotor(view.shaft),
        "for a balance at speed": [
            {
                "reason": one.statement,
                "value [-]": _number(one.value),
                "threshold [-]": one.threshold,
                "speaks": one.speaks,
                "source": one.source,
            }
            for one in view.reasons_for_speed
        ],
        "stand": None
        if stand is None
        else {
            "visible_change_tir [m]": _number(stand.found.visible_change_tir),
            "vector_uncertainty [m]": _number(stand.found.vector_uncertainty),
            "in words": stand.sentence,
        },
        "index_tests": [
            {
                "step": one.step,
                "station": one.station,
                "turns_with_the_part_tir [m]": _number(2.0 * abs(one.shares.part)),
                "stays_with_the_seat_tir [m]": _number(2.0 * abs(one.shares.seat)),
                "in words": one.sentence,
            }
            for one in view.index_tests
        ],
        "swept_totals": [
            {
                "survey": one.survey,
                "station": one.station,
                "swept_tir [m]": _number(one.swept),
                "at_marks_tir [m]": _number(one.at_marks),
                "reach_of_marks_tir [m]": _number(one.reach),
                "outcome": one.outcome,
                "in words": one.sentence,
            }
            for one in swept_views(view.job, view.surveys.values())
        ],
        "attempts": [_attempt(one) for one in view.attempts],
        "lacks": list(lacks(view.job)),
    }


def _number(value: float | None) -> float | None:
    """Round for reading; what has no number (no such speed, no such margin) is left empty."""
    if value is None or not math.isfinite(value):
        return None
    return float(f"{value:.{_DIGITS}g}")


def _rotor(shaft: ShaftView) -> dict[str, Any]:
    loads, sag = shaft.loads, shaft.deflection
    return {
        "mass [kg]": _number(loads.mass if loads else None),
        "centre_of_gravity [m]": _number(loads.centre_of_gravity if loads else None),
        "load_at_first_journal [N]": _number(shaft.load_at_first_journal),
        "load_at_second_journal [N]": _number(shaft.load_at_second_journal),
        "span_over_diameter [-]": _number(shaft.span_over_diameter),
        "greatest_sag [m]": _number(sag.greatest if sag else None),
        "first_critical_speed [rad/s]": _number(shaft.critical.speed if shaft.critical else None),
        "shear_at_coupling [Pa]": _number(shaft.shear_at_coupling),
        "torque_along_the_shaft": [
            {
                "item": one.item.key,
                "takes [N·m]": _number(one.own),
                "in_shaft_towards_coupling [N·m]": _number(one.in_shaft),
            }
            for one in shaft.torques
        ],
        "shear_at_seats": [
            {
                "item": one.item.key,
                "land": one.land.key,
                "torque [N·m]": _number(one.torque),
                "shear [Pa]": _number(one.shear),
            }
            for one in shaft.shears
        ],
        "masses_calculated": list(shaft.calculated),
        "masses_unknown": list(shaft.without_mass),
        "in words": list(shaft.sentences),
    }


def _attempt(attempt: Attempt) -> dict[str, Any]:
    return {
        "step": attempt.step.key,
        "attempt": attempt.number,
        "items": [_item(view) for view in attempt.items],
        "balance": _balance(attempt.balance),
        "bend": _bend(attempt.bend) if attempt.judged is not None else None,
    }


def _item(view: ItemView) -> dict[str, Any]:
    heat, strength = view.heat, view.strength
    found: dict[str, Any] = {"item": view.item.key}
    if heat is not None:
        found["target_temperature [°C]"] = _number(heat.target)
        found["target_uncertainty [K]"] = _number(heat.target_uncertainty)
        found["target_without_margin [°C]"] = _number(heat.plain_target)
        found["highest_temperature [°C]"] = _number(heat.highest)
        found["highest_temperature_source"] = heat.highest_origin
        found["mean_temperature [°C]"] = _number(heat.mean_temperature)
    if view.drawn_up is not None:
        found["draw_up"] = drawn_up_out(view.drawn_up)
    found["lands"] = [
        {
            "land": fit.land.key,
            "least_interference [m]": _number(fit.interference.least if fit.interference else None),
            "mean_interference [m]": _number(fit.interference.mean if fit.interference else None),
            "greatest_interference [m]": _number(
                fit.interference.greatest if fit.interference else None
            ),
            "expanded_uncertainty [m]": _number(fit.expanded_uncertainty),
            **_land(strength, fit.land.key),
        }
        for fit in view.fits
    ]
    return found | (_holding(strength) if strength is not None else {})


def _land(strength: FitStrength | None, key: str) -> dict[str, Any]:
    lands: tuple[LandStrength, ...] = strength.lands if strength is not None else ()
    land = next((one for one in lands if one.key == key), None)
    if land is None:
        return {}
    return {
        "lost_by_smoothing [m]": _number(land.smoothing_loss),
        "least_pressure [Pa]": _number(land.least_pressure),
        "greatest_pressure [Pa]": _number(land.greatest_pressure),
        "hoop_stress_at_bore [Pa]": _number(land.hub.bore.hoop),
        "equivalent_stress_at_bore [Pa]": _number(land.hub_stress),
        "equivalent_stress_tresca_at_bore [Pa]": _number(land.hub.bore.tresca),
        "equivalent_stress_in_shaft [Pa]": _number(land.shaft_stress),
        "margin_of_hub [-]": _number(land.hub_margin),
        "margin_of_shaft [-]": _number(land.shaft_margin),
        "pressure_uncertainty [Pa]": _number(land.pressure_uncertainty),
        "pressure_at_yield_of_hub [Pa]": _number(land.hub_pressure_at_yield),
        "pressure_at_yield_of_shaft [Pa]": _number(land.shaft_pressure_at_yield),
        "at_speed": [
            {
                "at": one.name,
                "speed [rad/s]": _number(one.speed),
                "interference_as_whole_disc [m]": _number(one.as_whole_disc),
                "interference_as_hub_alone [m]": _number(one.as_hub_alone),
                "interference_by_designer [m]": _number(one.by_designer),
                "pressure_as_whole_disc [Pa]": _number(one.least_pressure),
                "pressure_as_hub_alone [Pa]": _number(one.greatest_pressure),
                "pressure_by_designer [Pa]": _number(one.pressure_by_designer),
                "added_by_running_temperatures [m]": _number(one.warmth),
                "expanded_uncertainty [m]": _number(one.uncertainty),
                "equivalent_stress_at_bore_as_uniform_disc [Pa]": _number(one.hub_stress),
                "equivalent_stress_in_shaft [Pa]": _number(one.shaft.von_mises),
            }
            for one in land.at_speed
        ],
        "release_speed_as_whole_disc [rad/s]": _number(land.release.as_whole_disc),
        "release_speed_as_hub_alone [rad/s]": _number(land.release.as_hub_alone),
        "release_speed_by_designer [rad/s]": _number(land.release.by_designer),
    }


def _holding(strength: FitStrength) -> dict[str, Any]:
    held = strength.holding
    return {
        "holding_torque [N·m]": _number(held.torque),
        "holding_torque_uncertainty [N·m]": _number(held.torque_uncertainty),
        "holding_force [N]": _number(held.force),
        "holding_force_uncertainty [N]": _number(held.force_uncertainty),
        "holding_torque_at_continuous_speed [N·m]": _number(held.torque_at_continuous),
        "holding_force_at_continuous_speed [N]": _number(held.force_at_continuous),
        "torque_to_carry [N·m]": _number(held.torque_to_carry),
        "thrust_to_carry [N]": _number(held.thrust),
        "thrust_and_torque_as_one_force [N]": _number(held.demanded),
        "holding_factor [-]": _number(strength.holding_factor),
        "friction [-]": held.friction,
        "friction_source": held.friction_source,
        "smoothing": strength.smoothing_source,
        "yield_strength_of_hub [Pa]": strength.hub_yield.value if strength.hub_yield else None,
        "yield_strength_of_hub_source": strength.hub_yield.origin if strength.hub_yield else None,
        "yield_strength_of_shaft [Pa]": (
            strength.shaft_yield.value if strength.shaft_yield else None
        ),
        "yield_strength_of_shaft_source": (
            strength.shaft_yield.origin if strength.shaft_yield else None
        ),
        "release_speed_over_trip [-]": _number(strength.release_over_trip),
        "in words": strength.means,
    }


def _balance(view: BalanceView | None) -> list[dict[str, Any]]:
    if view is None or not view.runs:
        return []
    return [
        {
            "plane": one.plane.key,
            "left [kg·m]": _number(None if one.residual is None else abs(one.residual)),
            "brought_by_the_step [kg·m]": _number(
                None if one.brought is None else abs(one.brought)
            ),
            "may_remain [kg·m]": _number(one.permissible),
            "mass_at_radius [kg]": _number(one.mass_at_radius),
        }
        for one in view.planes
    ]


def _bend(bend: Bend) -> dict[str, Any]:
    kink, drift = bend.kink, bend.drift
    return {
        "kink_position [m]": _number(kink.position if kink else None),
        "kink_position_uncertainty [m]": _number(kink.position_uncertainty if kink else None),
        "kink_angle [rad]": _number(kink.bend_angle if kink else None),
        "kink_clock_angle [rad]": _number(kink.clock_angle if kink else None),
        "share_explained [-]": _number(kink.share_explained if kink else None),
        "seat": _seat(bend.seat),
        "two_bends_at [m]": [_number(place) for place in bend.two.positions]
        if bend.two is not None and bend.two.accepted
        else [],
        "unbalance_of_change": _unbalance(bend.by_mount),
        "unbalance_of_rotor": _unbalance(bend.of_rotor),
        "greatest_drift_tir [m]": _number(drift.tir if drift else None),
        "greatest_drift_at": drift.station if drift else None,
        "in words": list(bend.sentences),
    }


def _seat(seat: KinkSeat | None) -> dict[str, Any] | None:
    if seat is None:
        return None
    return {
        "item": seat.item,
        "distance [m]": _number(seat.distance),
        "just_mounted": seat.is_just_mounted,
        "proven": seat.proven,
        "blind": seat.blind,
    }


def _unbalance(made: BowUnbalance | None) -> dict[str, Any] | None:
    if made is None:
        return None
    return {
        "at_first_journal [kg·m]": _number(abs(made.first)),
        "at_second_journal [kg·m]": _number(abs(made.second)),
        "expanded_uncertainty_at_first_journal [kg·m]": _number(made.uncertainty_first),
        "expanded_uncertainty_at_second_journal [kg·m]": _number(made.uncertainty_second),
        "may_remain_at_first_journal [kg·m]": _number(made.permissible_first),
        "may_remain_at_second_journal [kg·m]": _number(made.permissible_second),
        "over_what_may_remain [-]": _number(made.ratio),
    }
