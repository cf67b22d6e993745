"""What the command line gives beyond verdicts: numbers in SI that a person can check by hand."""

import json
import math
from typing import Any

import pytest

from app.findings_text import as_data
from models.assess import assess, lacks
from models.job import Job
from sample_data.load import compressor, pump

JOBS = {"pump": pump(), "compressor": compressor()}


def told(job: Job) -> dict[str, Any]:
    """Give what a reader of the printed JSON gets, from a strict writer."""
    text = json.dumps(as_data(assess(job)), allow_nan=False)
    found: dict[str, Any] = json.loads(text)["worked_out"]
    return found


TOLD = {name: told(job) for name, job in JOBS.items()}


def item_of(name: str, key: str, attempt: int = 1) -> dict[str, Any]:
    return next(
        item
        for one in TOLD[name]["attempts"]
        for item in one["items"]
        if (item["item"], one["attempt"]) == (key, attempt)
    )


@pytest.mark.parametrize("name", JOBS)
def test_every_attempt_and_item_is_there(name: str) -> None:
    view = assess(JOBS[name])

    assert [
        (one["step"], one["attempt"], [item["item"] for item in one["items"]])
        for one in TOLD[name]["attempts"]
    ] == [
        (one.step.key, one.number, [item.item.key for item in one.items]) for one in view.attempts
    ]
    assert TOLD[name]["lacks"] == list(lacks(JOBS[name]))


def test_a_fit_of_the_pump_can_be_checked_by_hand() -> None:
    drum = item_of("pump", "drum")
    first = drum["lands"][0]
    interference = first["least_interference [m]"]

    # Drum and shaft of one steel: p = E·Δ/(2·d)·(1 − d²/D²) with 210 GPa, 80 and 165 mm.
    by_hand = 210e9 * interference / (2 * 0.080) * (1 - (80 / 165) ** 2)
    assert first["least_pressure [Pa]"] == pytest.approx(by_hand, rel=1e-4)
    # T = Σ μ·π·d²·L·p/2 over two lands of 40 mm, 80.0 and 79.9 mm, friction 0.12.
    torque = sum(
        0.12 * math.pi * diameter**2 * 0.040 * land["least_pressure [Pa]"] / 2
        for diameter, land in zip((0.080, 0.0799), drum["lands"], strict=True)
    )
    assert drum["holding_torque [N·m]"] == pytest.approx(torque, rel=1e-4)
    # σ = p·(D² + d²)/(D² − d²) at the bore.
    hoop = first["greatest_pressure [Pa]"] * (165**2 + 80**2) / (165**2 - 80**2)
    assert first["hoop_stress_at_bore [Pa]"] == pytest.approx(hoop, rel=1e-4)


def test_a_wheel_tells_the_torque_it_must_carry() -> None:
    wheel = item_of("pump", "impeller-1")

    # 900 kW at 2980 r/min on eight wheels: 900e3/(2980·π/30)/8 = 360.50 N·m, by hand.
    assert wheel["torque_to_carry [N·m]"] == pytest.approx(360.50, abs=0.005)
    assert wheel["holding_factor [-]"] == pytest.approx(
        wheel["holding_torque [N·m]"] / wheel["torque_to_carry [N·m]"], rel=1e-4
    )


def test_release_is_an_estimate_until_the_designer_speaks() -> None:
    land = item_of("compressor", "impeller-1")["lands"][0]

    assert land["release_speed_by_designer [rad/s]"] is None
    low = land["release_speed_as_whole_disc [rad/s]"]
    assert 0 < low < land["release_speed_as_hub_alone [rad/s]"]
    assert [one["at"] for one in land["at_speed"]] == ["maximum continuous", "trip"]


def test_what_is_known_only_of_measured_parts_is_left_out_of_the_others() -> None:
    sleeve = item_of("pump", "sleeve-1")

    assert sleeve == {"item": "sleeve-1", "lands": []}


def test_the_bad_mount_tells_its_seat_and_its_unbalance() -> None:
    bad = next(
        one for one in TOLD["compressor"]["attempts"]
        if (one["step"], one["attempt"]) == ("impeller-2", 1)
    )["bend"]  # fmt: skip

    assert bad["seat"]["item"] == "impeller-2"
    assert bad["seat"]["just_mounted"] is True
    assert bad["unbalance_of_rotor"]["over_what_may_remain [-]"] > 1.0


def test_every_number_names_its_unit_and_every_text_does_not() -> None:
    def walk(value: Any, name: str = "") -> None:
        if isinstance(value, dict):
            for key, part in value.items():
                walk(part, key)
        elif isinstance(value, list):
            for part in value:
                walk(part, name)
        elif isinstance(value, bool | str):
            assert not name.endswith("]"), name
        elif value is not None and name != "attempt":
            assert name.endswith("]"), name

    for one in TOLD.values():
        walk(one)
