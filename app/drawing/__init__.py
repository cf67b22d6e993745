"""Paints a sheet's display list on the screen and lets its marks explain themselves."""
