"""Lay all tables of the first form.

A step holds its own statements: today's classes will have changed by tomorrow.
"""

from typing import Any

import sqlalchemy as sa
from alembic import op

__all__: list[str] = []

revision = "0001"
down_revision = None
branch_labels = None
depends_on = None


def _words(name: str, *, absent: bool = False) -> sa.Column[Any]:
    return sa.Column(name, sa.Text(), nullable=absent)


def _whole(name: str, *, absent: bool = False) -> sa.Column[Any]:
    kind = sa.BigInteger().with_variant(sa.Integer(), "sqlite")
    return sa.Column(name, kind, nullable=absent)


def _check(table: str, name: str, sql: str) -> sa.CheckConstraint:
    return sa.CheckConstraint(sql, name=op.f(f"ck_{table}_{name}"))


def _quantity(table: str, stem: str, ending: str) -> sa.CheckConstraint:
    typed = f"({stem}_typed IS NULL)"
    both = f"{typed} = ({stem}_unit IS NULL) AND {typed} = ({stem}_{ending} IS NULL)"
    return _check(table, f"{stem}_is_whole", both)


def _once(table: str, *columns: str) -> sa.UniqueConstraint:
    return sa.UniqueConstraint(*columns, name=op.f(f"uq_{table}_{'_'.join(columns)}"))


def _tie(table: str, column: str, other: str) -> sa.ForeignKeyConstraint:
    return sa.ForeignKeyConstraint(
        ["chain_id", column],
        [f"{other}.chain_id", f"{other}.key"],
        name=op.f(f"fk_{table}_chain_id_{column}"),
        deferrable=True,
        initially="DEFERRED",
    )


def _recorded(table: str, *own: sa.schema.SchemaItem) -> None:
    columns = [item for item in own if isinstance(item, sa.Column)]
    op.create_table(
        table,
        _words("chain_id"),
        _words("key"),
        _whole("sequence"),
        _whole("line"),
        *columns,
        sa.PrimaryKeyConstraint("chain_id", "key", name=op.f(f"pk_{table}")),
        sa.ForeignKeyConstraint(
            ["chain_id", "sequence"],
            ["act.chain_id", "act.sequence"],
            name=op.f(f"fk_{table}_chain_id_sequence"),
            deferrable=True,
            initially="DEFERRED",
        ),
        _once(table, "chain_id", "sequence", "line"),
        _check(table, "key_not_empty", "length(key) > 0"),
        _check(table, "line_counts_from_one", "line >= 1"),
        *(item for item in own if not isinstance(item, sa.Column)),
        sqlite_strict=True,
        sqlite_with_rowid=False,
    )


