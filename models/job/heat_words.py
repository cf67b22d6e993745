"""What a plan says of a part's heat beyond its highest temperature."""

from typing import Literal

from models.job.base import Frozen
from models.job.origin import Origin
from models.units import Temperature

__all__ = ["Chilling", "Surface"]

Surface = Literal["bare", "coated", "hard-faced", "brazed", "plated"]


class Chilling(Frozen, frozen=True, kw_only=True):
    """A released procedure for chilling the bare shaft, and how cold it may go."""

    lowest: Temperature
    procedure: Origin
