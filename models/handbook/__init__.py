"""The handbook: every rule and formula of the program, read off the code that runs."""

from models.handbook.entry import Entry, Kind, Published, Quantity
from models.handbook.judged import formulas_behind
from models.handbook.numbers import NUMBERS, formulas_of
from models.handbook.whole import entry, every_entry, find

__all__ = [
    "NUMBERS",
    "Entry",
    "Kind",
    "Published",
    "Quantity",
    "entry",
    "every_entry",
    "find",
    "formulas_behind",
    "formulas_of",
]
