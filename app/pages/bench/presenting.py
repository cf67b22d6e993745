"""What the bench page asks of its presenter, and nothing more."""

from __future__ import annotations

from typing import Protocol

from PySide6.QtCore import SignalInstance

from app.presenters.bench.state import BenchState
from models.units import Quantity

__all__ = ["BenchPresenting"]


class BenchPresenting(Protocol):
    """What the page asks of its presenter."""

    @property
    def changed(self) -> SignalInstance:
        """The state is another."""

    @property
    def refused(self) -> SignalInstance:
        """Something was not taken: a sentence."""

    @property
    def in_hand(self) -> SignalInstance:
        """A reading that could not be written: its text."""

    @property
    def troubled(self) -> SignalInstance:
        """The surroundings failed: what, where, the way out."""

    @property
    def recovered(self) -> SignalInstance:
        """Writing goes on."""

    @property
    def state(self) -> BenchState:
        """Everything the bench shows."""

    def read(self, text: str) -> Quantity:
        """Read a text for the task of now."""

    def other_unit_text(self, text: str) -> str:
        """Write a text's value in the other unit."""

    def typed(self, text: str) -> None:
        """Follow each key."""

    def take(self, text: str) -> None:
        """Take a reading."""

    def correct(self, text: str, reason: str) -> None:
        """Take a reading in place of another."""

    def ask_for_last(self) -> None:
        """Go back to the last reading."""

    def choose_rung(self, index: int) -> None:
        """Go to a mark of the ladder."""

    def answer_proposed(self) -> None:
        """Answer the question with what is proposed."""

    def answer_kept(self, words: str) -> None:
        """Answer the question: it stays."""

    def answer_read_again(self) -> None:
        """Answer the question by reading again."""

    def fill(self, answers: dict[str, str]) -> None:
        """Take a form."""

    def press(self, name: str) -> None:
        """Do what a key says."""

    def open_door(self) -> None:
        """Note that the door is open."""

    def try_again(self) -> None:
        """Write again what could not be written."""
