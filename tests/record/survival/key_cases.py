"""Cases of the acts about keys; their secrets are cheap to guess, so that many lives fit."""

from collections.abc import Callable
from functools import partial

import msgspec
from cryptography import x509
from cryptography.hazmat.primitives.serialization import (
    BestAvailableEncryption,
    load_der_private_key,
    pkcs12,
)

from models.acts import Acts, Keys
from models.job import Job, Person, Place, Signature
from models.record import key_rows
from models.record.store import Store
from models.trust.certificates import make_authority
from models.trust.sitting import Sitting, Whose
from models.trust.wrapping import Cost, unwrap
from tests.record.a_job import NUMBER, at

__all__ = ["MADE_OF_SEVERAL", "key_cases"]

_CHEAP = Cost(memory_kib=32, passes=1, lanes=1)
_WORDS, _PIN = "otter brass lantern", "271828"
_ID = "5b8a36f2-3f0a-4a36-9c65-6a0c3b4a1d11"
_IRIS = Person(key="iris", name="Iris", initials="I", role="inspector")
_NEW = Person(key="new", name="Newcomer", initials="N", role="technician")
_PLACE = Place(kind="final")


def _keys(store: Store) -> Keys:
    # Beside the record here, so that it is laid anew with it.
    secrets = store.path.parent / "elsewhere"
    return Keys(store, Acts(store), secrets=secrets, cost=_CHEAP)


def _set_up(store: Store) -> None:
    _keys(store).set_up(
        name="Shop", place="", inspector=_IRIS, passphrase=_WORDS, pin=_PIN, act_id=_ID
    )


def _sitting(store: Store, person: Person) -> Sitting:
    """Give a sitting without the acts that opening one takes: they are acts of their own."""
    keys = _keys(store)
    secret = keys.secret_place().read()
    held = []
    with store.reading() as session:
        for what in ("own key", "authority"):
            wrapped = key_rows.wrap_of(session, person.key, what)
            held.append(
                None
                if wrapped is None
                else unwrap(wrapped, passphrase=_WORDS, person=person.key, shop_secret=secret)
            )
    paper = keys.papers()[person.key]
    whose = Whose(person.key, person.name, paper.certificate, paper.authority)
    own, authority = held
    assert own is not None
    key = None if authority is None else authority.private_key
    return Sitting(whose, own, shop_secret=secret, authority_key=key)


def _people(job: Job) -> dict[str, Person]:
    return {one.key: one for one in job.people}


def _with_keys(job: Job, store: Store) -> None:
    keys = _keys(store)
    keys.set_up(name="Shop", place="", inspector=_IRIS, passphrase=_WORDS, pin=_PIN)
    by = keys.open_sitting(_IRIS.key, _WORDS)
    keys.enrol(_people(job)["tom"], passphrase=_WORDS, pin=_PIN, by=by, by_pin=_PIN)
    Acts(store).bring_in(job, by="tom", act_id="brought")


def _enrol(store: Store) -> None:
    by = _sitting(store, _IRIS)
    _keys(store).enrol(_NEW, passphrase=_WORDS, pin=_PIN, by=by, by_pin=_PIN, act_id=_ID)


def _replace_key(job: Job, store: Store) -> None:
    _keys(store).replace_key(
        _people(job)["tom"], passphrase=_WORDS, pin=_PIN, by=_sitting(store, _IRIS), by_pin=_PIN,
        reason="lost", act_id=_ID,
    )  # fmt: skip


def _bring_papers(store: Store) -> None:
    own = make_authority("Papers of the shop's own", now=store.clock())
    data = pkcs12.serialize_key_and_certificates(
        b"x",
        load_der_private_key(own.private_key, None),  # type: ignore[arg-type]
        x509.load_pem_x509_certificate(own.certificate.encode()),
        None,
        BestAvailableEncryption(b"words"),
    )
    _keys(store).bring_papers(
        _NEW, pkcs12=data, its_passphrase="words", passphrase=_WORDS, pin=_PIN,
        by=_sitting(store, _IRIS), by_pin=_PIN, act_id=_ID,
    )  # fmt: skip


def _unlock(job: Job, store: Store) -> None:
    _keys(store).unlock(
        _people(job)["tom"], reason="came", by=_sitting(store, _IRIS), pin=_PIN, act_id=_ID
    )


def _retire(job: Job, store: Store) -> None:
    _keys(store).retire(
        _people(job)["tom"], reason="left", by=_sitting(store, _IRIS), pin=_PIN, act_id=_ID
    )


def _sign(job: Job, store: Store) -> None:
    entry = Signature(
        id=_ID, place=_PLACE, by="tom", done_at=at(200), entered_at=at(200),
        plan=job.plan.revision, role="technician", meaning="performed", covers="all of it",
        out_of_order="told afterwards",
    )  # fmt: skip
    keys = _keys(store)
    seen = keys.preview(NUMBER, entry)
    keys.sign(NUMBER, entry, seen=seen, sitting=_sitting(store, _people(job)["tom"]), pin=_PIN)


def _nothing(store: Store) -> None:
    """Leave a new record as it is."""


Fill = Callable[[Store], None]


def key_cases(job: Job) -> dict[str, tuple[Fill, Callable[[Store], object]]]:
    """Give what the record holds before, and the act, for every act about keys."""
    job = msgspec.structs.replace(job, verdicts=())
    before = partial(_with_keys, job)
    return {
        "set_up": (_nothing, _set_up),
        "enrol": (before, _enrol),
        "replace_key": (before, partial(_replace_key, job)),
        "bring_papers": (before, _bring_papers),
        "unlock": (before, partial(_unlock, job)),
        "retire": (before, partial(_retire, job)),
        "sign": (before, partial(_sign, job)),
    }


# Made of acts that are each whole: a try, counted before it is judged, its proof, the change.
# The last writes to a scratch record only.
MADE_OF_SEVERAL = frozenset({"open_sitting", "change_secret", "look_at"})
