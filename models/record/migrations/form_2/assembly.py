"""Lay the tables of a hub drawn up and of a station watched while the rotor cools."""

from models.record.migrations.laying import once, quantity, recorded, tie, whole, words

__all__ = ["lay"]


def lay() -> None:
    """Make the tables."""
    recorded(
        "draw_up",
        words("item"),
        words("contact_typed", absent=True),
        words("contact_unit", absent=True),
        whole("contact_ppm", absent=True),
        words("contact_note"),
        words("dilation_pressure_typed", absent=True),
        words("dilation_pressure_unit", absent=True),
        whole("dilation_pressure_pa", absent=True),
        words("axial_pressure_typed", absent=True),
        words("axial_pressure_unit", absent=True),
        whole("axial_pressure_pa", absent=True),
        words("hold_typed", absent=True),
        words("hold_unit", absent=True),
        whole("hold_ms", absent=True),
        words("hub_growth_typed", absent=True),
        words("hub_growth_unit", absent=True),
        whole("hub_growth_nm", absent=True),
        words("nut_torque_typed", absent=True),
        words("nut_torque_unit", absent=True),
        whole("nut_torque_mnm", absent=True),
        words("instrument", absent=True),
        quantity("draw_up", "contact", "ppm"),
        quantity("draw_up", "dilation_pressure", "pa"),
        quantity("draw_up", "axial_pressure", "pa"),
        quantity("draw_up", "hold", "ms"),
        quantity("draw_up", "hub_growth", "nm"),
        quantity("draw_up", "nut_torque", "mnm"),
        tie("draw_up", "key", "entry"),
    )
    recorded(
        "draw_up_advance",
        words("entry_key"),
        whole("number"),
        words("angle_typed"),
        words("angle_unit"),
        whole("angle_mdeg"),
        words("zero_typed"),
        words("zero_unit"),
        whole("zero_nm"),
        words("drawn_up_typed"),
        words("drawn_up_unit"),
        whole("drawn_up_nm"),
        tie("draw_up_advance", "entry_key", "entry"),
        once("draw_up_advance", "chain_id", "entry_key", "number"),
    )
    recorded(
        "station_watched",
        words("station"),
        words("value_typed"),
        words("value_unit"),
        whole("value_nm"),
        words("angle_typed", absent=True),
        words("angle_unit", absent=True),
        whole("angle_mdeg", absent=True),
        words("instrument", absent=True),
        quantity("station_watched", "angle", "mdeg"),
        tie("station_watched", "key", "entry"),
    )
