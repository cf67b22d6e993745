"""Every number that a job's calculations give, as rows that open to inputs, formula and source."""

import re
from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

from app.presenters.reasons import Reason, written
from app.worked_out import worked_out
from models.assess import Assessment
from models.handbook import Kind, entry, formulas_of
from models.job import Plan
from models.units import UnitSet, unit_set

__all__ = ["WorkedRow", "worked_rows"]

_NAMED = re.compile(r"(?P<name>.+) \[(?P<unit>[^\]]*)\]\Z")
# Groups that are words and lists of what is missing, not numbers.
_SKIPPED = ("in words", "lacks")


@dataclass(frozen=True, kw_only=True)
class WorkedRow:
    """One number: where it belongs, what it is, and what stands behind it."""

    where: str
    what: str
    value: str
    reasons: tuple[Reason, ...]


def worked_rows(view: Assessment) -> tuple[WorkedRow, ...]:
    """List all numbers worked out, the rotor's first, then attempt by attempt.

    Parameters
    ----------
    view : Assessment
        The job as it was worked out.

    Returns
    -------
    tuple of WorkedRow
        In the order in which the command line gives them.
    """
    units = unit_set(view.job.plan.rotor.units)
    return tuple(_rows(worked_out(view), "", units, view.job.plan))


def _rows(found: Any, where: str, units: UnitSet, plan: Plan) -> Iterator[WorkedRow]:  # noqa: ANN401
    if isinstance(found, list):
        for one in found:
            yield from _rows(one, where, units, plan)
        return
    if not isinstance(found, dict):
        return
    here = _place(found, where, plan)
    beside = {name: value for name, value in found.items() if isinstance(value, str)}
    for name, value in found.items():
        if name in _SKIPPED:
            continue
        if isinstance(value, dict | list):
            inner = here if name in ("rotor", "attempts", "items", "lands") else f"{here}, {name}"
            yield from _rows(value, inner.removeprefix(", "), units, plan)
            continue
        named = _NAMED.match(name)
        if named is not None and value is not None:
            yield WorkedRow(
                where=here or "the rotor",
                what=named["name"].replace("_", " "),
                value=written(value, named["unit"], units),
                reasons=_behind(named["name"], named["unit"], float(value), beside),
            )


def _place(found: dict[str, Any], where: str, plan: Plan) -> str:
    parts = [where] if where else []
    if "attempt" in found and "step" in found:
        step = plan.step(found["step"])
        parts = [f"step {plan.step_number(step.key)}, {step.title}, attempt {found['attempt']}"]
    items = {item.key: item.name for step in plan.steps for item in step.items}
    if isinstance(found.get("item"), str):
        parts.append(items.get(found["item"], found["item"]))
    if isinstance(found.get("land"), str):
        parts.append(f"land {found['land']}")
    if isinstance(found.get("at"), str):
        parts.append(f"at {found['at']} speed")
    if isinstance(found.get("reason"), str):
        parts.append(found["reason"])
    return ", ".join(dict.fromkeys(part for part in parts if part))


def _behind(name: str, unit: str, value: float, beside: dict[str, str]) -> tuple[Reason, ...]:
    """Open a number: formula, what it takes, its range and its sources."""
    told: list[Reason] = [("in SI units", f"{value:.6g} {unit}".removesuffix(" -"))]
    told += [
        (label.replace("_", " "), text)
        for label, text in beside.items()
        if "source" in label or label == "smoothing"
    ]
    formulas = formulas_of(name)
    if not formulas:
        told.append(("comes from", "read, or set by the plan; no formula stands behind it"))
    for index, formula in enumerate(formulas):
        page = entry(formula)
        told.append(("formula" if index == 0 else "and", f"{formula}: {page.statement}"))
        if page.kind is not Kind.FORMULA or index > 0:
            continue
        told += [("written out", line) for line in page.formulas]
        told += [
            ("takes", f"{one.words} [{one.unit}]" if one.unit else one.words) for one in page.takes
        ]
        told += [("holds", line) for line in page.holds]
        told += [("source", line) for line in page.sources]
    told.append(("handbook", "its desk has the ranges, tests and second paths of each formula"))
    return tuple(told)
