"""Where jobs and rules meet: one frozen Job, from the record or a file, to facts to findings."""

from models.assess.attempts import Attempt, ItemView, finding_key
from models.assess.balance import BalanceView, PlaneLeft
from models.assess.bend import Bend, KinkSeat
from models.assess.bow_unbalance import BowUnbalance
from models.assess.build import Assessment, Standing, assess, live_entries
from models.assess.draw_up import DrawnUp
from models.assess.heat import Heat, land_gauge
from models.assess.index import IndexView
from models.assess.lacks import lacks
from models.assess.runout import StationChange, StationRunout, SurveyRunout
from models.assess.shaft import ShaftView
from models.assess.sizes import LandFit, Sizes
from models.assess.stand import StandRepeatability
from models.assess.strength import FitStrength, LandStrength

__all__ = [
    "Assessment",
    "Attempt",
    "BalanceView",
    "Bend",
    "BowUnbalance",
    "DrawnUp",
    "FitStrength",
    "Heat",
    "IndexView",
    "ItemView",
    "KinkSeat",
    "LandFit",
    "LandStrength",
    "PlaneLeft",
    "ShaftView",
    "Sizes",
    "StandRepeatability",
    "Standing",
    "StationChange",
    "StationRunout",
    "SurveyRunout",
    "assess",
    "finding_key",
    "lacks",
    "land_gauge",
    "live_entries",
]
