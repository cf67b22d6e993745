"""Rows of people's keys in the shop's chain, and the place where wrapped keys are kept."""

from dataclasses import dataclass

from sqlalchemy import delete, insert, select
from sqlalchemy.orm import Session

from models.record import tables
from models.record.act import Act
from models.record.entry_rows import Line, new_key
from models.record.lookups import last_version, shop_chain
from models.record.tables import table

__all__ = [
    "Paper",
    "ShopName",
    "add_authority",
    "add_certificate",
    "add_event",
    "add_key_signature",
    "add_shop",
    "authority_of_the_shop",
    "events_of",
    "keep_wrap",
    "paper_of",
    "papers",
    "shop_name",
    "wrap_of",
]


@dataclass(frozen=True)
class ShopName:
    """The shop as it calls itself; `chain_id` is what its secret is kept under."""

    chain_id: str
    name: str
    place: str


@dataclass(frozen=True)
class Paper:
    """A person's certificate in force, with the authority that gave it."""

    person: str
    certificate: str
    authority: str
    authority_name: str


def add_shop(act: Act, *, name: str, place: str) -> None:
    """Name the shop, or give it another name."""
    known = None
    if not act.already_recorded:
        act.flush()
        known = last_version(act.session, tables.Shop, act.chain_id, {})
    row = {"key": new_key(), "name": name, "place": place}
    act.put(Line(tables.Shop, {**row, "supersedes": known["key"] if known else None}))


def add_authority(act: Act, *, name: str, origin: str, certificate: str) -> str:
    """Add an authority; its key in the chain is given back."""
    key = new_key()
    row = {"key": key, "name": name, "origin": origin, "certificate_pem": certificate}
    act.put(Line(tables.Authority, {**row}))
    return key


def add_certificate(
    act: Act, *, person: str, authority_key: str, certificate: str, reason: str
) -> None:
    """Add a person's certificate; it takes the place of an earlier one."""
    row = {
        "key": new_key(),
        "person_key": person,
        "authority_key": authority_key,
        "certificate_pem": certificate,
        "reason": reason,
    }
    act.put(Line(tables.Certificate, {**row}))


def add_event(
    act: Act,
    *,
    person: str,
    event: str,
    words: str = "",
    signed: tuple[str, str, str] | None = None,
) -> None:
    """Add what befell a person's secrets; `signed` is text, value in base64, certificate."""
    text, value, certificate = signed or (None, None, None)
    act.put(
        Line(
            tables.PersonEvent,
            {
                "key": new_key(),
                "person_key": person,
                "event": event,
                "words": words,
                "signed_text": text,
                "value_base64": value,
                "certificate_pem": certificate,
            },
        )
    )


def add_key_signature(
    act: Act, *, entry: str, text: str, value: str, certificate: str, authority: str
) -> None:
    """Add the value behind a signature entry."""
    row = {
        "key": entry,
        "signed_text": text,
        "value_base64": value,
        "certificate_pem": certificate,
        "authority_pem": authority,
    }
    act.put(Line(tables.KeySignature, {**row}))


def shop_name(session: Session) -> ShopName | None:
    """Give the shop's name; None before its first start is done."""
    chain_id = shop_chain(session)
    if chain_id is None:
        return None
    found = last_version(session, tables.Shop, chain_id, {})
    return None if found is None else ShopName(chain_id, found["name"], found["place"])


def events_of(session: Session, person: str) -> list[str]:
    """List what befell a person's secrets, in the order of the chain."""
    chain_id = shop_chain(session)
    event = table(tables.PersonEvent)
    asked = (
        select(event.c.event)
        .where(event.c.chain_id == chain_id, event.c.person_key == person)
        .order_by(event.c.sequence, event.c.line)
    )
    return [] if chain_id is None else list(session.execute(asked).scalars())


def papers(session: Session) -> dict[str, Paper]:
    """Give the certificate in force of every person who has one."""
    chain_id = shop_chain(session)
    if chain_id is None:
        return {}
    given, above = table(tables.Certificate), table(tables.Authority)
    asked = (
        select(given.c.person_key, given.c.certificate_pem, above.c.certificate_pem, above.c.name)
        .join(
            above, (above.c.chain_id == given.c.chain_id) & (above.c.key == given.c.authority_key)
        )
        .where(given.c.chain_id == chain_id)
        .order_by(given.c.sequence, given.c.line)
    )
    return {row[0]: Paper(row[0], row[1], row[2], row[3]) for row in session.execute(asked)}


def paper_of(session: Session, person: str) -> Paper | None:
    """Give a person's certificate in force."""
    return papers(session).get(person)


def authority_of_the_shop(session: Session) -> tuple[str, str] | None:
    """Give key and certificate of the authority that the shop made itself."""
    chain_id = shop_chain(session)
    above = table(tables.Authority)
    asked = (
        select(above.c.key, above.c.certificate_pem)
        .where(above.c.chain_id == chain_id, above.c.origin == "made here")
        .order_by(above.c.sequence.desc())
        .limit(1)
    )
    found = None if chain_id is None else session.execute(asked).one_or_none()
    return None if found is None else (found[0], found[1])


def wrap_of(session: Session, holder: str, what: str) -> str | None:
    """Give a wrapped key."""
    kept = table(tables.KeyWrap)
    asked = select(kept.c.wrapped_json).where(kept.c.holder == holder, kept.c.what == what)
    return session.execute(asked).scalar_one_or_none()


def keep_wrap(session: Session, holder: str, what: str, wrapped: str | None) -> None:
    """Keep a wrapped key in place of an earlier one, or (None) drop it."""
    kept = table(tables.KeyWrap)
    session.execute(delete(kept).where(kept.c.holder == holder, kept.c.what == what))
    if wrapped is not None:
        session.execute(insert(kept), [{"holder": holder, "what": what, "wrapped_json": wrapped}])
