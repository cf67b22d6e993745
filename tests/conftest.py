"""What all tests share: examples that are the same on every run, and a screen that is none."""

import os
from collections.abc import Iterator

import pytest
from hypothesis import settings

# A run that fails must fail again: the whole set, by its marker, draws fresh examples.
settings.register_profile("same", derandomize=True, deadline=None)
settings.register_profile("fresh", deadline=None, max_examples=1000)
settings.load_profile(os.environ.get("HYPOTHESIS_PROFILE", "same"))


@pytest.fixture(autouse=True, scope="session")
def no_home_of_the_users(tmp_path_factory: pytest.TempPathFactory) -> Iterator[None]:
    """Keep settings and shop secrets of tests away from whoever runs them."""
    kept = os.environ.get("XDG_CONFIG_HOME")
    os.environ["XDG_CONFIG_HOME"] = str(tmp_path_factory.mktemp("config"))
    yield
    if kept is None:
        del os.environ["XDG_CONFIG_HOME"]
    else:
        os.environ["XDG_CONFIG_HOME"] = kept
