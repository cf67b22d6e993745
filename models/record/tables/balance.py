"""Entries of balance: runs, corrections, trial-weight rounds, weighed journals."""

from sqlalchemy.orm import Mapped

from models.record.tables.base import Base, Detail, Part

__all__ = [
    "BalanceCorrection",
    "BalanceReading",
    "BalanceRun",
    "JournalsWeighed",
    "TrialReading",
    "TrialRound",
]


class BalanceRun(Detail, Base):
    """The rotor ran in the balancing machine; what was read stands in `balance_reading`."""

    __tablename__ = "balance_run"

    purpose: Mapped[str]
    speed_typed: Mapped[str]
    speed_unit: Mapped[str]
    # Thousandths of a turn per minute.
    speed_mrpm: Mapped[int]
    instrument: Mapped[str]


class BalanceReading(Part, Base):
    """Unbalance read in one plane."""

    __tablename__ = "balance_reading"

    plane: Mapped[str]
    amount_typed: Mapped[str]
    amount_unit: Mapped[str]
    # Microgram-metres, which are thousandths of a gram-millimetre.
    amount_ugm: Mapped[int]
    angle_typed: Mapped[str]
    angle_unit: Mapped[str]
    angle_mdeg: Mapped[int]


class BalanceCorrection(Detail, Base):
    """Something was taken off or put on to balance the rotor."""

    __tablename__ = "balance_correction"

    plane: Mapped[str]
    angle_typed: Mapped[str]
    angle_unit: Mapped[str]
    angle_mdeg: Mapped[int]
    amount_typed: Mapped[str]
    amount_unit: Mapped[str]
    amount_ugm: Mapped[int]
    how: Mapped[str]
    item: Mapped[str | None]
    allowed_by_person: Mapped[str | None]


class TrialRound(Detail, Base):
    """A trial weight went round one plane; readings stand in `trial_reading`."""

    __tablename__ = "trial_round"

    plane: Mapped[str]
    trial_typed: Mapped[str]
    trial_unit: Mapped[str]
    trial_ugm: Mapped[int]
    instrument: Mapped[str]
    plain: Mapped[str | None]


class TrialReading(Part, Base):
    """What the machine showed with the trial weight at one angle."""

    __tablename__ = "trial_reading"

    angle_typed: Mapped[str]
    angle_unit: Mapped[str]
    angle_mdeg: Mapped[int]
    reading: Mapped[str]


class JournalsWeighed(Detail, Base):
    """What each journal carries, by scales."""

    __tablename__ = "journals_weighed"

    first_typed: Mapped[str]
    first_unit: Mapped[str]
    first_mg: Mapped[int]
    second_typed: Mapped[str]
    second_unit: Mapped[str]
    second_mg: Mapped[int]
    instrument: Mapped[str]
