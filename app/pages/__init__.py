"""The desks: widgets that lay out and wire, and know nothing of the subject."""
