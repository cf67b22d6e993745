"""Keys through the door: first start, wrong tries, sittings, signatures, and forging them."""

import shutil
import sqlite3
from base64 import b64encode
from collections.abc import Callable, Iterator
from contextlib import suppress
from dataclasses import dataclass, field
from pathlib import Path

import msgspec
import pytest

from models.acts import Acts, Keys, NotAllowedError, new_id
from models.acts.door import SignedWith
from models.acts.keys import LOCKED_AFTER, seconds_to_wait
from models.job import Person, Place, Signature
from models.record.store import FILE_NAME, Store
from models.record.verify import verify
from models.trust.errors import (
    LockedError,
    ShopSecretMissingError,
    SittingClosedError,
    TrustError,
    WaitError,
    WrongSecretError,
)
from models.trust.sitting import IDLE_SECONDS, WHOLE_SECONDS, Sitting
from models.trust.wrapping import Cost
from sample_data.load import compressor

NUMBER = "26-0417"
CHEAP = Cost(memory_kib=32, passes=1, lanes=1)
WORDS, PIN = "otter brass lantern", "271828"
NEW_WORDS, NEW_PIN = "willow kettle stamp", "314159"
JOB = compressor()
PEOPLE = {one.key: one for one in JOB.people}
INSPECTOR = next(one for one in JOB.people if one.role == "inspector")
TECHNICIAN = next(one for one in JOB.people if one.role == "technician")
SECOND = Person(key="SI", name="Second Inspector (invented)", initials="SI", role="inspector")
STEP = JOB.plan.steps[5].key


@dataclass
class Steady:
    """The computer's steady count, moved by hand."""

    now: float = 0.0

    def __call__(self) -> float:
        return self.now


@dataclass
class Shop:
    """An open shop with two inspectors and a technician who hold keys."""

    folder: Path
    secrets: Path
    steady: Steady = field(default_factory=Steady)

    def __post_init__(self) -> None:
        self.open()

    def open(self) -> None:
        self.store = Store.open(self.folder)
        self.acts = Acts(self.store)
        self.keys = Keys(
            self.store, self.acts, secrets=self.secrets, cost=CHEAP, steady=self.steady
        )

    def again(self) -> None:
        """End the program and start it again."""
        self.store.close()
        self.open()

    def sit(self, person: Person = TECHNICIAN) -> Sitting:
        return self.keys.open_sitting(person.key, WORDS)

    def sign(self, entry: Signature, sitting: Sitting, pin: str = PIN) -> None:
        self.keys.sign(
            NUMBER, entry, seen=self.keys.preview(NUMBER, entry), sitting=sitting, pin=pin
        )

    def troubles(self) -> list[str]:
        with self.store.reading() as session:
            return [one.words for one in verify(session).troubles]


@pytest.fixture(scope="module")
def made(tmp_path_factory: pytest.TempPathFactory) -> Path:
    home = tmp_path_factory.mktemp("keys")
    (home / "record").mkdir()
    shop = Shop(home / "record", home / "secrets")
    shop.keys.set_up(
        name="Shop (invented)", place="Nowhere", inspector=INSPECTOR, passphrase=WORDS, pin=PIN
    )
    by = shop.sit(INSPECTOR)
    for person in (TECHNICIAN, SECOND):
        shop.keys.enrol(person, passphrase=WORDS, pin=PIN, by=by, by_pin=PIN)
    shop.acts.bring_in(JOB, by=TECHNICIAN.key, act_id="demo")
    shop.store.close()
    return home


@pytest.fixture
def shop(made: Path, tmp_path: Path) -> Iterator[Shop]:
    shutil.copytree(made, tmp_path, dirs_exist_ok=True)
    opened = Shop(tmp_path / "record", tmp_path / "secrets")
    yield opened
    opened.store.close()


