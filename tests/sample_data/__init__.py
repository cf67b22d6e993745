"""Tests of the pure functions: published tables, limits, second paths, properties."""
