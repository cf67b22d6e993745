"""What a verdict rests on, in words: inputs with their units, statement, source, origin."""

from dataclasses import fields

from models.handbook import formulas_behind
from models.rules.rule import Finding, Rule, Value, words_for
from models.units import UnitSet, number_text

__all__ = ["Reason", "handbook_words", "reasons_of", "written"]

Reason = tuple[str, str]
"""What it is, and what it says."""

_SMALL_LENGTH = 2e-3


def reasons_of(finding: Finding, units: UnitSet) -> tuple[Reason, ...]:
    """Lay open what a finding rests on.

    Parameters
    ----------
    finding : Finding
        The finding.
    units : UnitSet
        How the job writes its numbers.

    Returns
    -------
    tuple of Reason
        The rule's statement, each input, what was worked out, the limit's origin, the source.
    """
    rule = finding.rule
    unit_of = {one.name: str(one.metadata.get("unit", "-")) for one in fields(rule.facts)}
    told: list[Reason] = [("rule", rule.statement)]
    for name, value in finding.inputs.items():
        words = words_for(rule.facts, name)
        told.append((words, written(value, unit_of.get(name, "-"), units)))
    for name, number in finding.computed.items():
        told.append((name.replace("_", " "), number_text(float(number), 6)))
    if finding.limit_origin:
        told.append(("limit from", finding.limit_origin))
    told.append(("source of the rule", rule.source))
    told.append(("judged by", f"{rule.id}, edition {rule.edition}"))
    formulas = formulas_behind(rule)
    if formulas:
        told.append(("formulas", ", ".join(formulas)))
    told.append(("handbook", "Ctrl+H opens its page, with ranges and tests"))
    return tuple(told)


def handbook_words(rule: Rule) -> str:
    """Say where a rule's page is, and which formulas stand behind its numbers.

    Parameters
    ----------
    rule : Rule
        The rule.

    Returns
    -------
    str
        One line.
    """
    formulas = formulas_behind(rule)
    told = f"; formulas: {', '.join(formulas)}" if formulas else ""
    return f"Handbook (Ctrl+H): {rule.id}, edition {rule.edition}{told}"


def written(value: Value, unit: str, units: UnitSet) -> str:
    """Write a value of SI units as the job writes it, the other units beside.

    Parameters
    ----------
    value : float, str, bool or None
        What is written.
    unit : str
        Its SI unit; a dash for none.
    units : UnitSet
        How the job writes its numbers.

    Returns
    -------
    str
        In words.
    """
    if value is None:
        return "not known"
    if isinstance(value, bool):
        return "yes" if value else "no"
    if isinstance(value, str):
        return value or "none"
    number = float(value)
    if unit == "m":
        use = "runout" if abs(number) < _SMALL_LENGTH else "diameter"
        return units.both(number, use)
    ways = {"°C": "temperature", "K": "temperature_step", "Pa": "pressure", "°": "angle"}
    ways |= {"N·m": "torque", "rad/s": "speed", "N": "force", "kg": "mass", "kg·m": "unbalance"}
    if unit in ways:
        return units.both(number, ways[unit])
    return f"{number:g}" if unit in ("-", "") else f"{number:g} {unit}"
