"""Pure functions on SI numbers and arrays; imports nothing of ours outside this folder."""
