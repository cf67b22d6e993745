"""Which formulas make a number: every name under which a screen, a page or a file shows one."""

from collections.abc import Mapping
from types import MappingProxyType

__all__ = ["BY_RULE", "NUMBERS", "formulas_of"]

_PRESSURE = ("fits.contact_pressure", "fits.smoothing_loss", "lands.several_lands")
_AT_SPEED = ("rotation.interference_at_speed", "disc_growth.annulus_bore_growth",
             "disc_growth.shaft_surface_growth")  # fmt: skip
_BY_DESIGNER = ("rotation.growth_at_speed", "rotation.interference_at_speed")
_TORQUE = ("holding.holding_torque", "lands.several_lands", "fits.contact_pressure")
_FORCE = ("holding.holding_force", "lands.several_lands", "fits.contact_pressure")
_CARRIED = ("holding.torque_from_power", "holding.cumulated_torque")
_SPREAD = ("uncertainty.combined_uncertainty",)
_INTERFERENCE = ("sizes.interference", "sizes.diameter_at_reference", "sizes.summarise_sizes")
_KINK = ("one_kink.fit_one_kink",)
_BOW = ("bow_shape.unbalance_of_bow",)
_BY_GRADE = (
    "balance_limits.permissible_residual_of_grade",
    "balance_limits.allocate_between_bearings",
)
_MAY_REMAIN = ("balance_limits.permissible_residual",)
_CHANGE = ("mount_change.change_at_stations", "harmonics.fit_harmonics", "survey_fit.fit_survey",
           "datum.journal_datum")  # fmt: skip
_OFFSET = ("harmonics.fit_harmonics", "survey_fit.fit_survey", "datum.journal_datum")
_READ: tuple[str, ...] = ()

