from collections.abc import Iterator
from pathlib import Path

import pytest

from models.record.store import Store


@pytest.fixture
def store(tmp_path: Path) -> Iterator[Store]:
    with Store.open(tmp_path, station_name="stand 1") as opened:
        yield opened
