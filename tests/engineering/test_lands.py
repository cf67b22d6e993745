from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.lands import Land, several_lands
from tests.published.printed import printed
from tests.second_paths.ring import Ring, press_together

STEEL = {
    "hub_modulus": 207e9,
    "shaft_modulus": 207e9,
    "hub_poisson": 0.3,
    "shaft_poisson": 0.3,
    "friction": 0.12,
}
NOSE = Land(
    interference=0.150e-3,
    interface_diameter=0.100,
    contact_length=0.030,
    hub_outer_diameter=0.160,
)
WEB = Land(
    interference=0.100e-3,
    interface_diameter=0.100,
    contact_length=0.040,
    hub_outer_diameter=0.400,
)


def test_two_lands_hold_the_sum_by_hand():
    # By hand: 207 GPa·0.0015/2·(1 - (100/160)²) and 207 GPa·0.001/2·(1 - (100/400)²), times
    # 0.12·π·100·30 and 0.12·π·100·40 mm².
    found = several_lands(lands=[NOSE, WEB], **STEEL)
    assert found.pressures == (printed("94.61", 1e6), printed("97.03", 1e6))
    assert found.force == printed("253.3", 1e3)
    assert found.torque == printed("12.67", 1e3)


def test_each_land_is_pressed_like_a_ring_of_finite_elements():
    found = several_lands(lands=[NOSE, WEB], **STEEL)
    for land, pressure in zip((NOSE, WEB), found.pressures, strict=True):
        solved = press_together(
            shaft=Ring(0.0, land.interface_diameter / 2.0, 207e9, 0.3),
            hub=Ring(land.interface_diameter / 2.0, land.hub_outer_diameter / 2.0, 207e9, 0.3),
            radial_interference=land.interference / 2.0,
        )
        assert pressure == pytest.approx(solved.pressure, rel=1e-6)


lands = st.builds(
    Land,
    interference=st.floats(-1e-4, 3e-4),
    interface_diameter=st.floats(0.05, 0.2),
    contact_length=st.floats(0.01, 0.2),
    hub_outer_diameter=st.floats(0.21, 0.6),
    shaft_bore_diameter=st.sampled_from([0.0, 0.02, 0.04]),
)


@given(lands, st.floats(0.1, 0.9))
def test_a_land_cut_in_two_holds_what_it_held_whole(land, share):
    whole = several_lands(lands=[land], **STEEL)
    cut = several_lands(
        lands=[
            replace(land, contact_length=share * land.contact_length),
            replace(land, contact_length=(1.0 - share) * land.contact_length),
        ],
        **STEEL,
    )
    assert cut.force == pytest.approx(whole.force, rel=1e-9)
    assert cut.torque == pytest.approx(whole.torque, rel=1e-9)


@given(st.lists(lands, min_size=1, max_size=5))
def test_the_order_of_lands_does_not_matter_and_clearance_adds_nothing(several):
    forward = several_lands(lands=several, **STEEL)
    backward = several_lands(lands=several[::-1], **STEEL)
    assert forward.pressures == backward.pressures[::-1]
    assert forward.torque == pytest.approx(backward.torque, rel=1e-9)
    loose = replace(NOSE, interference=-1e-5)
    assert several_lands(lands=[*several, loose], **STEEL).force == forward.force


@pytest.mark.parametrize(
    ("several", "change", "field"),
    [
        ([], {}, "lands"),
        ([NOSE], {"friction": 0.0}, "friction"),
        ([replace(NOSE, contact_length=0.0)], {}, "contact_length"),
        ([replace(NOSE, hub_outer_diameter=0.1)], {}, "hub_outer_diameter"),
    ],
)
def test_lands_that_cannot_be_are_refused_by_name(several, change, field):
    with pytest.raises(OutOfRangeError, match=field):
        several_lands(lands=several, **{**STEEL, **change})