def a_signature(by: Person = TECHNICIAN, **more: object) -> Signature:
    at = "2026-12-01T10:00:00+00:00"
    facts: dict[str, object] = {
        "id": new_id(), "place": Place(kind="attempt", step=STEP, attempt=1), "by": by.key,
        "done_at": at, "entered_at": at, "plan": JOB.plan.revision, "role": by.role,
        "meaning": "performed" if by.role == "technician" else "inspected", "covers": "step 6",
    }  # fmt: skip
    return Signature(**(facts | more))  # type: ignore[arg-type]


# First start and people ------------------------------------------------------------------------


def test_the_first_start_makes_shop_authority_and_inspector(shop):
    assert shop.keys.shop.name == "Shop (invented)"
    assert set(shop.keys.papers()) == {INSPECTOR.key, TECHNICIAN.key, SECOND.key}
    assert shop.troubles() == []
    with pytest.raises(TrustError, match="already"):
        shop.keys.set_up(name="x", place="", inspector=INSPECTOR, passphrase=WORDS, pin=PIN)


def test_the_first_person_is_an_inspector(tmp_path):
    shop = Shop(tmp_path, tmp_path / "secrets")
    with pytest.raises(TrustError, match="inspector"):
        shop.keys.set_up(name="x", place="", inspector=TECHNICIAN, passphrase=WORDS, pin=PIN)
    assert shop.keys.shop is None
    shop.store.close()


def test_the_shop_secret_is_narrow_and_outside_the_records_folder(shop):
    place = shop.keys.secret_place()
    assert place.is_narrow
    assert place.path.parent.stat().st_mode & 0o777 == 0o700
    assert shop.folder not in place.path.parents
    assert place.read() not in (shop.folder / FILE_NAME).read_bytes()
    assert (shop.folder / FILE_NAME).stat().st_mode & 0o777 == 0o600


def test_without_the_shop_secret_nobody_signs_and_no_try_is_lost(shop):
    shop.keys.secret_place().path.unlink()
    with pytest.raises(ShopSecretMissingError, match="Bring it over"):
        shop.sit()
    assert shop.keys.standing(TECHNICIAN.key).tries == 0


def test_a_technician_gives_nobody_a_key(shop):
    other = Person(key="XX", name="Somebody", initials="XX", role="technician")
    with pytest.raises(TrustError, match="no inspector"):
        shop.keys.enrol(other, passphrase=WORDS, pin=PIN, by=shop.sit(TECHNICIAN), by_pin=PIN)
    assert not shop.keys.standing("XX").has_key


# Wrong tries -----------------------------------------------------------------------------------


def wrong(shop: Shop) -> None:
    with pytest.raises((WrongSecretError, LockedError)):
        shop.keys.open_sitting(TECHNICIAN.key, "another passphrase")


def test_waiting_grows_and_a_new_start_gives_nothing_back(shop):
    wrong(shop)
    wrong(shop)
    with pytest.raises(WaitError, match="2 s"):
        shop.sit()
    shop.again()
    # Counted from the start of the program, whatever its clock says.
    with pytest.raises(WaitError):
        shop.sit()
    shop.steady.now += 2.1
    assert shop.sit().is_open
    assert shop.keys.standing(TECHNICIAN.key).tries == 0


def test_a_clock_set_forward_or_back_changes_no_wait(shop):
    wrong(shop)
    wrong(shop)
    real = shop.store.clock
    shop.store.clock = lambda: real().replace(year=2031)
    with pytest.raises(WaitError):
        shop.sit()
    shop.store.clock = lambda: real().replace(year=2020)
    with pytest.raises(WaitError):
        shop.sit()


def test_too_many_wrong_tries_lock_until_another_inspector_unlocks(shop):
    for _ in range(LOCKED_AFTER):
        shop.steady.now += 1000.0
        wrong(shop)
        shop.again()
    shop.steady.now += 1000.0
    with pytest.raises(LockedError, match="Another inspector unlocks"):
        shop.sit()
    by = shop.sit(INSPECTOR)
    shop.keys.unlock(TECHNICIAN, reason="forgot, came in person", by=by, pin=PIN)
    assert shop.sit().is_open
    assert shop.troubles() == []
    raw = sqlite3.connect(shop.folder / FILE_NAME)
    rows = raw.execute("SELECT words, signed_text FROM person_event WHERE event = 'unlocked'")
    ((words, signed),) = rows.fetchall()
    raw.close()
    assert words == "forgot, came in person"
    assert '"person":"' + TECHNICIAN.key + '"' in signed


