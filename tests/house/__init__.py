"""The house keeps itself: floors, docstrings, documents."""
