"""The usual cautions of the work, stated once where they apply; local rules go before them."""

from models.rules.progress import Act

__all__ = ["cautions_for"]

_RULES = "The shop's own rules, local codes and licensed practice go before this page."
_LIFT = "Lift by its own eyes with rated gear; nobody stands under it or in its way."
_HOT = "Hot part: gloves, face shield, long sleeves; nothing that burns or evaporates nearby."
_TURN = "The rotor turns: no loose clothing, no hands near the supports."

_BY_ACT: dict[Act, tuple[str, ...]] = {
    Act.CONFIRM_FURNACE: (_LIFT, _RULES),
    Act.HEAT: (_HOT, _RULES),
    Act.CONFIRM_DOOR: (_HOT, _LIFT, _RULES),
    Act.MOUNT: (
        _HOT,
        "Eyes on the load, one unbroken motion. No hammer, no torch, no pull beyond its weight.",
        _RULES,
    ),
    Act.DRAW_UP: (
        "Oil at very high pressure: nobody on the axis of the hub, the nut left on with a gap, "
        "gauges and hoses rated and looked at first; no hand near a leak.",
        "Stop if the pressure rises and the hub does not move, or drops while it does.",
        _RULES,
    ),
    Act.COOL: ("The rotor is hot: measure without leaning on it.", _TURN, _RULES),
    Act.SURVEY: (_TURN, _RULES),
    Act.SURVEY_BARE_SHAFT: (_TURN, _RULES),
    Act.SURVEY_SEAT: (_TURN, _RULES),
    Act.BALANCE: (
        "The rotor turns at speed: guards closed, nobody in the plane of the parts, weights "
        "secured before each start.",
        _LIFT,
        _RULES,
    ),
    Act.REMOVE: (
        "It may let go suddenly: stand clear along the shaft, keep it held by its own weight only.",
        _HOT,
        _RULES,
    ),
}


def cautions_for(act: Act) -> tuple[str, ...]:
    """Give the cautions of an act; most acts have none."""
    return _BY_ACT.get(act, ())
