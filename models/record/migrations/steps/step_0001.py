"""Lay all tables of the first form.

A step holds its own statements: today's classes will have changed by tomorrow.
"""

import sqlalchemy as sa
from alembic import op

from models.record.migrations.laying import check, once, quantity, recorded, tie, whole, words

__all__: list[str] = []

revision = "0001"
down_revision = None
branch_labels = None
depends_on = None


def upgrade() -> None:
    """Make the tables and their indices."""
    op.create_table(
        "act",
        words("chain_id"),
        whole("sequence"),
        words("act_id"),
        words("kind"),
        words("by_person"),
        words("station_name"),
        words("done_at"),
        words("entered_at_utc"),
        whole("entered_offset_minutes"),
        whole("clock_stepped_back"),
        words("program_edition"),
        whole("body_edition"),
        words("rows_json"),
        words("previous_digest"),
        words("digest"),
        check("act", "clock_stepped_back_yes_no", "clock_stepped_back IN (0, 1)"),
        check("act", "digest_is_sha256", "length(digest) = 64"),
        check("act", "previous_digest_is_sha256", "length(previous_digest) = 64"),
        check("act", "sequence_counts_from_one", "sequence >= 1"),
        sa.PrimaryKeyConstraint("chain_id", "sequence", name="pk_act"),
        once("act", "act_id"),
        once("act", "chain_id", "previous_digest"),
        sqlite_strict=True,
        sqlite_with_rowid=False,
    )
    recorded(
        "chain",
        words("kind"),
        check("chain", "kind_known", "kind IN ('shop', 'job')"),
        check("chain", "names_itself", "key = chain_id"),
    )
    op.create_index("ix_chain_kind", "chain", ["kind"])
    recorded(
        "component",
        words("serial"),
        words("name"),
        words("item"),
        words("drawing"),
        words("revision"),
        words("certificate"),
        words("balance"),
        words("key_convention"),
        words("supersedes", absent=True),
        tie("component", "supersedes", "component"),
        once("component", "chain_id", "supersedes"),
    )
    op.create_index("ix_component_chain_id_serial", "component", ["chain_id", "serial"])
    recorded(
        "entry",
        words("kind"),
        words("place_kind"),
        words("place_step", absent=True),
        whole("place_attempt", absent=True),
        words("by_person"),
        words("written_by_person", absent=True),
        words("done_at"),
        words("entered_at"),
        words("plan_revision"),
        words("supersedes", absent=True),
        words("reason", absent=True),
        words("out_of_order", absent=True),
        tie("entry", "supersedes", "entry"),
        once("entry", "chain_id", "supersedes"),
    )
    op.create_index(
        "ix_entry_chain_id_kind_place_step_place_attempt",
        "entry",
        ["chain_id", "kind", "place_step", "place_attempt"],
    )
    recorded(
        "instrument",
        words("tag"),
        words("kind"),
        words("resolution_typed", absent=True),
        words("resolution_unit", absent=True),
        whole("resolution_nm", absent=True),
        words("uncertainty_typed", absent=True),
        words("uncertainty_unit", absent=True),
        whole("uncertainty_nm", absent=True),
        words("expansion_typed", absent=True),
        words("expansion_unit", absent=True),
        whole("expansion_per_tera_kelvin", absent=True),
        words("range_words"),
        words("supersedes", absent=True),
        quantity("instrument", "expansion", "per_tera_kelvin"),
        quantity("instrument", "resolution", "nm"),
        quantity("instrument", "uncertainty", "nm"),
        tie("instrument", "supersedes", "instrument"),
        once("instrument", "chain_id", "supersedes"),
    )
    op.create_index("ix_instrument_chain_id_tag", "instrument", ["chain_id", "tag"])
    recorded(
        "job",
        words("number"),
        words("customer"),
        words("shop"),
        words("opened_at"),
        words("form"),
        whole("edition"),
        whole("brought_head_sequence", absent=True),
        words("brought_head_digest", absent=True),
        once("job", "chain_id"),
        once("job", "number"),
    )
    recorded(
        "person",
        words("person_key"),
        words("name"),
        words("initials"),
        words("role"),
        words("employer"),
        words("supersedes", absent=True),
        tie("person", "supersedes", "person"),
        once("person", "chain_id", "supersedes"),
    )
    op.create_index("ix_person_chain_id_person_key", "person", ["chain_id", "person_key"])
    recorded(
        "plan_revision",
        whole("number"),
        words("revision"),
        words("reason"),
        words("written_by_person"),
        words("issued_by_person"),
        words("issued_at"),
        words("rotor_name"),
        words("rotor_serial"),
        whole("step_count"),
        words("document_json"),
        check("plan_revision", "number_counts_from_one", "number >= 1"),
        once("plan_revision", "chain_id", "number"),
    )
    recorded(
        "verdict",
        words("subject"),
        words("rule"),
        whole("edition"),
        words("verdict"),
        words("message"),
        words("inputs_json"),
        words("judged_at"),
        words("step", absent=True),
        whole("attempt", absent=True),
    )
    recorded(
        "attempt",
        words("baseline", absent=True),
        tie("attempt", "key", "entry"),
    )
    recorded(
        "attempt_component",
        words("entry_key"),
        whole("number"),
        words("item"),
        words("serial"),
        tie("attempt_component", "entry_key", "entry"),
        once("attempt_component", "chain_id", "entry_key", "number"),
    )
    recorded(
        "axial_position",
        words("item"),
        words("state"),
        words("value_typed"),
        words("value_unit"),
        whole("value_nm"),
        words("instrument", absent=True),
        tie("axial_position", "key", "entry"),
    )
    recorded(
        "brought_correction",
        words("entry_key"),
        whole("number"),
        words("where_json"),
        words("was"),
        words("now"),
        words("reason"),
        words("by_person"),
        words("at"),
        tie("brought_correction", "entry_key", "entry"),
        once("brought_correction", "chain_id", "entry_key", "number"),
    )
    recorded(
        "calibration",
        words("instrument_key"),
        words("done_on"),
        words("due_on"),
        words("certificate"),
        words("result"),
        tie("calibration", "instrument_key", "instrument"),
        once("calibration", "chain_id", "instrument_key"),
    )
    recorded(
        "confirmation",
        words("item"),
        words("moment"),
        words("serial"),
        tie("confirmation", "key", "entry"),
    )
    recorded(
        "confirmation_check",
        words("entry_key"),
        whole("number"),
        words("what"),
        words("answer"),
        words("note"),
        tie("confirmation_check", "entry_key", "entry"),
        once("confirmation_check", "chain_id", "entry_key", "number"),
    )
    recorded(
        "cooling",
        words("surroundings_typed", absent=True),
        words("surroundings_unit", absent=True),
        whole("surroundings_mk", absent=True),
        words("instrument", absent=True),
        quantity("cooling", "surroundings", "mk"),
        tie("cooling", "key", "entry"),
    )
    recorded(
        "decision",
        words("about"),
        words("disposition"),
        words("words"),
        tie("decision", "key", "entry"),
    )
    recorded(
        "gauge_try",
        words("entry_key"),
        words("place_json"),
        whole("turn"),
        words("supersedes", absent=True),
        words("reason", absent=True),
        words("by_person"),
        words("taken_at", absent=True),
        words("land"),
        words("size_typed"),
        words("size_unit"),
        whole("size_nm"),
        whole("passed"),
        check("gauge_try", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        check("gauge_try", "passed_yes_no", "passed IN (0, 1)"),
        tie("gauge_try", "entry_key", "entry"),
        tie("gauge_try", "supersedes", "gauge_try"),
        once("gauge_try", "chain_id", "entry_key", "place_json", "turn"),
        once("gauge_try", "chain_id", "supersedes"),
    )
    recorded(
        "handling",
        words("what"),
        words("words"),
        tie("handling", "key", "entry"),
    )
    recorded(
        "heating",
        words("item"),
        words("method"),
        words("set_point_typed", absent=True),
        words("set_point_unit", absent=True),
        whole("set_point_mk", absent=True),
        words("shaft_temperature_typed", absent=True),
        words("shaft_temperature_unit", absent=True),
        whole("shaft_temperature_mk", absent=True),
        words("instrument", absent=True),
        quantity("heating", "set_point", "mk"),
        quantity("heating", "shaft_temperature", "mk"),
        tie("heating", "key", "entry"),
    )
    recorded(
        "instrument_use",
        words("entry_key"),
        words("instrument_key"),
        words("tag"),
        whole("resolution_nm", absent=True),
        whole("uncertainty_nm", absent=True),
        whole("expansion_per_tera_kelvin", absent=True),
        words("calibration_done_on", absent=True),
        words("calibration_due_on", absent=True),
        words("calibration_certificate", absent=True),
        words("calibration_result", absent=True),
        tie("instrument_use", "entry_key", "entry"),
        tie("instrument_use", "instrument_key", "instrument"),
        once("instrument_use", "chain_id", "entry_key", "tag"),
    )
    recorded(
        "mount",
        words("item"),
        words("outcome"),
        words("door_opened_at", absent=True),
        words("seated_at", absent=True),
        words("shoulder"),
        words("clock_position_typed", absent=True),
        words("clock_position_unit", absent=True),
        whole("clock_position_mdeg", absent=True),
        quantity("mount", "clock_position", "mdeg"),
        tie("mount", "key", "entry"),
    )
    recorded(
        "note",
        words("words"),
        tie("note", "key", "entry"),
    )
    recorded(
        "plan_step",
        words("plan_key"),
        whole("number"),
        words("step"),
        words("title"),
        tie("plan_step", "plan_key", "plan_revision"),
        once("plan_step", "chain_id", "plan_key", "number"),
        once("plan_step", "chain_id", "plan_key", "step"),
    )
    recorded(
        "question",
        words("entry_key"),
        words("where_json"),
        words("question"),
        words("answer"),
        words("by_person"),
        words("at"),
        tie("question", "entry_key", "entry"),
    )
    op.create_index("ix_question_chain_id_entry_key", "question", ["chain_id", "entry_key"])
    recorded(
        "removal",
        words("item"),
        words("method"),
        words("found"),
        words("temperature_typed", absent=True),
        words("temperature_unit", absent=True),
        whole("temperature_mk", absent=True),
        quantity("removal", "temperature", "mk"),
        tie("removal", "key", "entry"),
    )
    recorded(
        "runout_reading",
        words("entry_key"),
        words("place_json"),
        whole("turn"),
        words("supersedes", absent=True),
        words("reason", absent=True),
        words("by_person"),
        words("taken_at", absent=True),
        words("station"),
        words("what"),
        whole("mark_index", absent=True),
        words("typed", absent=True),
        words("unit", absent=True),
        whole("value_nm", absent=True),
        whole("value_mdeg", absent=True),
        whole("seconds_into_survey", absent=True),
        check("runout_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        check("runout_reading", "mark_has_index", "(what = 'mark') = (mark_index IS NOT NULL)"),
        check(
            "runout_reading",
            "typed_has_value",
            "(typed IS NULL) = (value_nm IS NULL AND value_mdeg IS NULL)",
        ),
        tie("runout_reading", "entry_key", "entry"),
        tie("runout_reading", "supersedes", "runout_reading"),
        once("runout_reading", "chain_id", "entry_key", "place_json", "turn"),
        once("runout_reading", "chain_id", "supersedes"),
    )
    recorded(
        "runout_station",
        words("entry_key"),
        whole("number"),
        words("station"),
        whole("mark_count"),
        whole("seconds_count"),
        tie("runout_station", "entry_key", "entry"),
        once("runout_station", "chain_id", "entry_key", "number"),
    )
    recorded(
        "runout_survey",
        words("purpose"),
        words("unit"),
        words("instrument"),
        words("read_by_person", absent=True),
        words("counted"),
        words("set_up_attitude"),
        words("set_up_supports"),
        words("set_up_supported_at_json"),
        words("set_up_end_stop"),
        words("set_up_indicators_json"),
        words("set_up_rest_time"),
        whole("set_up_turns_before_reading"),
        words("set_up_tip"),
        words("set_up_lever_angle_typed", absent=True),
        words("set_up_lever_angle_unit", absent=True),
        whole("set_up_lever_angle_mdeg", absent=True),
        words("set_up_base"),
        quantity("runout_survey", "set_up_lever_angle", "mdeg"),
        tie("runout_survey", "key", "entry"),
    )
    recorded(
        "settled",
        words("outcome"),
        words("survey", absent=True),
        tie("settled", "key", "entry"),
    )
    recorded(
        "signature",
        words("role"),
        words("meaning"),
        words("covers"),
        tie("signature", "key", "entry"),
    )
    recorded(
        "size_reading",
        words("entry_key"),
        words("place_json"),
        whole("turn"),
        words("supersedes", absent=True),
        words("reason", absent=True),
        words("by_person"),
        words("taken_at", absent=True),
        whole("position_index"),
        whole("angle_index"),
        words("typed", absent=True),
        words("unit", absent=True),
        whole("value_nm", absent=True),
        check("size_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        check("size_reading", "typed_has_value", "(typed IS NULL) = (value_nm IS NULL)"),
        tie("size_reading", "entry_key", "entry"),
        tie("size_reading", "supersedes", "size_reading"),
        once("size_reading", "chain_id", "entry_key", "place_json", "turn"),
        once("size_reading", "chain_id", "supersedes"),
    )
    recorded(
        "size_survey",
        words("item"),
        words("land"),
        words("feature"),
        words("instrument"),
        words("unit"),
        words("part_temperature_typed", absent=True),
        words("part_temperature_unit", absent=True),
        whole("part_temperature_mk", absent=True),
        words("gauge_temperature_typed", absent=True),
        words("gauge_temperature_unit", absent=True),
        whole("gauge_temperature_mk", absent=True),
        whole("grid_positions"),
        whole("grid_angles"),
        quantity("size_survey", "gauge_temperature", "mk"),
        quantity("size_survey", "part_temperature", "mk"),
        tie("size_survey", "key", "entry"),
    )
    recorded(
        "survey_angle",
        words("entry_key"),
        whole("number"),
        words("angle_typed"),
        words("angle_unit"),
        whole("angle_mdeg"),
        tie("survey_angle", "entry_key", "entry"),
        once("survey_angle", "chain_id", "entry_key", "number"),
    )
    recorded(
        "survey_closed",
        words("closed_at"),
        whole("reading_count"),
        words("readings_digest"),
        check("survey_closed", "digest_is_sha256", "length(readings_digest) = 64"),
        tie("survey_closed", "key", "entry"),
    )
    recorded(
        "survey_position",
        words("entry_key"),
        whole("number"),
        words("position_typed"),
        words("position_unit"),
        whole("position_nm"),
        tie("survey_position", "entry_key", "entry"),
        once("survey_position", "chain_id", "entry_key", "number"),
    )
    recorded(
        "temperature_reading",
        words("entry_key"),
        words("place_json"),
        whole("turn"),
        words("supersedes", absent=True),
        words("reason", absent=True),
        words("by_person"),
        words("taken_at", absent=True),
        words("temperature_typed"),
        words("temperature_unit"),
        whole("temperature_mk"),
        words("where_on_part", absent=True),
        words("land", absent=True),
        words("angle_typed", absent=True),
        words("angle_unit", absent=True),
        whole("angle_mdeg", absent=True),
        words("position_typed", absent=True),
        words("position_unit", absent=True),
        whole("position_nm", absent=True),
        quantity("temperature_reading", "angle", "mdeg"),
        check("temperature_reading", "later_turns_supersede", "(turn = 1) = (supersedes IS NULL)"),
        check(
            "temperature_reading",
            "one_kind_of_place",
            "(where_on_part IS NULL) <> (position_nm IS NULL)",
        ),
        quantity("temperature_reading", "position", "nm"),
        tie("temperature_reading", "entry_key", "entry"),
        tie("temperature_reading", "supersedes", "temperature_reading"),
        once("temperature_reading", "chain_id", "entry_key", "place_json", "turn"),
        once("temperature_reading", "chain_id", "supersedes"),
    )
