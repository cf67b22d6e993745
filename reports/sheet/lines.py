"""Which line says what, after ISO 128-2, in one table for every drawing."""

from __future__ import annotations

from reports.palette import Colour
from reports.sheet.elements import Dash, Stroke
from reports.sheet.medium import LineWidth

__all__ = [
    "ACTIVE_GUIDE",
    "AXIS",
    "CURVE_AFTER",
    "CURVE_BEFORE",
    "CURVE_EARLIER",
    "GUIDE",
    "HATCHING",
    "HATCHING_CURRENT",
    "HIDDEN",
    "LIMIT",
    "LIMIT_ACTIVE",
    "NOT_MEASURED",
    "OUTLINE",
    "OUTLINE_CURRENT",
    "SEEN_EDGE",
    "TO_COME",
    "VALUE_LIMIT",
]

OUTLINE = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
"""Shaft, and parts that are on."""

OUTLINE_CURRENT = Stroke(Dash.CONTINUOUS, LineWidth.CURRENT, Colour.ACCENT)
"""The part in hand."""

SEEN_EDGE = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.INK)
"""Edges seen on a body, leaders, stations, scale bars."""

HATCHING = Stroke(Dash.CONTINUOUS, LineWidth.HATCH, Colour.INK2)
"""Cut areas of parts that are on."""

HATCHING_CURRENT = Stroke(Dash.CONTINUOUS, LineWidth.HATCH, Colour.ACCENT)
"""Cut areas of the part in hand."""

HIDDEN = Stroke(Dash.DASHED, LineWidth.NARROW, Colour.INK2)
"""The bore of a hollow shaft."""

TO_COME = Stroke(Dash.DOUBLE_CHAIN, LineWidth.NARROW, Colour.INK2)
"""Parts to come, and the place where a lifted part will sit."""

AXIS = Stroke(Dash.CHAIN, LineWidth.NARROW, Colour.INK)
"""Axis of rotation; place of a bend."""

GUIDE = Stroke(Dash.CONTINUOUS, LineWidth.GUIDE, Colour.HAIR)
"""Zero lines and station guides, on which nothing depends."""

ACTIVE_GUIDE = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.ACCENT)
"""The station being read."""

CURVE_BEFORE = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.BEFORE)
"""The state before the mount."""

CURVE_EARLIER = Stroke(Dash.DASHED, LineWidth.NARROW, Colour.INK2)
"""An earlier attempt."""

CURVE_AFTER = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
"""The state after the mount."""

LIMIT = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.INK)
"""Limit circles."""

LIMIT_ACTIVE = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.ACCENT)
"""The limit circle of the station being read."""

VALUE_LIMIT = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
"""Limits on a figure of values against limits."""

NOT_MEASURED = Stroke(Dash.SHORT, LineWidth.NARROW, Colour.BEFORE)
"""A limit circle whose station is not measured yet; a verdict not judged."""