def test_nobody_unlocks_themselves_and_no_technician_unlocks(shop):
    by = shop.sit(INSPECTOR)
    with pytest.raises(TrustError, match="themselves"):
        shop.keys.unlock(INSPECTOR, reason="me", by=by, pin=PIN)
    mine = shop.sit(TECHNICIAN)
    with pytest.raises(TrustError, match="no inspector"):
        shop.keys.unlock(SECOND, reason="friend", by=mine, pin=PIN)


def test_waits_grow_to_minutes():
    waits = [seconds_to_wait(tries) for tries in range(LOCKED_AFTER)]
    assert waits == [0.0, 0.0, 2.0, 4.0, 8.0, 16.0, 32.0, 64.0]
    assert seconds_to_wait(60) == 300.0


# Sittings --------------------------------------------------------------------------------------


def test_a_pin_alone_opens_nothing(shop):
    with pytest.raises(WrongSecretError):
        shop.keys.open_sitting(TECHNICIAN.key, PIN)


@pytest.mark.parametrize(
    ("steps", "is_open"),
    [
        ([IDLE_SECONDS - 1], True),
        ([IDLE_SECONDS + 1], False),
        ([IDLE_SECONDS - 1] * round(WHOLE_SECONDS / IDLE_SECONDS - 1), True),
        ([IDLE_SECONDS - 1] * round(WHOLE_SECONDS / IDLE_SECONDS + 2), False),
    ],
    ids=["used in time", "left alone", "used all along", "too long in any case"],
)
def test_a_sitting_ends_by_itself(shop, steps, is_open):
    sitting = shop.sit()
    for step in steps:
        shop.steady.now += step
        with suppress(SittingClosedError):
            sitting.confirm(PIN)
    assert sitting.is_open is is_open


def test_three_wrong_pins_end_the_sitting_and_are_counted(shop):
    sitting = shop.sit()
    for _ in range(3):
        with pytest.raises(WrongSecretError, match="PIN"):
            shop.sign(a_signature(), sitting, pin="999111")
    assert not sitting.is_open
    with pytest.raises(SittingClosedError, match="passphrase"):
        shop.sign(a_signature(), sitting)
    assert shop.keys.standing(TECHNICIAN.key).tries == 3
    assert JOB.entries == shop.acts.read(NUMBER).entries


def test_nobody_signs_in_anothers_sitting(shop):
    with pytest.raises(SittingClosedError):
        shop.sign(a_signature(INSPECTOR), shop.sit(TECHNICIAN))


# Secrets and keys change -----------------------------------------------------------------------


def test_a_changed_secret_leaves_nothing_under_the_old_one(shop):
    raw = sqlite3.connect(shop.folder / FILE_NAME)
    asked = "SELECT wrapped_json FROM key_wrap WHERE holder = ?"
    before = [row[0] for row in raw.execute(asked, (INSPECTOR.key,))]
    raw.close()
    shop.keys.change_secret(
        INSPECTOR.key, passphrase=WORDS, new_passphrase=NEW_WORDS, new_pin=NEW_PIN
    )
    with pytest.raises(WrongSecretError):
        shop.sit(INSPECTOR)
    sitting = shop.keys.open_sitting(INSPECTOR.key, NEW_WORDS)
    sitting.confirm(NEW_PIN)
    # The authority came along: keys can still be given.
    other = Person(key="XX", name="Somebody", initials="XX", role="witness")
    shop.keys.enrol(other, passphrase=WORDS, pin=PIN, by=sitting, by_pin=NEW_PIN)
    shop.store.close()
    file = (shop.folder / FILE_NAME).read_bytes()
    assert len(before) == 2
    assert all(text.encode() not in file for text in before)
    shop.open()


