"""Where a mount has bent the shaft, gathered under one name.

One bend is placed by `one_kink`, a second by `two_kinks`; `nearest_seat` says which seat it belongs
to, and `bow_shape` what shape it gives the shaft.
"""

from models.engineering.bow_shape import is_blind, kink_shape
from models.engineering.nearest_seat import NearestSeat, nearest_seat
from models.engineering.one_kink import KinkFit, fit_one_kink
from models.engineering.two_kinks import TwoKinkFit, fit_two_kinks

__all__ = [
    "KinkFit",
    "NearestSeat",
    "TwoKinkFit",
    "fit_one_kink",
    "fit_two_kinks",
    "is_blind",
    "kink_shape",
    "nearest_seat",
]