NUMBERS: Mapping[str, tuple[str, ...]] = MappingProxyType(
    {
        # The rotor.
        "mass": ("shaft.journal_loads",),
        "centre_of_gravity": ("shaft.journal_loads",),
        "load_at_first_journal": ("shaft.journal_loads",),
        "load_at_second_journal": ("shaft.journal_loads",),
        "span_over_diameter": ("shaft.span_over_diameter",),
        "greatest_sag": ("beam.static_deflection",),
        "first_critical_speed": ("beam.first_critical_speed",),
        "shear_at_coupling": ("shaft.shaft_shear_stress", *_CARRIED),
        "takes": ("holding.torque_from_power",),
        "in_shaft_towards_coupling": ("holding.cumulated_torque",),
        "torque": _CARRIED,
        "shear": ("shaft.shaft_shear_stress", *_CARRIED),
        "value": ("high_speed.reasons_for_high_speed_balance",),
        "threshold": ("high_speed.reasons_for_high_speed_balance",),
        "visible_change_tir": ("same_state.repeatability",),
        "vector_uncertainty": ("same_state.repeatability",),
        # The record: as typed in the plan, or told by the clock.
        "resolution": _READ,
        "least_limit": _READ,
        "hours_between": _READ,
        "hours_allowed": _READ,
        # Sizes and fit at rest.
        "least_diameter": ("sizes.summarise_sizes", "sizes.diameter_at_reference"),
        "greatest_diameter": ("sizes.summarise_sizes", "sizes.diameter_at_reference"),
        "least_interference": _INTERFERENCE,
        "mean_interference": _INTERFERENCE,
        "greatest_interference": _INTERFERENCE,
        "expanded_uncertainty": (
            "size_uncertainty.interference_uncertainty",
            "size_uncertainty.size_uncertainty",
            *_SPREAD,
        ),
        "lost_by_smoothing": ("fits.smoothing_loss", "roughness.peak_to_valley"),
        "least_pressure": _PRESSURE,
        "greatest_pressure": _PRESSURE,
        "pressure_uncertainty": (*_SPREAD, "fits.contact_pressure"),
        "hoop_stress_at_bore": ("fit_stress.hub_stresses",),
        "equivalent_stress_at_bore": ("fit_stress.hub_stresses", "fit_stress.surface_stress"),
        "equivalent_stress_tresca_at_bore": (
            "fit_stress.hub_stresses",
            "fit_stress.surface_stress",
        ),
        "equivalent_stress_in_shaft": ("fit_stress.shaft_stresses", "fit_stress.surface_stress"),
        "hub_stress": ("fit_stress.hub_stresses", "fit_stress.surface_stress"),
        "hub_stress_uncertainty": (*_SPREAD, "fit_stress.hub_stresses"),
        "shaft_stress": ("fit_stress.shaft_stresses", "fit_stress.surface_stress"),
        "shaft_stress_uncertainty": (*_SPREAD, "fit_stress.shaft_stresses"),
        "margin_of_hub": ("fit_stress.yield_margin",),
        "margin_of_shaft": ("fit_stress.yield_margin",),
        "pressure_at_yield_of_hub": ("yield_onset.hub_pressure_at_yield",),
        "pressure_at_yield_of_shaft": ("yield_onset.shaft_pressure_at_yield",),
        # At speed.
        "interference_as_whole_disc": _AT_SPEED,
        "interference_as_hub_alone": _AT_SPEED,
        "interference_by_designer": _BY_DESIGNER,
        "interference_at_trip": _BY_DESIGNER,
        "interference_uncertainty": (
            "size_uncertainty.interference_uncertainty",
            *_SPREAD,
        ),
        "pressure_as_whole_disc": ("rotation.pressure_at_speed", *_AT_SPEED),
        "pressure_as_hub_alone": ("rotation.pressure_at_speed", *_AT_SPEED),
        "pressure_by_designer": ("rotation.pressure_at_speed", "rotation.growth_at_speed"),
        "added_by_running_temperatures": ("fits.fit_at_temperature",),
        "equivalent_stress_at_bore_as_uniform_disc": (
            "stress_at_speed.hub_bore_stress_at_speed",
            "disc_growth.annulus_bore_stress",
        ),
        "release_speed_as_whole_disc": ("rotation.release_speed",),
        "release_speed_as_hub_alone": ("rotation.release_speed",),
        "release_speed_by_designer": ("rotation.release_speed_from_growth",),
        "release_speed": ("rotation.release_speed_from_growth",),
        "release_speed_over_trip": ("rotation.release_speed_from_growth",),
        # Holding.
        "holding_torque": _TORQUE,
        "holding_torque_uncertainty": (*_SPREAD, "holding.holding_torque"),
        "holding_uncertainty": (*_SPREAD, "holding.holding_torque"),
        "holding_torque_at_continuous_speed": (*_TORQUE, "rotation.pressure_at_speed"),
        "holding_torque_at_speed": (*_TORQUE, "rotation.pressure_at_speed"),
        "speed_uncertainty": (*_SPREAD, "rotation.pressure_at_speed"),
        "holding_force": _FORCE,
        "holding_force_uncertainty": (*_SPREAD, "holding.holding_force"),
        "force_uncertainty": (*_SPREAD, "holding.holding_force"),
        "holding_force_at_continuous_speed": (*_FORCE, "rotation.pressure_at_speed"),
        "holding_force_at_speed": (*_FORCE, "rotation.pressure_at_speed"),
        "force_speed_uncertainty": (*_SPREAD, "rotation.pressure_at_speed"),
        "torque_to_carry": _CARRIED,
        "thrust_and_torque_as_one_force": ("holding_both.force_demanded",),
        "force_demanded": ("holding_both.force_demanded",),
        "force_demanded_at_speed": ("holding_both.force_demanded",),
        "holding_factor": ("holding.combined_holding_factor", "holding.holding_torque"),
        # A hub on its taper.
        "advance_by_limits_least": ("taper_fits.advance_for_interference",),
        "advance_by_limits_greatest": ("taper_fits.advance_for_interference",),
        "advance_least": ("taper_fits.interference_from_advance",),
        "advance_greatest": ("taper_fits.interference_from_advance",),
        "advance_spread": ("taper_fits.interference_from_advance",),
        "advance_expanded_uncertainty": _SPREAD,
        "advance_uncertainty": _SPREAD,
        "dilation_pressure_expected": ("taper_fits.dilation_pressure", "fits.contact_pressure"),
        "pressure_at_yield_of_bore": ("fit_stress.hub_stresses", "fit_stress.yield_margin"),
        "pressure_at_yield": ("fit_stress.hub_stresses", "fit_stress.yield_margin"),
        "push_off_force_on_oil": ("taper_fits.axial_release_force",),
        "seating_loss": ("taper_fits.seating_loss", "hub_growth.pressure_from_outer_growth"),
        # Heat.
        "target_temperature": ("heating.target_temperature", "materials.mean_expansion"),
        "target_uncertainty": (
            "heating.target_temperature",
            "size_uncertainty.interference_uncertainty",
        ),
        "target_without_margin": ("heating.target_temperature", "materials.mean_expansion"),
        "mean_temperature": ("expansion.area_weighted_mean_temperature",),
        "highest_temperature": ("heat_limits.highest_temperature",),
        "bow_per_kelvin": ("soak.thermal_bow",),
        "time_constant": ("lumped_body.time_constant",),
        "difference": _CHANGE,
        "still_to_come": ("soak.remainder_to_cold",),
        # Runout.
        "change_tir": _CHANGE,
        "clock_angle": (*_CHANGE, "balance.clock_angle"),
        "plain_change": ("mount_change.change_at_stations",),
        "least_change": ("mount_change.change_bounds",),
        "greatest_change": ("mount_change.change_bounds",),
        "tir": _OFFSET,
        "closure": ("indicator.closure_error",),
        "kink_position": _KINK,
        "kink_position_uncertainty": _KINK,
        "kink_angle": (*_KINK, "bow_shape.kink_shape"),
        "kink_clock_angle": _KINK,
        "share_explained": _KINK,
        "distance": ("nearest_seat.nearest_seat",),
        "two_bends_at": ("two_kinks.fit_two_kinks",),
        "at_first_journal": _BOW,
        "at_second_journal": _BOW,
        "expanded_uncertainty_at_first_journal": (*_BOW, *_SPREAD),
        "expanded_uncertainty_at_second_journal": (*_BOW, *_SPREAD),
        "may_remain_at_first_journal": _MAY_REMAIN,
        "may_remain_at_second_journal": _MAY_REMAIN,
        "over_what_may_remain": (*_BOW, *_MAY_REMAIN),
        "greatest_drift_tir": ("mount_change.drift",),
        # The stand, and a part mounted half a turn apart.
        "visible_change": ("same_state.repeatability",),
        "turns_with_the_part_tir": ("same_state.index_test",),
        "stays_with_the_seat_tir": ("same_state.index_test",),
        # The finished rotor.
        "vibration_limit": (
            "acceptance.compressor_vibration_limit",
            "acceptance.steam_turbine_vibration_limit",
        ),
        "track_runout": (*_OFFSET,),
        "track_limit": ("acceptance.compressor_probe_runout_limit",),
        # Balance.
        "permissible": (*_MAY_REMAIN, *_BY_GRADE),
        "may_remain": (*_MAY_REMAIN, *_BY_GRADE),
        "brought_by_the_step": ("balance.stage_contribution",),
        "mass_at_radius": ("balance.mass_to_add",),
        "smaller": ("residual.residual_from_amplitudes", "residual.root_by_plain_reading"),
        "larger": ("residual.residual_from_amplitudes", "residual.root_by_plain_reading"),
        # Read, or set by the plan: no formula stands behind these.
        "residual": _READ,
        "finest_limit": _READ,
        "vibration": _READ,
        "run_speed": _READ,
        "highest_speed": _READ,
        "flux_density": _READ,
        "flux_limit": _READ,
        "left": _READ,
        "speed": _READ,
        "taper": _READ,
        "least_advance": _READ,
        "greatest_advance": _READ,
        "least_advance_allowed": _READ,
        "greatest_advance_allowed": _READ,
        "dilation_pressure": _READ,
        "dilation_allowed": _READ,
        "hold": _READ,
        "interval": _READ,
        "agreement": _READ,
        "hold_wanted": _READ,
        "thrust": _READ,
        "thrust_to_carry": _READ,
        "friction": _READ,
        "yield_strength_of_hub": _READ,
        "yield_strength_of_shaft": _READ,
        "hub_yield_strength": _READ,
        "shaft_yield_strength": _READ,
        "nominal_diameter": _READ,
        "diameter": _READ,
        "part_temperature": _READ,
        "gauge_temperature": _READ,
        "least_allowed": _READ,
        "greatest_allowed": _READ,
        "shear_limit": _READ,
        "hottest_part": _READ,
        "coldest_bore": _READ,
        "spread": _READ,
        "axial_position": _READ,
        "axial_target": _READ,
        "axial_tolerance": _READ,
        "side_to_side": _READ,
        "above_surroundings": _READ,
        "side_to_side_allowed": _READ,
        "above_surroundings_allowed": _READ,
        "closure_allowed": _READ,
        "limit": _READ,
    }
)
"""Formulas behind each number, the last step first; none for what is read or set by the plan."""