def test_a_lost_key_is_replaced_by_another_inspector_and_old_signatures_stay(shop):
    shop.sign(a_signature(), shop.sit())
    old = shop.keys.papers()[TECHNICIAN.key].certificate
    with pytest.raises(TrustError, match="their own key"):
        shop.keys.replace_key(
            INSPECTOR, passphrase=WORDS, pin=PIN, by=shop.sit(INSPECTOR), by_pin=PIN, reason="x"
        )
    shop.keys.replace_key(
        TECHNICIAN, passphrase=NEW_WORDS, pin=NEW_PIN, by=shop.sit(SECOND), by_pin=PIN,
        reason="passphrase forgotten",
    )  # fmt: skip
    assert shop.keys.papers()[TECHNICIAN.key].certificate != old
    assert shop.keys.open_sitting(TECHNICIAN.key, NEW_WORDS).is_open
    assert shop.troubles() == []


def test_who_is_retired_signs_no_more_and_what_they_signed_stays(shop):
    sitting = shop.sit()
    shop.sign(a_signature(), sitting)
    shop.keys.retire(TECHNICIAN, reason="left the shop", by=shop.sit(INSPECTOR), pin=PIN)
    with pytest.raises(TrustError, match="retired"):
        shop.sign(a_signature(), sitting)
    with pytest.raises(TrustError, match="retired"):
        shop.sit()
    assert shop.troubles() == []


# Signatures ------------------------------------------------------------------------------------


def test_a_signature_needs_a_key_once_the_shop_has_them(shop):
    with pytest.raises(NotAllowedError, match="signs with keys") as refused:
        shop.acts.record(NUMBER, a_signature())
    assert refused.value.name == "signature-needs-key"


def test_a_signature_stands_in_the_job_with_all_that_checks_it(shop):
    entry = a_signature()
    shop.sign(entry, shop.sit())
    job = shop.acts.read(NUMBER)
    (mine,) = [one for one in job.key_signatures if one.entry == entry.id]
    told = msgspec.json.decode(mine.text)
    assert (told["person"], told["meaning"], told["covers"]) == (
        TECHNICIAN.key, "performed", "step 6",
    )  # fmt: skip
    assert told["head"][0] == job.head.sequence - 1
    assert shop.troubles() == []


def test_it_covers_the_acts_about_its_attempt_and_no_others(shop):
    seen = shop.keys.preview(NUMBER, a_signature())
    covered = {sequence for sequence, _ in msgspec.json.decode(seen.text)["acts"]}
    place = Place(kind="attempt", step=STEP, attempt=1)
    # Brought in: the opening act, then one for each entry in its order.
    expected = {2 + index for index, one in enumerate(JOB.entries) if one.place == place}
    assert covered == expected


def test_what_changes_between_looking_and_signing_is_not_signed(shop):
    entry = a_signature()
    seen = shop.keys.preview(NUMBER, entry)
    note = next(one for one in JOB.entries if type(one).__name__ == "Note")
    shop.acts.record(NUMBER, msgspec.structs.replace(note, id=new_id()))
    with pytest.raises(NotAllowedError, match="moved on") as refused:
        shop.keys.sign(NUMBER, entry, seen=seen, sitting=shop.sit(), pin=PIN)
    assert refused.value.name == "moved-on-since-seen"


def test_roles_hold_for_keys_too(shop):
    entry = a_signature(TECHNICIAN, role="technician", meaning="inspected")
    with pytest.raises(NotAllowedError, match="inspector"):
        shop.sign(entry, shop.sit())


# Forging ---------------------------------------------------------------------------------------


def rewritten(shop: Shop, work: Callable[[sqlite3.Connection], None]) -> list[str]:
    """Work on the file behind the program's back, triggers gone and put back."""
    shop.store.close()
    raw = sqlite3.connect(shop.folder / FILE_NAME)
    triggers = raw.execute("SELECT name, sql FROM sqlite_schema WHERE type = 'trigger'").fetchall()
    for name, _ in triggers:
        raw.execute(f'DROP TRIGGER "{name}"')
    work(raw)
    for _, text in triggers:
        raw.execute(text)
    raw.commit()
    raw.close()
    shop.open()
    return shop.troubles()


