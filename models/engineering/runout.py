"""All that is computed from indicator readings, gathered under one name.

The parts live in modules of their own: the readings of one turn (`harmonics`), the journal axis
(`datum`) and what moved between two surveys (`mount_change`).
"""

from models.engineering.datum import datum_uncertainty, journal_datum, line_through_journals
from models.engineering.harmonics import (
    HarmonicFit,
    SurveyFit,
    fit_harmonics,
    fit_survey,
    largest_sampling_loss,
)
from models.engineering.mount_change import (
    ChangeBounds,
    ChangeOfMount,
    change_at_stations,
    change_bounds,
    drift,
    vector_change,
)

__all__ = [
    "ChangeBounds",
    "ChangeOfMount",
    "HarmonicFit",
    "SurveyFit",
    "change_at_stations",
    "change_bounds",
    "datum_uncertainty",
    "drift",
    "fit_harmonics",
    "fit_survey",
    "journal_datum",
    "largest_sampling_loss",
    "line_through_journals",
    "vector_change",
]
