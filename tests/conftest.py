"""What all tests share: examples that are the same on every run, and a screen that is none."""

import os

from hypothesis import settings

# A run that fails must fail again: the whole set, by its marker, draws fresh examples.
settings.register_profile("same", derandomize=True, deadline=None)
settings.register_profile("fresh", deadline=None, max_examples=1000)
settings.load_profile(os.environ.get("HYPOTHESIS_PROFILE", "same"))
