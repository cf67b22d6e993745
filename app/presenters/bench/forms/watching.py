"""The fields that take one reading of a station that is watched while the rotor cools."""

from app.presenters.bench.forms.form import Answers, Bench, choice, entry_head
from app.presenters.bench.state import Field
from models.job import StationWatched
from models.rules.progress import NextAct

__all__ = ["station_watched", "watch_fields"]


def watch_fields(bench: Bench, act: NextAct) -> tuple[Field, ...]:
    """Offer a reading of one station; the indicator stays where it is from reading to reading."""
    stations = bench.job.plan.stations_in_reach(act.step)
    earlier = [one for one in bench.job.entries if isinstance(one, StationWatched)]
    usual = earlier[-1].station if earlier else _middle(bench, act)
    return (
        choice("watched", "Station watched", tuple((one.key, one.name) for one in stations), usual),
        Field(
            "shown",
            "It shows",
            unit=bench.units.unit("runout"),
            use="runout",
            needed=False,
            hint="left at one mark, read now and then: it tells where the shaft will end",
        ),
    )


def _middle(bench: Bench, act: NextAct) -> str:
    """Offer the station that a thermal bow moves most: the one nearest to mid-span."""
    plan = bench.job.plan
    ends = [plan.station(key).position.si for key in (plan.first_journal, plan.second_journal)]
    middle = sum(ends) / 2.0
    stations = plan.stations_in_reach(act.step)
    return min(stations, key=lambda one: abs(one.position.si - middle)).key


def station_watched(bench: Bench, act: NextAct, answers: Answers) -> StationWatched | None:
    """Make the entry of what the indicator shows; None where nothing was typed."""
    if not answers.texts.get("shown", "").strip():
        return None
    indicators = bench.instruments("indicator")
    return StationWatched(
        **entry_head(bench),
        place=bench.place(act),
        station=answers.word("watched"),
        value=answers.length("shown", "runout"),
        instrument=indicators[0][0] if indicators else None,
    )
