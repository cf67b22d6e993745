"""Judgements on plain facts."""
