"""What a plan asks of balance: correction planes, limit, and when it is due."""

from typing import Literal

from models.job.base import Frozen
from models.job.origin import Origin
from models.units import Length

__all__ = ["BalancePlan", "CorrectionPlane"]


class CorrectionPlane(Frozen, frozen=True, kw_only=True):
    """A plane in which unbalance is read and corrected; the first lies nearer the first journal."""

    key: str
    name: str
    position: Length
    radius: Length


class BalancePlan(Frozen, frozen=True, kw_only=True):
    """What the plan asks of balance: planes, limit, and after which steps it is due.

    The limit is 4 W/N with the load of each journal and the maximum continuous speed (ounce-inches,
    pounds, r/min; the metric form has the same meaning), or a grade of ISO 21940-11 in mm/s shared
    between the planes from the centre of gravity.
    """

    first_plane: CorrectionPlane
    second_plane: CorrectionPlane
    limit: Literal["4 W/N", "grade"]
    grade: float | None = None
    origin: Origin
    after_steps: tuple[str, ...] = ()

    def plane(self, key: str) -> CorrectionPlane | None:
        """Find a plane by its key."""
        planes = (self.first_plane, self.second_plane)
        return next((one for one in planes if one.key == key), None)
