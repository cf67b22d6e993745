"""Check signatures from what stands in the job's own chain: no secret and no other file needed."""

from base64 import b64decode
from collections.abc import Iterator, Mapping
from datetime import datetime
from typing import Any

from sqlalchemy import select
from sqlalchemy.orm import Session

from models.record import tables
from models.record.canonical import UnfitValueError
from models.record.chain_check import Trouble
from models.record.flat import Row
from models.record.signed_text import covered_digest, read_text
from models.record.tables import table
from models.trust.certificates import is_issued_by, signature_holds, subject_of, valid_between
from models.trust.errors import CertificateError

__all__ = ["faults_of", "signature_troubles"]

_TABLE = "key_signature"


def signature_troubles(session: Session, chain_id: str, name: str) -> Iterator[Trouble]:
    """Find every signature of a chain that does not hold, and say why in words."""
    value, entry = table(tables.KeySignature), table(tables.Entry)
    detail, act = table(tables.Signature), table(tables.Act)
    asked = (
        select(
            value,
            entry.c.by_person,
            detail.c.role,
            detail.c.meaning,
            detail.c.covers,
            act.c.entered_at_utc,
        )
        .outerjoin(act, (act.c.chain_id == value.c.chain_id) & (act.c.sequence == value.c.sequence))
        .outerjoin(entry, (entry.c.chain_id == value.c.chain_id) & (entry.c.key == value.c.key))
        .outerjoin(detail, (detail.c.chain_id == value.c.chain_id) & (detail.c.key == value.c.key))
        .where(value.c.chain_id == chain_id)
        .order_by(value.c.sequence)
    )
    rows = session.execute(asked).mappings().all()
    if not rows:
        return
    links = {
        row.sequence: row.digest
        for row in session.execute(
            select(act.c.sequence, act.c.digest).where(act.c.chain_id == chain_id)
        )
    }
    ours = _own_authorities(session)
    for row in rows:
        told = {
            "entry": row["key"],
            "person": row["by_person"],
            "role": row["role"],
            "meaning": row["meaning"],
            "covers": row["covers"],
            "chain": chain_id,
        }
        for said in faults_of(
            text=row["signed_text"],
            value=row["value_base64"],
            certificate=row["certificate_pem"],
            authority=row["authority_pem"],
            told=told,
            links=links,
            entered=row["entered_at_utc"],
        ):
            yield Trouble(
                job=name, sequence=row["sequence"], table=_TABLE, key=row["key"], what=said
            )
        if ours and row["authority_pem"] not in ours and _is_of_here(row, chain_id):
            yield Trouble(
                job=name,
                sequence=row["sequence"],
                table=_TABLE,
                key=row["key"],
                what="its authority is none that this shop has named",
            )


def faults_of(
    *,
    text: str,
    value: str,
    certificate: str,
    authority: str,
    told: Mapping[str, str | None],
    links: Mapping[int, str] | None,
    entered: str | None = None,
) -> Iterator[str]:
    """Say what does not hold of one signature.

    Parameters
    ----------
    text, value, certificate, authority : str
        What was signed, the value in base64, and the papers in PEM.
    told : mapping
        What the record says of it, to be found again in the text: entry, person, role, meaning,
        covers, chain.
    links : mapping or None
        Digest of each act of the chain by sequence; None where there is no chain to compare with.
    entered : str, optional
        When its act was entered, in UTC; the certificate must hold then.
    """
    try:
        raw = b64decode(value, validate=True)
    except ValueError:
        yield "its value is changed: it is no longer base64"
        return
    if not signature_holds(certificate, text, raw):
        yield "it does not hold: text, value or certificate is changed"
    if not is_issued_by(certificate, authority):
        yield "its certificate was not given by the authority beside it"
    try:
        read = read_text(text)
    except (UnfitValueError, ValueError) as error:
        yield f"its text is changed: {error}"
        return
    for key, expected in told.items():
        if expected is not None and read.get(key) != expected:
            yield f"it was given for another {key}: {read.get(key)}, not {expected}"
    yield from _wrong_person(certificate, read)
    yield from _out_of_date(certificate, entered)
    if covered_digest((one[0], one[1]) for one in read["acts"]) != read["covered_digest"]:
        yield "the digest of what it covers does not fit its list of acts"
    if links is None or read["chain"] != told.get("chain", read["chain"]):
        return
    for sequence, digest in (*read["acts"], read["head"]):
        if links.get(sequence) != digest:
            what = "is cut off" if sequence not in links else "was written anew"
            yield f"act {sequence}, which it covers, {what}"
            return


def _wrong_person(certificate: str, read: Mapping[str, Any]) -> Iterator[str]:
    try:
        name, person = subject_of(certificate)
    except CertificateError as error:
        yield str(error)
        return
    # A certificate of the shop's own authority names no key of the record, but the person.
    if (person and person != read["person"]) or (not person and name != read["name"]):
        yield f"its certificate is of {name}, not of {read['name']}"


def _out_of_date(certificate: str, entered: str | None) -> Iterator[str]:
    if entered is None:
        return
    try:
        begin, end = valid_between(certificate)
    except ValueError:
        return
    if not begin <= datetime.fromisoformat(entered) <= end:
        yield f"its certificate holds from {begin:%Y-%m-%d} to {end:%Y-%m-%d}, not on that day"


def _own_authorities(session: Session) -> set[str]:
    authority, chain = table(tables.Authority), table(tables.Chain)
    asked = (
        select(authority.c.certificate_pem)
        .join(chain, chain.c.chain_id == authority.c.chain_id)
        .where(chain.c.kind == "shop")
    )
    return set(session.execute(asked).scalars())


def _is_of_here(row: Row, chain_id: str) -> bool:
    try:
        return bool(read_text(row["signed_text"])["chain"] == chain_id)
    except (UnfitValueError, ValueError, KeyError):
        return False
