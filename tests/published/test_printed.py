import pytest
from hypothesis import given
from hypothesis import strategies as st

from tests.published.printed import printed


@pytest.mark.parametrize(
    ("value", "text", "unit", "accepted"),
    [
        (12.649, "12.6", 1.0, True),
        (12.651, "12.6", 1.0, False),
        (12.549, "12.6", 1.0, False),
        (2149.0, "2.1e3", 1.0, True),
        (2151.0, "2.1e3", 1.0, False),
        (2100.6, "2100", 1.0, False),
        (-13.7004e-3, "-13.700", 1e-3, True),
        (0.0, "0", 1e-6, True),
        (0.6e-6, "0", 1e-6, False),
    ],
)
def test_a_number_is_accepted_when_it_rounds_to_the_printed_digits(value, text, unit, accepted):
    assert (value == printed(text, unit)) is accepted


@given(st.decimals(min_value=-1000, max_value=1000, places=3))
def test_the_printed_number_itself_is_accepted(number):
    assert float(number) == printed(str(number))


def test_text_that_is_no_number_is_refused():
    with pytest.raises(ArithmeticError):
        printed("twelve")
