"""How hot a part may be, and how cold a shaft may be made."""

import pytest
from hypothesis import given
from hypothesis import strategies as st
from numpy.polynomial import Polynomial as Series

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import diameter_at, mean_of_instantaneous
from models.engineering.heat_limits import chilled_diameter, highest_temperature, thermometer_span
from tests.published.heating import TRUNNIONS, Trunnion
from tests.published.printed import printed

INCH = 0.0254


def chilled(**changed: object) -> float:
    usual: dict[str, object] = {
        "diameter": 0.150,
        "temperature": -60.0,
        "expansion": lambda temperature: 11e-6,
        "lowest_temperature": -80.0,
        "bare_shaft": True,
        "procedure_released": True,
    }
    return chilled_diameter(**(usual | changed))  # type: ignore[arg-type]


@pytest.mark.parametrize("row", TRUNNIONS, ids=lambda row: row.case)
def test_contraction_of_a_chilled_trunnion_agrees_with_its_source(row: Trunnion) -> None:
    polynomial = Series(row.coefficients)

    def mean(temperature: float) -> float:
        return mean_of_instantaneous(
            instantaneous=lambda at: float(polynomial(at * 1.8 + 32.0)) * 1.8,
            temperature=temperature,
        )

    warm = diameter_at(diameter=12.363 * INCH, temperature=48.0 / 1.8, expansion=mean)
    cold = chilled(
        diameter=12.363 * INCH,
        temperature=-140.0 / 1.8,
        expansion=mean,
    )
    assert warm - cold == printed(row.contraction_inches, INCH), row.source


def test_a_seat_at_20_degrees_is_as_large_as_measured() -> None:
    assert chilled(temperature=20.0) == 0.150


@given(temperature=st.floats(-80.0, 19.0), colder=st.floats(0.0, 50.0))
def test_the_colder_the_seat_the_smaller(temperature: float, colder: float) -> None:
    lower = max(temperature - colder, -80.0)
    assert chilled(temperature=lower) <= chilled(temperature=temperature)


@pytest.mark.parametrize(
    ("changed", "name"),
    [
        ({"bare_shaft": False}, "bare_shaft"),
        ({"procedure_released": False}, "procedure_released"),
        ({"temperature": 25.0}, "temperature"),
        ({"temperature": -81.0}, "temperature"),
        ({"diameter": 0.0}, "diameter"),
    ],
    ids=str,
)
def test_chilling_outside_its_conditions_is_refused_by_name(
    changed: dict[str, object], name: str
) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        chilled(**changed)


@pytest.mark.parametrize(
    ("plan", "tempering", "expected"),
    [(None, 550.0, 500.0), (315.0, 550.0, 315.0), (315.0, None, 315.0), (None, None, None)],
    ids=["tempering less margin", "the plan goes first", "plan alone", "nothing known"],
)
def test_the_highest_temperature_has_a_source_or_is_not_judged(
    plan: float | None, tempering: float | None, expected: float | None
) -> None:
    allowed = highest_temperature(
        plan_limit=plan, tempering_temperature=tempering, tempering_margin=50.0
    )
    assert allowed == expected


def test_a_negative_margin_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match="tempering_margin"):
        highest_temperature(plan_limit=None, tempering_temperature=550.0, tempering_margin=-1.0)


def test_a_perfect_thermometer_may_read_anything_between_target_and_limit() -> None:
    span = thermometer_span(target=200.0, highest=300.0, thermometer_uncertainty=0.0)
    assert (span.least_reading, span.greatest_reading, span.width) == (200.0, 300.0, 100.0)


def test_a_target_above_the_limit_leaves_no_reading() -> None:
    assert thermometer_span(target=320.0, highest=300.0, thermometer_uncertainty=5.0).width == -30.0


@given(
    target=st.floats(50.0, 300.0),
    width=st.floats(0.0, 100.0),
    uncertainty=st.floats(0.0, 20.0),
    error=st.floats(-1.0, 1.0),
)
def test_every_reading_in_the_span_proves_both_whatever_the_thermometer_is_off(
    target: float, width: float, uncertainty: float, error: float
) -> None:
    span = thermometer_span(
        target=target, highest=target + width, thermometer_uncertainty=uncertainty
    )
    if span.width >= 0.0:
        assert span.least_reading + error * uncertainty >= target - 1e-9
        assert span.greatest_reading + error * uncertainty <= target + width + 1e-9
    else:
        assert 2.0 * uncertainty > width - 1e-9


def test_a_negative_uncertainty_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match="thermometer_uncertainty"):
        thermometer_span(target=200.0, highest=300.0, thermometer_uncertainty=-1.0)
