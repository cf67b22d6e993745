"""Lay the tables of balance."""

from models.record.migrations.laying import once, recorded, tie, whole, words

__all__ = ["lay"]


def lay() -> None:
    """Make the tables."""
    recorded(
        "balance_run",
        words("purpose"),
        words("speed_typed"),
        words("speed_unit"),
        whole("speed_mrpm"),
        words("instrument"),
        tie("balance_run", "key", "entry"),
    )
    recorded(
        "balance_reading",
        words("entry_key"),
        whole("number"),
        words("plane"),
        words("amount_typed"),
        words("amount_unit"),
        whole("amount_ugm"),
        words("angle_typed"),
        words("angle_unit"),
        whole("angle_mdeg"),
        tie("balance_reading", "entry_key", "entry"),
        once("balance_reading", "chain_id", "entry_key", "number"),
    )
    recorded(
        "balance_correction",
        words("plane"),
        words("angle_typed"),
        words("angle_unit"),
        whole("angle_mdeg"),
        words("amount_typed"),
        words("amount_unit"),
        whole("amount_ugm"),
        words("how"),
        words("item", absent=True),
        words("allowed_by_person", absent=True),
        tie("balance_correction", "key", "entry"),
    )
    recorded(
        "trial_round",
        words("plane"),
        words("trial_typed"),
        words("trial_unit"),
        whole("trial_ugm"),
        words("instrument"),
        words("plain", absent=True),
        tie("trial_round", "key", "entry"),
    )
    recorded(
        "trial_reading",
        words("entry_key"),
        whole("number"),
        words("angle_typed"),
        words("angle_unit"),
        whole("angle_mdeg"),
        words("reading"),
        tie("trial_reading", "entry_key", "entry"),
        once("trial_reading", "chain_id", "entry_key", "number"),
    )
    recorded(
        "journals_weighed",
        words("first_typed"),
        words("first_unit"),
        whole("first_mg"),
        words("second_typed"),
        words("second_unit"),
        whole("second_mg"),
        words("instrument"),
        tie("journals_weighed", "key", "entry"),
    )
