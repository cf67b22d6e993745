"""Entries: what they all say, and one table for what each kind says beyond that."""

from sqlalchemy import CheckConstraint, Index, UniqueConstraint
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Detail, Part, Recorded, points_to

__all__ = [
    "Attempt",
    "AttemptComponent",
    "AxialPosition",
    "BroughtCorrection",
    "Confirmation",
    "ConfirmationCheck",
    "Cooling",
    "Decision",
    "Entry",
    "Handling",
    "Heating",
    "Mount",
    "Note",
    "Question",
    "Removal",
    "RunoutStation",
    "RunoutSurvey",
    "Settled",
    "Signature",
    "SizeSurvey",
    "SurveyAngle",
    "SurveyClosed",
    "SurveyPosition",
]


class Entry(Recorded, Base):
    """What every entry says; its key is the entry's id."""

    __tablename__ = "entry"

    kind: Mapped[str]
    place_kind: Mapped[str]
    place_step: Mapped[str | None]
    place_attempt: Mapped[int | None]
    by_person: Mapped[str]
    written_by_person: Mapped[str | None]
    done_at: Mapped[str]
    entered_at: Mapped[str]
    plan_revision: Mapped[str]
    supersedes: Mapped[str | None]
    reason: Mapped[str | None]
    out_of_order: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let an entry be superseded at most once."""
        return (
            points_to("entry", "supersedes"),
            UniqueConstraint("chain_id", "supersedes"),
            Index(None, "chain_id", "kind", "place_step", "place_attempt"),
        )


class Attempt(Detail, Base):
    """An attempt at a step begins."""

    __tablename__ = "attempt"

    baseline: Mapped[str | None]


class AttemptComponent(Part, Base):
    """The component that holds a position in an attempt."""

    __tablename__ = "attempt_component"

    item: Mapped[str]
    serial: Mapped[str]


class SizeSurvey(Detail, Base):
    """Diameters of a bore or a seat over one land; readings stand in `size_reading`."""

    __tablename__ = "size_survey"

    item: Mapped[str]
    land: Mapped[str]
    feature: Mapped[str]
    instrument: Mapped[str]
    unit: Mapped[str]
    part_temperature_typed: Mapped[str | None]
    part_temperature_unit: Mapped[str | None]
    part_temperature_mk: Mapped[int | None]
    gauge_temperature_typed: Mapped[str | None]
    gauge_temperature_unit: Mapped[str | None]
    gauge_temperature_mk: Mapped[int | None]
    # The grid as it stood when the survey was entered: positions by angles.
    grid_positions: Mapped[int]
    grid_angles: Mapped[int]


class RunoutSurvey(Detail, Base):
    """Runout of every station in reach in one set-up; readings stand in `runout_reading`."""

    __tablename__ = "runout_survey"

    purpose: Mapped[str]
    unit: Mapped[str]
    instrument: Mapped[str]
    read_by_person: Mapped[str | None]
    counted: Mapped[str]
    set_up_attitude: Mapped[str]
    set_up_supports: Mapped[str]
    set_up_supported_at_json: Mapped[str]
    set_up_end_stop: Mapped[str]
    set_up_indicators_json: Mapped[str]
    set_up_rest_time: Mapped[str]
    set_up_turns_before_reading: Mapped[int]
    set_up_tip: Mapped[str]
    set_up_lever_angle_typed: Mapped[str | None]
    set_up_lever_angle_unit: Mapped[str | None]
    set_up_lever_angle_mdeg: Mapped[int | None]
    set_up_base: Mapped[str]


class SurveyAngle(Part, Base):
    """A clock angle at which a survey is read."""

    __tablename__ = "survey_angle"

    angle_typed: Mapped[str]
    angle_unit: Mapped[str]
    angle_mdeg: Mapped[int]


class SurveyPosition(Part, Base):
    """An axial position at which sizes are read."""

    __tablename__ = "survey_position"

    position_typed: Mapped[str]
    position_unit: Mapped[str]
    position_nm: Mapped[int]


class RunoutStation(Part, Base):
    """A station named when the survey was entered, and how many marks were laid out for it."""

    __tablename__ = "runout_station"

    station: Mapped[str]
    mark_count: Mapped[int]
    seconds_count: Mapped[int]


class SurveyClosed(Detail, Base):
    """A survey is closed: how many readings stand in it, and the digest of their values."""

    __tablename__ = "survey_closed"

    closed_at: Mapped[str]
    reading_count: Mapped[int]
    readings_digest: Mapped[str]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Demand a whole digest."""
        return (CheckConstraint("length(readings_digest) = 64", name="digest_is_sha256"),)


