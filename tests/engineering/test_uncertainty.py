import math

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy import integrate, stats

from models.engineering.errors import OutOfRangeError
from models.engineering.uncertainty import (
    COVERAGE_FACTOR,
    Decision,
    combined_uncertainty,
    conformance_probability,
    decide,
    uncertainty_of_mean,
)
from tests.published.conformance import PROBABILITIES
from tests.published.printed import printed

WITHIN, OUTSIDE, UNCLEAR = Decision.PROVES_WITHIN, Decision.PROVES_OUTSIDE, Decision.CANNOT_TELL
MICRO = 1e-6
TEN_NANOMETRES = 1e-8


@pytest.mark.parametrize("row", PROBABILITIES, ids=lambda row: row.case)
def test_the_probability_is_the_one_printed(row):
    assert conformance_probability(**row.inputs) == printed(row.printed), row.source


@given(st.floats(-50.0, 50.0), st.floats(0.5, 20.0), st.floats(-40.0, 0.0), st.floats(0.0, 40.0))
def test_the_probability_is_the_area_under_the_density(value, uncertainty, least, greatest):
    # Second path: numerical integration of the density between the limits.
    area, _ = integrate.quad(
        lambda at: (
            math.exp(-(((at - value) / uncertainty) ** 2) / 2.0)
            / (uncertainty * math.sqrt(2.0 * math.pi))
        ),
        least,
        greatest,
        points=[min(max(value, least), greatest)],
    )
    found = conformance_probability(
        value=value, standard_uncertainty=uncertainty, least=least, greatest=greatest
    )
    assert found == pytest.approx(area, abs=1e-7)


@given(st.floats(1.0, 20.0))
def test_a_hopeless_value_keeps_its_small_probability(distance):
    found = conformance_probability(
        value=-distance, standard_uncertainty=1.0, least=0.0, greatest=math.inf
    )
    assert found == pytest.approx(stats.norm.sf(distance), rel=1e-6, abs=0.0)


def test_without_limits_everything_conforms():
    assert (
        conformance_probability(
            value=3.0, standard_uncertainty=1.0, least=-math.inf, greatest=math.inf
        )
        == 1.0
    )


@pytest.mark.parametrize(
    ("value", "uncertainty", "decision"),
    [
        # Limits of 150 and 215 µm; the zones by hand.
        (182.0, 7.0, WITHIN),
        (157.0, 7.0, WITHIN),
        (208.0, 7.0, WITHIN),
        (156.99, 7.0, UNCLEAR),
        (208.01, 7.0, UNCLEAR),
        (150.0, 7.0, UNCLEAR),
        (143.0, 7.0, UNCLEAR),
        (222.0, 7.0, UNCLEAR),
        (142.99, 7.0, OUTSIDE),
        (222.01, 7.0, OUTSIDE),
        (150.0, 0.0, WITHIN),
        (149.99, 0.0, OUTSIDE),
        (215.0, 0.0, WITHIN),
        (215.01, 0.0, OUTSIDE),
        # An uncertainty of more than half the tolerance of 65 µm proves nothing in the middle.
        (182.5, 33.0, UNCLEAR),
    ],
)
def test_a_value_proves_what_its_uncertainty_allows(value, uncertainty, decision):
    found = decide(
        value=value * MICRO,
        expanded_uncertainty=uncertainty * MICRO,
        least=150 * MICRO,
        greatest=215 * MICRO,
        resolution=TEN_NANOMETRES,
    )
    assert found is decision


@pytest.mark.parametrize(
    ("least", "greatest", "decision"),
    [
        (-math.inf, 10.0, WITHIN),
        (-math.inf, 5.0, UNCLEAR),
        (-math.inf, 3.0, OUTSIDE),
        (3.0, math.inf, WITHIN),
        (5.5, math.inf, UNCLEAR),
        (7.0, math.inf, OUTSIDE),
        (-math.inf, math.inf, WITHIN),
    ],
)
def test_one_limit_may_be_missing(least, greatest, decision):
    found = decide(
        value=5.0, expanded_uncertainty=1.0, least=least, greatest=greatest, resolution=0.01
    )
    assert found is decision


@given(st.integers(10_000, 400_000), st.integers(1, 400), st.integers(0, 50))
def test_a_difference_of_whole_micrometres_on_the_guarded_limit_is_within(bore, fit, guard):
    # Bare floats put about half of these on the wrong side.
    seat = bore + fit + guard
    found = decide(
        value=seat * MICRO - bore * MICRO,
        expanded_uncertainty=guard * MICRO,
        least=fit * MICRO,
        greatest=math.inf,
        resolution=TEN_NANOMETRES,
    )
    assert found is WITHIN


@given(st.floats(-100.0, 100.0), st.floats(0.0, 30.0), st.floats(-50.0, 0.0), st.floats(0.0, 50.0))
def test_proof_agrees_with_probability(value, uncertainty, least, greatest):
    decision = decide(
        value=value,
        expanded_uncertainty=COVERAGE_FACTOR * max(uncertainty, 0.1),
        least=least,
        greatest=greatest,
        resolution=1e-6,
    )
    probability = conformance_probability(
        value=value, standard_uncertainty=max(uncertainty, 0.1), least=least, greatest=greatest
    )
    if decision is WITHIN:
        assert probability > 0.95
    if decision is OUTSIDE:
        assert probability < 0.03


@given(st.floats(-100.0, 100.0), st.floats(0.0, 30.0), st.floats(0.0, 30.0))
def test_knowing_less_never_turns_one_proof_into_the_other(value, uncertainty, more):
    def decided(with_uncertainty):
        return decide(
            value=value,
            expanded_uncertainty=with_uncertainty,
            least=-20.0,
            greatest=20.0,
            resolution=1e-6,
        )

    assert decided(uncertainty + more) in (decided(uncertainty), UNCLEAR)


GOOD = {"value": 1.0, "least": 0.0, "greatest": 2.0}


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("value", math.nan),
        ("value", math.inf),
        ("standard_uncertainty", 0.0),
        ("least", 2.1),
        ("least", math.nan),
        ("least", math.inf),
    ],
)
def test_a_probability_is_refused_by_name(field, value):
    with pytest.raises(OutOfRangeError, match=field):
        conformance_probability(**{**GOOD, "standard_uncertainty": 0.1, field: value})


@pytest.mark.parametrize(
    ("field", "value"),
    [("value", math.nan), ("expanded_uncertainty", -0.1), ("resolution", 0.0), ("least", 2.1)],
)
def test_a_decision_is_refused_by_name(field, value):
    with pytest.raises(OutOfRangeError, match=field):
        decide(**{**GOOD, "expanded_uncertainty": 0.1, "resolution": 0.01, field: value})


def test_independent_uncertainties_add_as_squares():
    # By hand: 4 + 9 + 36 = 49.
    assert combined_uncertainty(components=[2.0, 3.0, 6.0]) == printed("7.000")
    assert combined_uncertainty(components=[]) == 0.0
    with pytest.raises(OutOfRangeError, match="components"):
        combined_uncertainty(components=[2.0, -3.0])


@given(st.lists(st.floats(-1e3, 1e3), min_size=2, max_size=12))
def test_the_uncertainty_of_a_mean_is_the_library_s_standard_error(readings):
    assert uncertainty_of_mean(readings=readings) == pytest.approx(
        float(stats.sem(readings)), rel=1e-9, abs=1e-12
    )


@pytest.mark.parametrize("readings", [[], [1.0], [1.0, math.nan]])
def test_too_few_readings_have_no_spread(readings):
    with pytest.raises(OutOfRangeError, match="readings"):
        uncertainty_of_mean(readings=readings)
