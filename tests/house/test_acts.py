"""Every kind of act that the program has is among those that are killed half-way."""

from tests.record.survival.cases import CASES
from tests.record.survival.key_cases import MADE_OF_SEVERAL
from tests.record.survival.live_code import kinds_of_acts


def test_every_kind_of_act_has_a_case_of_survival() -> None:
    lacking = kinds_of_acts() - CASES.keys() - MADE_OF_SEVERAL

    assert lacking == set(), "add a case to tests/record/survival/cases.py"


def test_no_case_of_survival_is_left_over_from_an_act_that_went() -> None:
    assert CASES.keys() - kinds_of_acts() == set()
