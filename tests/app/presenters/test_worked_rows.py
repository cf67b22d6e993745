"""Numbers worked out as rows: each with its place, its value in the job's units, and its source."""

import pytest

import sample_data
from app.presenters.worked_rows import worked_rows
from models.assess import assess

COMPRESSOR = worked_rows(assess(sample_data.compressor()))
PUMP = worked_rows(assess(sample_data.pump()))


def of(rows, what, where=""):
    return next(one for one in rows if one.what == what and where in one.where)


def told(row):
    return {label for label, _ in row.reasons}, " ".join(text for _, text in row.reasons)


@pytest.mark.parametrize("rows", [COMPRESSOR, PUMP])
def test_every_number_has_a_place_a_value_and_something_behind_it(rows):
    assert len(rows) > 200
    for row in rows:
        labels, _ = told(row)
        assert row.where
        assert row.value
        assert labels & {"formula", "comes from"}


def test_a_pressure_opens_to_its_formula_its_inputs_and_its_source():
    first = sample_data.compressor().plan.steps[0]
    row = of(COMPRESSOR, "least pressure", first.items[0].name)
    labels, text = told(row)

    assert f"step 1, {first.title}, attempt 1" in row.where
    assert "land" in row.where
    assert "ksi" in row.value
    assert "MPa" in row.value
    assert {"formula", "takes", "source", "written out"} <= labels
    assert "fits.contact_pressure" in text
    assert "Shigley" in text


def test_the_rotor_s_own_numbers_come_first_with_speed_and_mass_in_its_units():
    assert COMPRESSOR[0].where == "the rotor"
    assert "r/min" in of(COMPRESSOR, "first critical speed").value
    assert "lb" in of(COMPRESSOR, "mass").value
    assert "r/min" in of(PUMP, "first critical speed").value


def test_what_is_read_says_so():
    row = of(COMPRESSOR, "friction")
    labels, text = told(row)

    assert "comes from" in labels
    assert "friction source" in labels
    assert "read, or set by the plan" in text
