"""Judgements on plain facts: every rule, in the order people read them."""

from models.rules import (
    acceptance,
    balance,
    blunders,
    cold,
    draw_up,
    fit,
    heat,
    holding,
    mount,
    people,
    record,
    runout,
    sizes,
    strength,
)
from models.rules.rule import Rule

__all__ = ["ALL_RULES", "rule"]

ALL_RULES: tuple[Rule, ...] = (
    *sizes.RULES,
    *fit.RULES,
    *strength.RULES,
    *holding.SHAFT_RULES,
    *heat.RULES,
    *draw_up.RULES,
    *mount.RULES,
    *cold.RULES,
    *runout.RULES,
    *blunders.RULES,
    *balance.RULES,
    *acceptance.RULES,
    *people.RULES,
    *record.RULES,
)


def rule(rule_id: str) -> Rule:
    """Find a rule by its id."""
    return next(one for one in ALL_RULES if one.id == rule_id)
