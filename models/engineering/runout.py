"""All that is computed from indicator readings, gathered under one name.

The parts live in modules of their own: the readings of one turn (`harmonics`) and
of a whole survey (`survey_fit`), the journal axis
(`datum`), what moved between two surveys (`mount_change`), two surveys that should agree
(`same_state`), the indicator itself (`indicator`) and the shape of a bow (`bow_shape`).
"""

from models.engineering.bow_shape import side_to_side_bow, unbalance_of_bow
from models.engineering.datum import datum_uncertainty, journal_datum, line_through_journals
from models.engineering.harmonics import (
    HarmonicFit,
    fit_harmonics,
    largest_sampling_loss,
)
from models.engineering.indicator import (
    closure_error,
    face_free_of_float,
    face_perpendicularity,
    indexing_error,
    lever_corrected,
    vee_block_factor,
)
from models.engineering.mount_change import (
    ChangeBounds,
    ChangeOfMount,
    change_at_stations,
    change_bounds,
    drift,
    vector_change,
)
from models.engineering.same_state import (
    Agreement,
    CommonTurn,
    IndexTest,
    Repeatability,
    cold_agreement,
    common_turn,
    index_test,
    repeatability,
    still_to_come,
)
from models.engineering.survey_fit import SurveyFit, fit_survey

__all__ = [
    "Agreement",
    "ChangeBounds",
    "ChangeOfMount",
    "CommonTurn",
    "HarmonicFit",
    "IndexTest",
    "Repeatability",
    "SurveyFit",
    "change_at_stations",
    "change_bounds",
    "closure_error",
    "cold_agreement",
    "common_turn",
    "datum_uncertainty",
    "drift",
    "face_free_of_float",
    "face_perpendicularity",
    "fit_harmonics",
    "fit_survey",
    "index_test",
    "indexing_error",
    "journal_datum",
    "largest_sampling_loss",
    "lever_corrected",
    "line_through_journals",
    "repeatability",
    "side_to_side_bow",
    "still_to_come",
    "unbalance_of_bow",
    "vector_change",
    "vee_block_factor",
]
