import msgspec
import pytest

from app.presenters.plan import PlanPresenter
from app.presenters.plan_lacks import lacks_of
from reports.sheet.pictures import PartState
from sample_data.load import compressor, pump
from tests.app.open_shop import COMPRESSOR


@pytest.fixture
def plan(shop):
    presenter = PlanPresenter(shop.presenter)
    shop.open(COMPRESSOR)
    return presenter


def test_without_a_job_it_says_where_to_choose_one(empty_shop):
    presenter = PlanPresenter(empty_shop.presenter)
    empty_shop.open()

    assert presenter.plan is None
    assert presenter.empty_words == "No job lies on the desks. Choose one at the Jobs desk."


def test_a_step_shows_its_land_its_limits_and_where_they_come_from(plan):
    row = plan.steps[0]
    item = compressor().plan.steps[0].items[0]

    assert row.number == "1"
    assert row.part == "Impeller, first stage\nhot, from the free end"
    assert row.interference == "0.0060 in to\n0.0090 in"
    assert row.change == "0.0010 in TIR"
    assert item.lands[0].least_interference.origin.words in row.origins
    assert row.signs == "hold: inspector, fit and runout before the next part"


def test_every_step_has_a_row_and_is_numbered_once(plan):
    numbers = [row.number for row in plan.steps if row.number]

    assert numbers == [str(number) for number in range(1, 16)]


def test_stations_lie_in_order_along_the_rotor(plan):
    order = [row.key for row in plan.stations]
    stations = compressor().plan.stations

    assert order == [one.key for one in sorted(stations, key=lambda one: one.position.si)]


def test_a_station_says_from_when_until_when_it_can_be_read(plan):
    reach = {row.key: row.reach for row in plan.stations}

    assert reach["J1"] == "from the bare shaft to the end"
    assert reach["K3"] == "from the bare shaft until step 3 goes on"
    assert reach["E1"] == "from step 2 to the end"


def test_the_method_names_everybody_of_the_job_with_their_role(plan):
    people = [(row.what, row.words.split(",")[0]) for row in plan.method]

    assert ("inspector", "Brona Quillfeather") in people
    assert ("witness", "Ephraim Saltcote") in people


def test_the_step_that_is_looked_at_stands_out_in_the_drawing(plan):
    picture = plan.picture("impeller-2")
    outstanding = [one.key for one in picture.parts if one.state is PartState.CURRENT]

    assert outstanding == [one.key for one in compressor().plan.step("impeller-2").items]
    assert all(one.state is not PartState.TO_COME for one in picture.parts)


def without(plan, step, **left_out):
    items = tuple(msgspec.structs.replace(one, **left_out) for one in plan.step(step).items)
    steps = tuple(
        msgspec.structs.replace(one, items=items) if one.key == step else one for one in plan.steps
    )
    return msgspec.structs.replace(plan, steps=steps)


def lack(plan, missing):
    return next((row for row in lacks_of(plan) if row.missing == missing), None)


@pytest.mark.parametrize(
    ("field", "missing", "so"),
    [
        ("material", "material", "fit, heat and strength not judged"),
        ("highest_temperature", "highest temperature", "heat not judged"),
        ("mounting_clearance", "clearance while mounting", "heat target not worked out"),
    ],
)
def test_what_an_item_leaves_out_is_named_with_its_step_and_what_is_not_judged(field, missing, so):
    whole = compressor().plan
    row = lack(without(whole, "impeller-2", **{field: None}), missing)

    assert lack(whole, missing) is None
    assert row.where == "step 3, Impeller, second stage"
    assert row.so == so


def test_a_missing_limit_of_change_is_named():
    plan = compressor().plan
    steps = (msgspec.structs.replace(plan.steps[0], change_limit=None), *plan.steps[1:])
    row = lack(msgspec.structs.replace(plan, steps=steps), "limit of change")

    assert (row.where, row.so) == (
        "step 1, Impeller, first stage",
        "what the mount moved not judged",
    )


def test_many_steps_are_named_in_runs_of_their_numbers():
    # By hand: the plan of the compressor has lands at every step but 14, the nut.
    assert lack(compressor().plan, "yield strength").where == "steps 1 to 13, 15"


def test_a_rotor_without_trip_speed_says_so():
    rotor = msgspec.structs.replace(pump().plan.rotor, trip_speed=None)
    row = lack(msgspec.structs.replace(pump().plan, rotor=rotor), "trip speed")

    assert (row.where, row.so) == ("the whole rotor", "grip at speed not judged")
