"""Nothing is forged unseen: plainly it is named; with all links made good, by what others hold."""

import shutil
from collections import Counter
from collections.abc import Iterator
from pathlib import Path

import pytest

from models.job import RunoutReading
from models.record import queries
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from tests.journeys.test_random_rotors import slice_of_this_commit
from tests.record.a_job import NUMBER
from tests.record.forging import Forgery, forged, forgeries, kept_heads
from tests.record.whole_record import fill, one_act

# A run takes one forgery in so many; which ones changes with the commit.
_ONE_IN = 12


@pytest.fixture(scope="module")
def filled(tmp_path_factory: pytest.TempPathFactory) -> Iterator[Store]:
    with Store.open(tmp_path_factory.mktemp("filled")) as store:
        fill(store)
        yield store


def unseen(store: Store, chosen: list[Forgery], counts: Counter[str]) -> list[str]:
    """Forge each plainly and with all links made good; list what nobody would see."""
    heads = kept_heads(store)
    missed = []
    for one in chosen:
        plain = forged(store, one, relinked=False, heads={})
        counts["plainly"] += 1
        if not plain.named(one):
            said = [trouble.words for trouble in plain.troubles][:3]
            missed.append(f"{one.table}, {one.what}, {one.row}: {said}")
        if one.is_undone_by_links:
            continue
        made_good = forged(store, one, relinked=True, heads=heads)
        counts["links made good"] += 1
        by_signature = [x for x in made_good.troubles if x.table == "key_signature"]
        counts["seen by a signature"] += bool(by_signature)
        counts["seen by a head kept elsewhere"] += bool(made_good.by_heads)
        counts["named by itself"] += made_good.named(one)
        if not made_good.by_heads and not made_good.named(one):
            missed.append(f"{one.table}, {one.what}, {one.row}, links made good")
    return missed


def test_a_slice_of_all_forgeries_is_seen(filled: Store) -> None:
    every = list(forgeries(filled))
    assert len(every) > 450
    chosen = every[slice_of_this_commit() % _ONE_IN :: _ONE_IN]
    assert unseen(filled, chosen, Counter()) == []


@pytest.mark.whole
def test_every_forgery_is_seen(filled: Store) -> None:
    counts: Counter[str] = Counter()
    every = list(forgeries(filled))
    assert unseen(filled, every, counts) == []
    print(f"\n{len(every)} forgeries: {dict(counts)}")  # noqa: T201  (the figure that is reported)


def test_a_reading_forged_before_a_signature_is_shown_by_signature_and_backup(
    filled: Store,
) -> None:
    (one,) = [
        x for x in forgeries(filled) if (x.table, x.what) == ("runout_reading", "typed changed")
    ]
    found = forged(filled, one, relinked=True, heads={})
    by_signature = [one.words for one in found.troubles if one.table == "key_signature"]
    assert len(by_signature) == 1
    assert "which it covers, was written anew" in by_signature[0]
    # A backup that was made in time tells the same.
    assert any("backup" in one.words for one in found.troubles if one.table == "act")


def test_a_file_rolled_back_to_an_older_copy_is_shown_by_a_head(tmp_path: Path) -> None:
    with Store.open(tmp_path) as store:
        fill(store)
    shutil.copy(tmp_path / FILE_NAME, tmp_path / "older")
    with Store.open(tmp_path) as store:
        with one_act(store, "one more") as act:
            act.add_reading("open", RunoutReading(station="middle", mark=1, typed="3"))
        with store.reading() as session:
            head = queries.head(session, NUMBER)
    shutil.copy(tmp_path / "older", tmp_path / FILE_NAME)
    with Store.open(tmp_path) as store, store.reading() as session:
        assert verify(session).is_whole
        (said,) = verify(session, number=NUMBER, expected=head).troubles
    assert "was cut off: the chain ends at act" in said.words
