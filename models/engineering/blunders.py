"""Patterns that reveal mistakes, gathered under one name.

Slips of one figure live in `slips`, mistakes within one turn in `reading_blunders`, and those that
show beside an earlier survey in `survey_blunders`. None of them judges: each returns a suspicion
that a person answers, or None.
"""

from models.engineering.reading_blunders import copied_survey, unclosed_circle, wild_reading
from models.engineering.slips import (
    decimal_slip,
    swapped_bore_and_seat,
    taken_hot,
    twice_or_half,
    unit_slip,
)
from models.engineering.survey_blunders import (
    flipped_sign,
    likeliest_mistake,
    mirrored_angles,
    skipped_mark,
    slipped_survey,
    swapped_stations,
    turned_mark,
)
from models.engineering.suspicion import Mistake, Suspicion
from models.engineering.two_surveys import TwoSurveys

__all__ = [
    "Mistake",
    "Suspicion",
    "TwoSurveys",
    "copied_survey",
    "decimal_slip",
    "flipped_sign",
    "likeliest_mistake",
    "mirrored_angles",
    "skipped_mark",
    "slipped_survey",
    "swapped_bore_and_seat",
    "swapped_stations",
    "taken_hot",
    "turned_mark",
    "twice_or_half",
    "unclosed_circle",
    "unit_slip",
    "wild_reading",
]
