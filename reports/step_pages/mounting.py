"""How a part was heated and came to rest, attempt beside attempt."""

from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable

from models.assess import Attempt, ItemView
from models.job import Item, Job
from models.units import unit_set
from reports.front_pages import shown_time
from reports.parts import Cell, head, words
from reports.step_pages.drawing_up import draw_up_rows
from reports.step_pages.judged import judged_rows
from reports.step_pages.sizes import columns

__all__ = ["on_the_shaft"]


def on_the_shaft(
    job: Job, item: Item, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> Iterator[Flowable]:
    """Give an item's heat, opening and mount in one table, a column for each attempt."""
    rows: list[tuple[str, list[Cell]]] = []
    if any(one.heat is not None for one in views):
        rows += _heat_rows(job, pair, views)
    if any(one.drawn_up is not None for one in views):
        rows += draw_up_rows(job, pair, views)
    rows += _mount_rows(pair, views)
    hot = item.kind == "hot"
    yield head(
        "Heat, opening and mount" if hot else f"Mount, {item.name}",
        "what was measured at the part, not the furnace's set point" if hot else "",
    )
    yield columns(pair, rows)


def _heat_rows(
    job: Job, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> list[tuple[str, list[Cell]]]:
    both = list(zip(pair, views, strict=True))
    return [
        ("bore must reach", [_target(job, one) for one in views]),
        ("measured", [_measured(job, one) for one in views]),
        ("heated in", [_method(one) for one in views]),
        ("hot-bore gauge", [_gauge(one) for one in views]),
        ("opening", [judged_rows(one.of("bore-open", view.item.key)) for one, view in both]),
        (
            "confirmed",
            [
                judged_rows(
                    one.of("confirmed-before-furnace", view.item.key)
                    + one.of("confirmed-before-door", view.item.key)
                )
                for one, view in both
            ],
        ),
        ("drop window", [_window(one) for one in views]),
    ]


def _target(job: Job, view: ItemView) -> str:
    units = unit_set(job.plan.rotor.units)
    heat = view.heat
    if heat is None or heat.target is None or heat.plain_target is None:
        return "–"
    unsure = ""
    if heat.target_uncertainty is not None:
        step = units.show(heat.target_uncertainty, "temperature_step")
        unsure = f"; the sizes leave ± {step} of it open"
    return (
        f"{units.both(heat.target, 'temperature')}; "
        f"{units.show(heat.plain_target, 'temperature')} without the steel's margin{unsure}"
    )


def _measured(job: Job, view: ItemView) -> str:
    units = unit_set(job.plan.rotor.units)
    heat = view.heat
    if heat is None or heat.coldest_bore is None or heat.hottest is None:
        return "–"
    allowed = "" if heat.highest is None else f"; {units.show(heat.highest, 'temperature')} allowed"
    return (
        f"bore {units.both(heat.coldest_bore, 'temperature')} at least, hottest place "
        f"{units.show(heat.hottest, 'temperature')}{allowed}"
    )


def _method(view: ItemView) -> str:
    heating = view.heat.heating if view.heat else None
    if heating is None:
        return "–"
    set_point = f", set point {heating.set_point.written}" if heating.set_point else ""
    return words(f"{heating.method}{set_point}, {heating.instrument or 'no thermometer named'}")


def _gauge(view: ItemView) -> str:
    heating = view.heat.heating if view.heat else None
    if heating is None or not heating.gauge:
        return "not offered"
    return "<br/>".join(
        words(
            f"land {one.land}, {one.size.written}: "
            f"{'entered' if one.passed else 'did not enter'}, {one.at[11:16]}"
        )
        for one in heating.gauge
    )


def _window(view: ItemView) -> str:
    window = view.heat.window if view.heat else None
    if window is None:
        return "–"
    return (
        f"at least {_minutes(window.in_air_least)} in air, {_minutes(window.over_seat_least)} over "
        "the seat"
    )


def _minutes(seconds: float) -> str:
    if seconds >= 3600.0:
        return "an hour"
    return f"{int(seconds // 60)}:{int(seconds % 60):02d}"


def _mount_rows(pair: Sequence[Attempt], views: Sequence[ItemView]) -> list[tuple[str, list[Cell]]]:
    both = list(zip(pair, views, strict=True))
    rows: list[tuple[str, list[Cell]]] = [
        ("seated", [_seated(one) for one in views]),
    ]
    if any(view.drawn_up is None for view in views):
        judged = [judged_rows(one.of("part-seated", view.item.key)) for one, view in both]
        rows.append(("shoulder", judged))
    if any(view.item.axial for view in views):
        rows.append(
            (
                "axial position",
                [judged_rows(one.of("axial-position-right", view.item.key)) for one, view in both],
            )
        )
    return rows


def _seated(view: ItemView) -> str:
    mount = view.mount
    if mount is None:
        return "not yet"
    opened = f", door {mount.door_opened_at[11:16]}" if mount.door_opened_at else ""
    seated = mount.seated_at or mount.done_at
    return words(f"{mount.outcome} {shown_time(seated)}{opened}")