def upgrade() -> None:
    """Make the tables and their indices."""
    op.create_table(
        "act",
        _words("chain_id"),
        _whole("sequence"),
        _words("act_id"),
        _words("kind"),
        _words("by_person"),
        _words("station_name"),
        _words("done_at"),
        _words("entered_at_utc"),
        _whole("entered_offset_minutes"),
        _whole("clock_stepped_back"),
        _words("program_edition"),
        _whole("body_edition"),
        _words("rows_json"),
        _words("previous_digest"),
        _words("digest"),
        _check("act", "clock_stepped_back_yes_no", "clock_stepped_back IN (0, 1)"),
        _check("act", "digest_is_sha256", "length(digest) = 64"),
        _check("act", "previous_digest_is_sha256", "length(previous_digest) = 64"),
        _check("act", "sequence_counts_from_one", "sequence >= 1"),
        sa.PrimaryKeyConstraint("chain_id", "sequence", name="pk_act"),
        _once("act", "act_id"),
        _once("act", "chain_id", "previous_digest"),
        sqlite_strict=True,
        sqlite_with_rowid=False,
    )
    _recorded(
        "chain",
        _words("kind"),
        _check("chain", "kind_known", "kind IN ('shop', 'job')"),
        _check("chain", "names_itself", "key = chain_id"),
    )
    op.create_index("ix_chain_kind", "chain", ["kind"])
    _recorded(
        "component",
        _words("serial"),
        _words("name"),
        _words("item"),
        _words("drawing"),
        _words("revision"),
        _words("certificate"),
        _words("balance"),
        _words("key_convention"),
        _words("supersedes", absent=True),
        _tie("component", "supersedes", "component"),
        _once("component", "chain_id", "supersedes"),
    )
    op.create_index("ix_component_chain_id_serial", "component", ["chain_id", "serial"])
    _recorded(
        "entry",
        _words("kind"),
        _words("place_kind"),
        _words("place_step", absent=True),
        _whole("place_attempt", absent=True),
        _words("by_person"),
        _words("written_by_person", absent=True),
        _words("done_at"),
        _words("entered_at"),
        _words("plan_revision"),
        _words("supersedes", absent=True),
        _words("reason", absent=True),
        _words("out_of_order", absent=True),
        _tie("entry", "supersedes", "entry"),
        _once("entry", "chain_id", "supersedes"),
    )
    op.create_index(
        "ix_entry_chain_id_kind_place_step_place_attempt",
        "entry",
        ["chain_id", "kind", "place_step", "place_attempt"],
    )
    _recorded(
        "instrument",
        _words("tag"),
        _words("kind"),
        _words("resolution_typed", absent=True),
        _words("resolution_unit", absent=True),
        _whole("resolution_nm", absent=True),
        _words("uncertainty_typed", absent=True),
        _words("uncertainty_unit", absent=True),
        _whole("uncertainty_nm", absent=True),
        _words("expansion_typed", absent=True),
        _words("expansion_unit", absent=True),
        _whole("expansion_per_tera_kelvin", absent=True),
        _words("range_words"),
        _words("supersedes", absent=True),
        _quantity("instrument", "expansion", "per_tera_kelvin"),
        _quantity("instrument", "resolution", "nm"),
        _quantity("instrument", "uncertainty", "nm"),
        _tie("instrument", "supersedes", "instrument"),
        _once("instrument", "chain_id", "supersedes"),
    )
    op.create_index("ix_instrument_chain_id_tag", "instrument", ["chain_id", "tag"])
    _recorded(
        "job",
        _words("number"),
        _words("customer"),
        _words("shop"),
        _words("opened_at"),
        _words("form"),
        _whole("edition"),
        _whole("brought_head_sequence", absent=True),
        _words("brought_head_digest", absent=True),
        _once("job", "chain_id"),
        _once("job", "number"),
    )
    _recorded(
        "person",
        _words("person_key"),
        _words("name"),
        _words("initials"),
        _words("role"),
        _words("employer"),
        _words("supersedes", absent=True),
        _tie("person", "supersedes", "person"),
        _once("person", "chain_id", "supersedes"),
    )
    op.create_index("ix_person_chain_id_person_key", "person", ["chain_id", "person_key"])
    _recorded(
        "plan_revision",
        _whole("number"),
        _words("revision"),
        _words("reason"),
        _words("written_by_person"),
        _words("issued_by_person"),
        _words("issued_at"),
        _words("rotor_name"),
        _words("rotor_serial"),
        _whole("step_count"),
        _words("document_json"),
        _check("plan_revision", "number_counts_from_one", "number >= 1"),
        _once("plan_revision", "chain_id", "number"),
    )
    _recorded(
        "verdict",
        _words("subject"),
        _words("rule"),
        _whole("edition"),
        _words("verdict"),
        _words("message"),
        _words("inputs_json"),
        _words("judged_at"),
        _words("step", absent=True),
        _whole("attempt", absent=True),
    )
    _recorded(
        "attempt",
        _words("baseline", absent=True),
        _tie("attempt", "key", "entry"),
    )
    _recorded(
        "attempt_component",
        _words("entry_key"),
        _whole("number"),
        _words("item"),
        _words("serial"),
        _tie("attempt_component", "entry_key", "entry"),
        _once("attempt_component", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "axial_position",
        _words("item"),
        _words("state"),
        _words("value_typed"),
        _words("value_unit"),
        _whole("value_nm"),
        _words("instrument", absent=True),
        _tie("axial_position", "key", "entry"),
    )
    _recorded(
        "brought_correction",
        _words("entry_key"),
        _whole("number"),
        _words("where_json"),
        _words("was"),
        _words("now"),
        _words("reason"),
        _words("by_person"),
        _words("at"),
        _tie("brought_correction", "entry_key", "entry"),
        _once("brought_correction", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "calibration",
        _words("instrument_key"),
        _words("done_on"),
        _words("due_on"),
        _words("certificate"),
        _words("result"),
        _tie("calibration", "instrument_key", "instrument"),
        _once("calibration", "chain_id", "instrument_key"),
    )
    _recorded(
        "confirmation",
        _words("item"),
        _words("moment"),
        _words("serial"),
        _tie("confirmation", "key", "entry"),
    )
    _recorded(
        "confirmation_check",
        _words("entry_key"),
        _whole("number"),
        _words("what"),
        _words("answer"),
        _words("note"),
        _tie("confirmation_check", "entry_key", "entry"),
        _once("confirmation_check", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "cooling",
        _words("surroundings_typed", absent=True),
        _words("surroundings_unit", absent=True),
        _whole("surroundings_mk", absent=True),
        _words("instrument", absent=True),
        _quantity("cooling", "surroundings", "mk"),
        _tie("cooling", "key", "entry"),
    )
    _recorded(
        "decision",
        _words("about"),
        _words("disposition"),
        _words("words"),
        _tie("decision", "key", "entry"),
    )
    _recorded(
        "gauge_try",
        _words("entry_key"),
        _words("place_json"),
        _whole("turn"),
        _words("supersedes", absent=True),
        _words("reason", absent=True),
        _words("by_person"),
        _words("taken_at", absent=True),
        _words("land"),
        _words("size_typed"),
        _words("size_unit"),
        _whole("size_nm"),
        _whole("passed"),
        _check("gauge_try", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        _check("gauge_try", "passed_yes_no", "passed IN (0, 1)"),
        _tie("gauge_try", "entry_key", "entry"),
        _tie("gauge_try", "supersedes", "gauge_try"),
        _once("gauge_try", "chain_id", "entry_key", "place_json", "turn"),
        _once("gauge_try", "chain_id", "supersedes"),
    )
    _recorded(
        "handling",
        _words("what"),
        _words("words"),
        _tie("handling", "key", "entry"),
    )
    _recorded(
        "heating",
        _words("item"),
        _words("method"),
        _words("set_point_typed", absent=True),
        _words("set_point_unit", absent=True),
        _whole("set_point_mk", absent=True),
        _words("shaft_temperature_typed", absent=True),
        _words("shaft_temperature_unit", absent=True),
        _whole("shaft_temperature_mk", absent=True),
        _words("instrument", absent=True),
        _quantity("heating", "set_point", "mk"),
        _quantity("heating", "shaft_temperature", "mk"),
        _tie("heating", "key", "entry"),
    )
    _recorded(
        "instrument_use",
        _words("entry_key"),
        _words("instrument_key"),
        _words("tag"),
        _whole("resolution_nm", absent=True),
        _whole("uncertainty_nm", absent=True),
        _whole("expansion_per_tera_kelvin", absent=True),
        _words("calibration_done_on", absent=True),
        _words("calibration_due_on", absent=True),
        _words("calibration_certificate", absent=True),
        _words("calibration_result", absent=True),
        _tie("instrument_use", "entry_key", "entry"),
        _tie("instrument_use", "instrument_key", "instrument"),
        _once("instrument_use", "chain_id", "entry_key", "tag"),
    )
    _recorded(
        "mount",
        _words("item"),
        _words("outcome"),
        _words("door_opened_at", absent=True),
        _words("seated_at", absent=True),
        _words("shoulder"),
        _words("clock_position_typed", absent=True),
        _words("clock_position_unit", absent=True),
        _whole("clock_position_mdeg", absent=True),
        _quantity("mount", "clock_position", "mdeg"),
        _tie("mount", "key", "entry"),
    )
    _recorded(
        "note",
        _words("words"),
        _tie("note", "key", "entry"),
    )
    _recorded(
        "plan_step",
        _words("plan_key"),
        _whole("number"),
        _words("step"),
        _words("title"),
        _tie("plan_step", "plan_key", "plan_revision"),
        _once("plan_step", "chain_id", "plan_key", "number"),
        _once("plan_step", "chain_id", "plan_key", "step"),
    )
    _recorded(
        "question",
        _words("entry_key"),
        _words("where_json"),
        _words("question"),
        _words("answer"),
        _words("by_person"),
        _words("at"),
        _tie("question", "entry_key", "entry"),
    )
    op.create_index("ix_question_chain_id_entry_key", "question", ["chain_id", "entry_key"])
    _recorded(
        "removal",
        _words("item"),
        _words("method"),
        _words("found"),
        _words("temperature_typed", absent=True),
        _words("temperature_unit", absent=True),
        _whole("temperature_mk", absent=True),
        _quantity("removal", "temperature", "mk"),
        _tie("removal", "key", "entry"),
    )
    _recorded(
        "runout_reading",
        _words("entry_key"),
        _words("place_json"),
        _whole("turn"),
        _words("supersedes", absent=True),
        _words("reason", absent=True),
        _words("by_person"),
        _words("taken_at", absent=True),
        _words("station"),
        _words("what"),
        _whole("mark_index", absent=True),
        _words("typed", absent=True),
        _words("unit", absent=True),
        _whole("value_nm", absent=True),
        _whole("value_mdeg", absent=True),
        _whole("seconds_into_survey", absent=True),
        _check("runout_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        _check("runout_reading", "mark_has_index", "(what = 'mark') = (mark_index IS NOT NULL)"),
        _check(
            "runout_reading",
            "typed_has_value",
            "(typed IS NULL) = (value_nm IS NULL AND value_mdeg IS NULL)",
        ),
        _tie("runout_reading", "entry_key", "entry"),
        _tie("runout_reading", "supersedes", "runout_reading"),
        _once("runout_reading", "chain_id", "entry_key", "place_json", "turn"),
        _once("runout_reading", "chain_id", "supersedes"),
    )
    _recorded(
        "runout_station",
        _words("entry_key"),
        _whole("number"),
        _words("station"),
        _whole("mark_count"),
        _whole("seconds_count"),
        _tie("runout_station", "entry_key", "entry"),
        _once("runout_station", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "runout_survey",
        _words("purpose"),
        _words("unit"),
        _words("instrument"),
        _words("read_by_person", absent=True),
        _words("counted"),
        _words("set_up_attitude"),
        _words("set_up_supports"),
        _words("set_up_supported_at_json"),
        _words("set_up_end_stop"),
        _words("set_up_indicators_json"),
        _words("set_up_rest_time"),
        _whole("set_up_turns_before_reading"),
        _words("set_up_tip"),
        _words("set_up_lever_angle_typed", absent=True),
        _words("set_up_lever_angle_unit", absent=True),
        _whole("set_up_lever_angle_mdeg", absent=True),
        _words("set_up_base"),
        _quantity("runout_survey", "set_up_lever_angle", "mdeg"),
        _tie("runout_survey", "key", "entry"),
    )
    _recorded(
        "settled",
        _words("outcome"),
        _words("survey", absent=True),
        _tie("settled", "key", "entry"),
    )
    _recorded(
        "signature",
        _words("role"),
        _words("meaning"),
        _words("covers"),
        _tie("signature", "key", "entry"),
    )
    _recorded(
        "size_reading",
        _words("entry_key"),
        _words("place_json"),
        _whole("turn"),
        _words("supersedes", absent=True),
        _words("reason", absent=True),
        _words("by_person"),
        _words("taken_at", absent=True),
        _whole("position_index"),
        _whole("angle_index"),
        _words("typed", absent=True),
        _words("unit", absent=True),
        _whole("value_nm", absent=True),
        _check("size_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        _check("size_reading", "typed_has_value", "(typed IS NULL) = (value_nm IS NULL)"),
        _tie("size_reading", "entry_key", "entry"),
        _tie("size_reading", "supersedes", "size_reading"),
        _once("size_reading", "chain_id", "entry_key", "place_json", "turn"),
        _once("size_reading", "chain_id", "supersedes"),
    )
    _recorded(
        "size_survey",
        _words("item"),
        _words("land"),
        _words("feature"),
        _words("instrument"),
        _words("unit"),
        _words("part_temperature_typed", absent=True),
        _words("part_temperature_unit", absent=True),
        _whole("part_temperature_mk", absent=True),
        _words("gauge_temperature_typed", absent=True),
        _words("gauge_temperature_unit", absent=True),
        _whole("gauge_temperature_mk", absent=True),
        _whole("grid_positions"),
        _whole("grid_angles"),
        _quantity("size_survey", "gauge_temperature", "mk"),
        _quantity("size_survey", "part_temperature", "mk"),
        _tie("size_survey", "key", "entry"),
    )
    _recorded(
        "survey_angle",
        _words("entry_key"),
        _whole("number"),
        _words("angle_typed"),
        _words("angle_unit"),
        _whole("angle_mdeg"),
        _tie("survey_angle", "entry_key", "entry"),
        _once("survey_angle", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "survey_closed",
        _words("closed_at"),
        _whole("reading_count"),
        _words("readings_digest"),
        _check("survey_closed", "digest_is_sha256", "length(readings_digest) = 64"),
        _tie("survey_closed", "key", "entry"),
    )
    _recorded(
        "survey_position",
        _words("entry_key"),
        _whole("number"),
        _words("position_typed"),
        _words("position_unit"),
        _whole("position_nm"),
        _tie("survey_position", "entry_key", "entry"),
        _once("survey_position", "chain_id", "entry_key", "number"),
    )
    _recorded(
        "temperature_reading",
        _words("entry_key"),
        _words("place_json"),
        _whole("turn"),
        _words("supersedes", absent=True),
        _words("reason", absent=True),
        _words("by_person"),
        _words("taken_at", absent=True),
        _words("temperature_typed"),
        _words("temperature_unit"),
        _whole("temperature_mk"),
        _words("where_on_part", absent=True),
        _words("land", absent=True),
        _words("angle_typed", absent=True),
        _words("angle_unit", absent=True),
        _whole("angle_mdeg", absent=True),
        _words("position_typed", absent=True),
        _words("position_unit", absent=True),
        _whole("position_nm", absent=True),
        _quantity("temperature_reading", "angle", "mdeg"),
        _check("temperature_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        _check(
            "temperature_reading",
            "one_kind_of_place",
            "(where_on_part IS NULL) <> (position_nm IS NULL)",
        ),
        _quantity("temperature_reading", "position", "nm"),
        _tie("temperature_reading", "entry_key", "entry"),
        _tie("temperature_reading", "supersedes", "temperature_reading"),
        _once("temperature_reading", "chain_id", "entry_key", "place_json", "turn"),
        _once("temperature_reading", "chain_id", "supersedes"),
    )
