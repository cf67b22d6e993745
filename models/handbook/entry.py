"""One page of the handbook, as plain data."""

from dataclasses import dataclass
from enum import Enum

__all__ = ["Entry", "Kind", "Published", "Quantity"]


class Kind(Enum):
    """What an entry describes."""

    RULE = "rule"
    FORMULA = "formula"


@dataclass(frozen=True)
class Quantity:
    """What goes in or comes out."""

    name: str
    words: str
    unit: str


@dataclass(frozen=True)
class Published:
    """A number as its source prints it, which a test compares with the program's own."""

    case: str
    printed: str
    source: str


@dataclass(frozen=True)
class Entry:
    """A rule or a formula: what it says, where it comes from, where it holds, what tests it.

    Attributes
    ----------
    name : str
        The rule's id, or the function's module and name.
    kind : Kind
        Rule or formula.
    statement : str
        One sentence.
    formulas : tuple of str
        In plain signs, one a line.
    takes, gives : tuple of Quantity
        What goes in and what comes out, with SI units.
    holds : tuple of str
        Range and doubts: what is refused, and the notes.
    sources : tuple of str
        Where it comes from.
    edition : str
        Edition of a rule; nothing for a formula.
    lives_in : str
        Path of the code.
    related : tuple of str
        Names of other entries: the formulas behind a rule's numbers, the rules that use one.
    tests : tuple of str
        Path and name of each test that names it.
    second_paths : tuple of str
        Modules with a solution that shares no formula, used by those tests.
    published : tuple of Published
        Rows from published sources that those tests compare with.
    """

    name: str
    kind: Kind
    statement: str
    formulas: tuple[str, ...]
    takes: tuple[Quantity, ...]
    gives: tuple[Quantity, ...]
    holds: tuple[str, ...]
    sources: tuple[str, ...]
    edition: str
    lives_in: str
    related: tuple[str, ...]
    tests: tuple[str, ...]
    second_paths: tuple[str, ...]
    published: tuple[Published, ...]
