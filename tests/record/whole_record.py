"""A record with a row in every table, and ways to work on its file behind the program's back."""

import sqlite3
from base64 import b64encode
from collections.abc import Iterator
from contextlib import contextmanager
from datetime import UTC, datetime

import msgspec
from sqlalchemy import create_engine
from sqlalchemy.orm import Session
from sqlalchemy.pool import StaticPool

from models.job import (
    GaugeTry,
    Head,
    Hot,
    Place,
    Question,
    RunoutReading,
    Signature,
    SizeReading,
    Warmth,
)
from models.record import journal, key_rows
from models.record.act import Act
from models.record.carried import Laid, note_taken_in
from models.record.heads_seen import add_heads_seen, add_restoration, all_heads
from models.record.places import AnyReading
from models.record.signed_text import to_sign
from models.record.store import Store
from models.record.tables import CHANGEABLE
from models.trust.certificates import issue, make_authority, new_key, sign
from models.units import Angle
from tests.record.a_job import ANGLES, FORGING, NUMBER, a_job, a_survey, at, celsius, mm

__all__ = ["behind_the_back", "fill", "one_act", "tables_of"]


@contextmanager
def one_act(
    store: Store, act_id: str, *, chain: str | None = NUMBER, **more: object
) -> Iterator[Act]:
    facts: dict[str, object] = {"kind": "entered", "by": "tom", "done_at": at(200), **more}
    with (
        store.writing() as session,
        journal.act(session, chain=chain, act_id=act_id, **facts) as act,
    ):
        yield act


def fill(store: Store) -> None:
    """Bring a whole job in, replace one of each kind of reading, and give the shop its people."""
    job = a_job()
    with store.writing() as session:
        journal.bring_in(session, job, by="tom", act_id="brought")
    with one_act(store, "shop", chain=journal.SHOP) as act:
        act.add_people(job.people)
        act.add_instruments(job.instruments)
        act.add_materials([FORGING])
    with one_act(store, "shop again", chain=journal.SHOP) as act:
        act.add_people([msgspec.structs.replace(job.people[0], role="inspector")])
        act.add_instruments([msgspec.structs.replace(job.instruments[0], range="0 to 2 mm")])
        act.add_materials([msgspec.structs.replace(FORGING, source="certificate 18")])
    _give_keys(store)
    with store.reading() as session:
        heads = all_heads(session)
    with one_act(store, "backed up", chain=journal.SHOP) as act:
        add_heads_seen(act, backup_name="shop 2031-03-04 110000Z.thirdjournal", heads=heads)
        add_restoration(
            act,
            backup_name="shop 2031-03-03 110000Z.thirdjournal",
            backup_made_at=at(0),
            set_aside="shop set aside 2031-03-04 120000.thirdjournal",
            left_behind=3,
        )
    with one_act(store, "facts again") as act:
        act.add_components([msgspec.structs.replace(job.components[0], revision="C")])
    with one_act(store, "opened") as act:
        act.add_entry(a_survey("open", Place(kind="final"), 199, purpose="final"))
    for number, (entry_id, reading, reason) in enumerate(_READINGS):
        with one_act(store, f"reading {number}") as act:
            act.add_reading(entry_id, reading, reason=reason)
    with one_act(store, "asked") as act:
        act.add_question(
            "open",
            Question(where=("middle", "0"), question="7?", answer="yes", by="tom", at=at(201)),
        )


def _give_keys(store: Store) -> None:
    """Name the shop and its authority, give Tom a key, and have him sign."""
    now = datetime(2026, 12, 1, 10, 0, tzinfo=UTC)
    authority, mine = make_authority("Shop", now=now), new_key()
    paper = issue(authority, private_key=mine, name="Tom", person="tom", shop="Shop", now=now)
    with one_act(store, "keys", chain=journal.SHOP) as act:
        key_rows.add_shop(act, name="Shop", place="Nowhere")
        above = key_rows.add_authority(
            act, name="Shop", origin="made here", certificate=authority.certificate
        )
        key_rows.add_certificate(
            act, person="tom", authority_key=above, certificate=paper, reason="first"
        )
        text = "unlocked, because he came in person"
        value = b64encode(sign(mine, text)).decode()
        key_rows.add_event(
            act, person="tom", event="unlocked", words="came", signed=(text, value, paper)
        )
    with one_act(store, "taken in", chain=journal.SHOP) as act:
        laid = Laid("another chain", "R-99", Head(sequence=3, digest="a" * 64), 3)
        note_taken_in(act, laid, data=b"the file")
    with one_act(store, "shop named anew", chain=journal.SHOP) as act:
        key_rows.add_shop(act, name="Shop and Sons", place="Nowhere")
    signature = Signature(
        id="with a key", place=Place(kind="final"), by="tom", done_at=at(202), entered_at=at(202),
        plan="B", role="technician", meaning="performed", covers="the whole build",
    )  # fmt: skip
    with store.reading() as session:
        seen = to_sign(session, NUMBER, signature, name="Tom")
    with one_act(store, "signed with a key") as act:
        act.add_entry(signature)
        key_rows.add_key_signature(
            act,
            entry=signature.id,
            text=seen.text,
            value=b64encode(sign(mine, seen.text)).decode(),
            certificate=paper,
            authority=authority.certificate,
        )


_READINGS: tuple[tuple[str, AnyReading, str | None], ...] = (
    ("open", RunoutReading(station="middle", mark=0, typed="7"), None),
    ("open", RunoutReading(station="middle", mark=0, typed="8"), "misread"),
    ("bore", SizeReading(position=0, angle=0, typed="119.9"), "misread"),
    (
        "heat",
        Hot(where="rim", temperature=celsius("260"), at=at(51), angle=Angle.read("90°")),
        "misread",
    ),
    ("heat", GaugeTry(land="front", size=mm("120.31"), passed=True, at=at(52)), "misread"),
    ("cool", Warmth(position=mm("450"), angle=ANGLES[0], temperature=celsius("20")), "misread"),
)


@contextmanager
def behind_the_back(store: Store) -> Iterator[tuple[sqlite3.Connection, Session]]:
    """Open the file as another program would; what is done is undone at the end."""
    raw = sqlite3.connect(store.path, isolation_level=None)
    engine = create_engine("sqlite://", creator=lambda: raw, poolclass=StaticPool)
    try:
        with Session(engine) as session:
            # SQLAlchemy ends whatever is under way when it meets a connection.
            session.connection()
            yield raw, session
    finally:
        raw.close()


def tables_of(raw: sqlite3.Connection) -> list[str]:
    """List the tables in the live schema whose rows must not change."""
    rows = raw.execute("SELECT name FROM sqlite_schema WHERE type = 'table' ORDER BY name")
    return [name for (name,) in rows if name not in CHANGEABLE]
