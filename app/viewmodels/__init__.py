"""Qt item models over frozen rows."""
