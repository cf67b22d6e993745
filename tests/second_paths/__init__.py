"""Other ways to the same number; nothing here imports or shares a formula with models."""
