"""Numbers from outside the code, as printed, each with its source."""