def signed_twice(shop: Shop) -> tuple[Signature, Signature]:
    sitting = shop.sit()
    first, second = (
        a_signature(),
        a_signature(
            place=Place(kind="attempt", step=JOB.plan.steps[4].key, attempt=1), covers="step 5"
        ),
    )
    shop.sign(first, sitting)
    shop.sign(second, sitting)
    return first, second


def test_values_of_two_signatures_swapped_are_told(shop):
    first, second = signed_twice(shop)

    def swap(raw: sqlite3.Connection) -> None:
        columns = "signed_text, value_base64"
        asked = f"SELECT {columns} FROM key_signature WHERE key = ?"
        one = raw.execute(asked, (first.id,)).fetchone()
        other = raw.execute(asked, (second.id,)).fetchone()
        change = "UPDATE key_signature SET signed_text = ?, value_base64 = ? WHERE key = ?"
        raw.execute(change, (*other, first.id))
        raw.execute(change, (*one, second.id))

    said = " ".join(rewritten(shop, swap))
    assert "given for another entry" in said
    assert "given for another covers: step 5, not step 6" in said


@pytest.mark.parametrize("column", ["signed_text", "value_base64", "certificate_pem"])
def test_anything_changed_in_a_value_is_told(shop, column):
    entry = a_signature()
    shop.sign(entry, shop.sit())

    def change(raw: sqlite3.Connection) -> None:
        asked = f"SELECT {column} FROM key_signature WHERE key = ?"
        (text,) = raw.execute(asked, (entry.id,)).fetchone()
        middle = len(text) // 2
        other = "A" if text[middle] != "A" else "B"
        raw.execute(
            f"UPDATE key_signature SET {column} = ? WHERE key = ?",
            (text[:middle] + other + text[middle + 1 :], entry.id),
        )

    said = rewritten(shop, change)
    assert any("key_signature" in one and "does not hold" in one for one in said)


def test_a_signature_of_an_authority_made_up_elsewhere_is_told(shop, tmp_path):
    """A forger makes an authority of the same name, and a key for the same person."""
    (tmp_path / "forger").mkdir()
    forger = Shop(tmp_path / "forger", tmp_path / "forgers secrets")
    forger.keys.set_up(
        name="Shop (invented)", place="Nowhere", inspector=INSPECTOR, passphrase=WORDS, pin=PIN
    )
    forger.keys.enrol(TECHNICIAN, passphrase=WORDS, pin=PIN, by=forger.sit(INSPECTOR), by_pin=PIN)
    entry = a_signature()
    seen = shop.keys.preview(NUMBER, entry)
    forged = forger.sit()
    whose = forged.whose
    value = b64encode(forged.sign(seen.text, pin=PIN)).decode()
    shop.acts.record(
        NUMBER, entry, signed=SignedWith(seen.text, value, whose.certificate, whose.authority)
    )
    assert any("none that this shop has named" in one for one in shop.troubles())
    forger.store.close()


def test_a_signature_on_a_day_its_certificate_does_not_hold_is_told(shop):
    real = shop.store.clock
    shop.store.clock = lambda: real().replace(year=real().year + 11)
    shop.sign(a_signature(), shop.sit())
    assert any("not on that day" in one for one in shop.troubles())


def test_a_job_brought_in_with_a_signer_has_a_key_behind_every_signature(tmp_path, made):
    shutil.copytree(made, tmp_path, dirs_exist_ok=True)
    shop = Shop(tmp_path / "record", tmp_path / "secrets")
    job = msgspec.structs.replace(JOB, number="again")
    asked: list[str] = []

    def signer(session, number, entry):
        asked.append(entry.id)

    shop.acts.bring_in(job, by=TECHNICIAN.key, act_id="again", signer=signer)
    assert asked == [one.id for one in JOB.entries if isinstance(one, Signature)]
    shop.store.close()
