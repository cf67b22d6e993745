"""What a plain form asks: numbers with a unit, words, and choices such as yes or no."""

from __future__ import annotations

from dataclasses import dataclass

from app.entry.cell_unit import CellUnit

__all__ = [
    "CHECK_ANSWERS",
    "ChoiceField",
    "FormField",
    "NumberField",
    "SecretField",
    "TextField",
    "check_field",
]

CHECK_ANSWERS = ("yes", "no", "does not apply")
"""Answers to a check, in this order."""


@dataclass(frozen=True, slots=True, kw_only=True)
class FormField:
    """What every field has.

    Attributes
    ----------
    name : str
        How the page knows it.
    label : str
        The question, or what is measured and from where.
    optional : bool
        Whether it may be left empty.
    """

    name: str
    label: str
    optional: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class NumberField(FormField):
    """A number with its unit.

    Attributes
    ----------
    unit : CellUnit
        How the text is read.
    """

    unit: CellUnit


@dataclass(frozen=True, slots=True, kw_only=True)
class TextField(FormField):
    """A few words: a serial, a remark."""


@dataclass(frozen=True, slots=True, kw_only=True)
class SecretField(FormField):
    """A passphrase or a PIN; what is typed is never shown."""


@dataclass(frozen=True, slots=True, kw_only=True)
class ChoiceField(FormField):
    """One of a few answers, each a key.

    Attributes
    ----------
    answers : tuple of str
        The keys, from left to right.
    """

    answers: tuple[str, ...]


def check_field(*, name: str, label: str) -> ChoiceField:
    """Ask whether something is so.

    Parameters
    ----------
    name : str
        How the page knows it.
    label : str
        The check, as a statement: "match marks agree".

    Returns
    -------
    ChoiceField
        With yes, no and does not apply.

    Examples
    --------
    >>> check_field(name="facing", label="eye towards the drive end").answers
    ('yes', 'no', 'does not apply')
    """
    return ChoiceField(name=name, label=label, answers=CHECK_ANSWERS)
