"""One attempt at a stacking step: its entries sorted, worked out and judged."""

from models.assess.attempts.on_runout import closure_allowed, station_facts, survey_findings
from models.assess.attempts.on_sizes import fit_facts
from models.assess.attempts.view import Attempt, ItemView, finding_key
from models.assess.attempts.work import assess_attempt

__all__ = [
    "Attempt",
    "ItemView",
    "assess_attempt",
    "closure_allowed",
    "finding_key",
    "fit_facts",
    "station_facts",
    "survey_findings",
]
