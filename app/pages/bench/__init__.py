"""The technician's desk: one thing to do now, with the rotor above and the verdict beside it."""