BY_RULE: Mapping[tuple[str, str], tuple[str, ...]] = MappingProxyType(
    {
        ("expanded_uncertainty", "runout-changed"): (
            "mount_change.change_at_stations",
            "datum.datum_uncertainty",
        ),
        ("expanded_uncertainty", "runout-drifted"): (
            "mount_change.drift",
            "datum.datum_uncertainty",
        ),
        ("expanded_uncertainty", "seat-came-back"): (
            "mount_change.change_at_stations",
            "datum.datum_uncertainty",
        ),
        ("expanded_uncertainty", "final-runout"): ("datum.datum_uncertainty",),
        ("change_tir", "runout-drifted"): ("mount_change.drift", *_OFFSET),
        ("clock_angle", "runout-drifted"): ("mount_change.drift", "balance.clock_angle"),
    }
)
"""What stands behind a number of which the name alone does not tell which one is meant."""


def formulas_of(number: str, *, rule: str = "") -> tuple[str, ...]:
    """Name the formulas behind a number.

    Parameters
    ----------
    number : str
        Its name without a unit.
    rule : str
        The rule that takes it, where its name has several meanings.

    Returns
    -------
    tuple of str
        Names of entries; none for what is read, planned or unknown here.
    """
    return BY_RULE.get((number, rule), NUMBERS.get(number, ()))
