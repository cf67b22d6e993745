"""Colours, type and sizes of the window."""
