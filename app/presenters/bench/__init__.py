"""The technician's bench: one thing to do now, from the record alone."""