class Question(Recorded, Base):
    """A reading was questioned, and how that was answered."""

    __tablename__ = "question"

    entry_key: Mapped[str]
    where_json: Mapped[str]
    question: Mapped[str]
    answer: Mapped[str]
    by_person: Mapped[str]
    at: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie it to its entry."""
        return (points_to("entry", "entry_key"), Index(None, "chain_id", "entry_key"))


class BroughtCorrection(Part, Base):
    """A correction that was made before the entry came into this record, as it was told."""

    __tablename__ = "brought_correction"

    where_json: Mapped[str]
    was: Mapped[str]
    now: Mapped[str]
    reason: Mapped[str]
    by_person: Mapped[str]
    at: Mapped[str]


class Confirmation(Detail, Base):
    """What was looked at before the furnace, or again before the door."""

    __tablename__ = "confirmation"

    item: Mapped[str]
    moment: Mapped[str]
    serial: Mapped[str]


class ConfirmationCheck(Part, Base):
    """One thing confirmed, or found otherwise."""

    __tablename__ = "confirmation_check"

    what: Mapped[str]
    answer: Mapped[str]
    note: Mapped[str]


class Heating(Detail, Base):
    """How a part was heated; temperatures and gauge tries stand in their tables."""

    __tablename__ = "heating"

    item: Mapped[str]
    method: Mapped[str]
    set_point_typed: Mapped[str | None]
    set_point_unit: Mapped[str | None]
    set_point_mk: Mapped[int | None]
    shaft_temperature_typed: Mapped[str | None]
    shaft_temperature_unit: Mapped[str | None]
    shaft_temperature_mk: Mapped[int | None]
    instrument: Mapped[str | None]


class Mount(Detail, Base):
    """The part went on, or stopped short."""

    __tablename__ = "mount"

    item: Mapped[str]
    outcome: Mapped[str]
    door_opened_at: Mapped[str | None]
    seated_at: Mapped[str | None]
    shoulder: Mapped[str]
    clock_position_typed: Mapped[str | None]
    clock_position_unit: Mapped[str | None]
    clock_position_mdeg: Mapped[int | None]


class AxialPosition(Detail, Base):
    """Where the part came to rest, hot or cold."""

    __tablename__ = "axial_position"

    item: Mapped[str]
    state: Mapped[str]
    value_typed: Mapped[str]
    value_unit: Mapped[str]
    value_nm: Mapped[int]
    instrument: Mapped[str | None]


class Cooling(Detail, Base):
    """Temperatures around and along the rotor; they stand in `temperature_reading`."""

    __tablename__ = "cooling"

    surroundings_typed: Mapped[str | None]
    surroundings_unit: Mapped[str | None]
    surroundings_mk: Mapped[int | None]
    instrument: Mapped[str | None]


class Removal(Detail, Base):
    """A part came off again."""

    __tablename__ = "removal"

    item: Mapped[str]
    method: Mapped[str]
    found: Mapped[str]
    temperature_typed: Mapped[str | None]
    temperature_unit: Mapped[str | None]
    temperature_mk: Mapped[int | None]


class Settled(Detail, Base):
    """How an attempt ended."""

    __tablename__ = "settled"

    outcome: Mapped[str]
    survey: Mapped[str | None]


class Handling(Detail, Base):
    """A lift, a lay-down, a turn-over, a trial fit or a planned removal."""

    __tablename__ = "handling"

    what: Mapped[str]
    words: Mapped[str]


class Note(Detail, Base):
    """Something seen and worth keeping."""

    __tablename__ = "note"

    words: Mapped[str]


class Decision(Detail, Base):
    """What was decided, about what and why."""

    __tablename__ = "decision"

    about: Mapped[str]
    disposition: Mapped[str]
    words: Mapped[str]
    authority: Mapped[str | None]
    finding: Mapped[int | None]
    agreed_by: Mapped[str | None]
    agreed_how: Mapped[str | None]


class Signature(Detail, Base):
    """A person's name under part of the record."""

    __tablename__ = "signature"

    role: Mapped[str]
    meaning: Mapped[str]
    covers: Mapped[str]
