"""Lay the tables of final acceptance."""

from models.record.migrations.laying import once, recorded, tie, whole, words

__all__ = ["lay"]


def lay() -> None:
    """Make the tables."""
    recorded(
        "high_speed_run",
        words("where_run"),
        words("speed_typed"),
        words("speed_unit"),
        whole("speed_mrpm"),
        words("instrument"),
        tie("high_speed_run", "key", "entry"),
    )
    recorded(
        "vibration_reading",
        words("entry_key"),
        whole("number"),
        words("place"),
        words("amplitude_typed"),
        words("amplitude_unit"),
        whole("amplitude_nm"),
        tie("vibration_reading", "entry_key", "entry"),
        once("vibration_reading", "chain_id", "entry_key", "number"),
    )
    recorded("magnetism", words("instrument"), tie("magnetism", "key", "entry"))
    recorded(
        "field_reading",
        words("entry_key"),
        whole("number"),
        words("place"),
        words("value_typed"),
        words("value_unit"),
        whole("value_nt"),
        tie("field_reading", "entry_key", "entry"),
        once("field_reading", "chain_id", "entry_key", "number"),
    )
