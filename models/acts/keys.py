"""Acts about keys: the first start, people and their secrets, sittings, and signing.

Who tries a passphrase is counted on the record before the try is judged, so that neither a new
start nor another clock gives tries back.
"""

import time
import uuid
from base64 import b64encode
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from datetime import datetime
from pathlib import Path
from typing import TypeVar

from models.acts.door import Acts, Recorded, SignedWith
from models.job import Person, Signature
from models.record import journal, key_rows, queries
from models.record.act import Act
from models.record.canonical import canonical_text
from models.record.signed_text import ToSign, to_sign
from models.record.store import Session, Store
from models.trust import wrapping
from models.trust.certificates import Identity, issue, make_authority, new_key, read_pkcs12
from models.trust.errors import (
    LockedError,
    SittingClosedError,
    TrustError,
    WaitError,
    WrongSecretError,
)
from models.trust.shop_secret import SecretPlace
from models.trust.sitting import Sitting, Whose
from models.trust.wrapping import USUAL_COST, Cost, Opened

__all__ = ["LOCKED_AFTER", "KeyStanding", "Keys", "seconds_to_wait"]

LOCKED_AFTER = 8
_LONGEST_WAIT = 300.0
_OWN, _AUTHORITY = "own key", "authority"
_TRIES = ("tried", "wrong PIN")
_T = TypeVar("_T")
_FORGIVES = ("proved", "unlocked", "key replaced", "enrolled")


def seconds_to_wait(tries: int) -> float:
    """Say how long the next try has to wait after so many wrong ones in a row [s]."""
    return 0.0 if tries < 2 else min(2.0 ** (tries - 1), _LONGEST_WAIT)


@dataclass(frozen=True)
class KeyStanding:
    """How a person stands: wrong tries in a row, locked, retired, with a key or without."""

    person: str
    tries: int
    retired: bool
    has_key: bool

    @property
    def locked(self) -> bool:
        """Whether another inspector has to unlock."""
        return self.tries >= LOCKED_AFTER


class Keys:
    """Everything that people do with keys; `secrets` is where shop secrets lie on this computer."""

    def __init__(
        self,
        store: Store,
        acts: Acts,
        *,
        secrets: Path | None = None,
        cost: Cost = USUAL_COST,
        steady: Callable[[], float] = time.monotonic,
    ) -> None:
        self._store = store
        self._acts = acts
        self._secrets = secrets
        self._cost = cost
        self._steady = steady
        self._started = steady()
        self._last_try: dict[str, float] = {}

    # What is there ----------------------------------------------------------------------------

    @property
    def shop(self) -> key_rows.ShopName | None:
        """The shop; None before its first start."""
        with self._store.reading() as session:
            return key_rows.shop_name(session)

    def people(self) -> tuple[Person, ...]:
        """List the shop's people."""
        with self._store.reading() as session:
            return queries.people(session)

    def papers(self) -> dict[str, key_rows.Paper]:
        """Give the certificate in force of everybody who has one."""
        with self._store.reading() as session:
            return key_rows.papers(session)

    def standing(self, person: str) -> KeyStanding:
        """Say how a person stands."""
        with self._store.reading() as session:
            events = key_rows.events_of(session, person)
            has_key = key_rows.wrap_of(session, person, _OWN) is not None
        tries = 0
        for event in events:
            tries = 0 if event in _FORGIVES else tries + (event in _TRIES)
        return KeyStanding(person, tries, "retired" in events, has_key)

    def secret_place(self) -> SecretPlace:
        """Say where the shop secret lies on this computer.

        Raises
        ------
        TrustError
            Before the first start.
        """
        shop = self.shop
        if shop is None:
            raise TrustError("The shop has no keys yet. Set them up first.")
        return SecretPlace(shop.chain_id, self._secrets)

    # First start, people ----------------------------------------------------------------------

    def set_up(
        self,
        *,
        name: str,
        place: str,
        inspector: Person,
        passphrase: str,
        pin: str,
        act_id: str | None = None,
    ) -> None:
        """Make the shop, its authority and its first inspector.

        Raises
        ------
        SecretTooShortError
            If passphrase or PIN is too weak.
        TrustError
            If the shop has its keys already, or the first person is no inspector.
        """
        if inspector.role != "inspector":
            raise TrustError("The first person of a shop is an inspector; others follow.")
        wrapping.refuse_weak_passphrase(passphrase)
        wrapping.refuse_weak_pin(pin)
        now = self._now()
        authority, private = make_authority(name, now=now), new_key()
        paper = issue(
            authority, private_key=private, name=inspector.name, person=inspector.key,
            shop=name, now=now,
        )  # fmt: skip
        with self._act("shop set up", inspector.key, act_id) as (session, act):
            if act.already_recorded:
                return
            if key_rows.shop_name(session) is not None:
                raise TrustError("The shop has its keys already.")
            act.add_people([inspector])
            key_rows.add_shop(act, name=name, place=place)
            # The secret goes to its place before anything is recorded that needs it.
            secret = SecretPlace(act.chain_id, self._secrets).make()
            above = key_rows.add_authority(
                act, name=name, origin="made here", certificate=authority.certificate
            )
            key_rows.add_certificate(
                act, person=inspector.key, authority_key=above, certificate=paper, reason="first"
            )
            key_rows.add_event(act, person=inspector.key, event="enrolled")
            self._keep(session, inspector.key, _OWN, private, passphrase, pin, secret)
            self._keep(
                session, inspector.key, _AUTHORITY, authority.private_key, passphrase, pin, secret
            )

    def enrol(
        self,
        person: Person,
        *,
        passphrase: str,
        pin: str,
        by: Sitting,
        by_pin: str,
        act_id: str | None = None,
    ) -> None:
        """Give a person a key and a certificate; an inspector does it, in a sitting.

        Raises
        ------
        TrustError
            If `by` is no inspector with the shop's authority, the person has a key already, or a
            secret does not serve.
        """
        self._give_key(
            person, passphrase, pin, by, by_pin, event="enrolled", reason="first", act_id=act_id
        )

    def replace_key(
        self,
        person: Person,
        *,
        passphrase: str,
        pin: str,
        by: Sitting,
        by_pin: str,
        reason: str,
        act_id: str | None = None,
    ) -> None:
        """Give a person a new key for a lost one; another inspector approves it.

        Raises
        ------
        TrustError
            If `by` is the person itself or no inspector, or a secret does not serve.
        """
        if by.whose.person == person.key:
            raise TrustError("Nobody replaces their own key; another inspector does it.")
        self._give_key(
            person, passphrase, pin, by, by_pin, event="key replaced", reason=reason, act_id=act_id
        )

    def bring_papers(
        self,
        person: Person,
        *,
        pkcs12: bytes,
        its_passphrase: str,
        passphrase: str,
        pin: str,
        by: Sitting,
        by_pin: str,
        act_id: str | None = None,
    ) -> None:
        """Take a person's own key and certificate from a PKCS#12 file, and who stands above it.

        Raises
        ------
        CertificateError
            If the file does not serve.
        TrustError
            If `by` is no inspector with the shop's authority, or a secret does not serve.
        """
        wrapping.refuse_weak_passphrase(passphrase)
        wrapping.refuse_weak_pin(pin)
        brought = read_pkcs12(pkcs12, its_passphrase)
        self._authority_of(by, by_pin)
        secret = self.secret_place().read()
        with self._act("papers brought in", by.whose.person, act_id) as (session, act):
            if act.already_recorded:
                return
            act.add_people([person])
            above = key_rows.add_authority(
                act,
                name=f"authority of {person.name}",
                origin="brought in",
                certificate=brought.above[0] if brought.above else brought.certificate,
            )
            key_rows.add_certificate(
                act,
                person=person.key,
                authority_key=above,
                certificate=brought.certificate,
                reason="papers of the shop's own",
            )
            key_rows.add_event(act, person=person.key, event="enrolled")
            self._keep(session, person.key, _OWN, brought.private_key, passphrase, pin, secret)

    def change_secret(
        self, person: str, *, passphrase: str, new_passphrase: str, new_pin: str
    ) -> None:
        """Wrap a person's keys under a new passphrase and PIN; the old wraps are overwritten.

        Raises
        ------
        TrustError
            If the old passphrase is another, or a new secret is too weak.
        """
        wrapping.refuse_weak_passphrase(new_passphrase)
        wrapping.refuse_weak_pin(new_pin)
        opened = self._proved(person, passphrase, _OWN)
        secret = self.secret_place().read()
        with self._store.reading() as session:
            has_authority = key_rows.wrap_of(session, person, _AUTHORITY) is not None
        above = self._unwrapped(person, passphrase, _AUTHORITY) if has_authority else None
        with self._act("secret changed", person) as (session, act):
            key_rows.add_event(act, person=person, event="secret changed")
            for what, held in ((_OWN, opened), (_AUTHORITY, above)):
                if held is not None:
                    self._keep(
                        session, person, what, held.private_key, new_passphrase, new_pin, secret
                    )

    def retire(
        self, person: Person, *, reason: str, by: Sitting, pin: str, act_id: str | None = None
    ) -> None:
        """Let a person sign no more; what they signed stays good.

        Raises
        ------
        TrustError
            If `by` is no other inspector, or the PIN is another.
        """
        self._inspector(by.whose.person)
        if by.whose.person == person.key:
            raise TrustError("Nobody retires themselves; another inspector does it.")
        self._event("retired", person, reason, by, pin, drop=True, act_id=act_id)

    def unlock(
        self, person: Person, *, reason: str, by: Sitting, pin: str, act_id: str | None = None
    ) -> None:
        """Give a locked person their tries back.

        Raises
        ------
        TrustError
            If `by` is no other inspector, or the PIN is another.
        """
        self._inspector(by.whose.person)
        if by.whose.person == person.key:
            raise TrustError("Nobody unlocks themselves; another inspector does it.")
        self._event("unlocked", person, reason, by, pin, drop=False, act_id=act_id)

    # Sittings and signatures --------------------------------------------------------------------

    def open_sitting(self, person: str, passphrase: str) -> Sitting:
        """Open a sitting with the passphrase.

        Raises
        ------
        WrongSecretError, WaitError, LockedError
            If the passphrase is another; too soon after wrong tries; after too many.
        ShopSecretMissingError
            If the shop secret is not on this computer.
        """
        opened = self._proved(person, passphrase, _OWN)
        authority = self._unwrapped(person, passphrase, _AUTHORITY)
        paper = self.papers()[person]
        whose = Whose(person, self._name(person), paper.certificate, paper.authority)
        return Sitting(
            whose,
            opened,
            shop_secret=self.secret_place().read(),
            authority_key=None if authority is None else authority.private_key,
            steady=self._steady,
        )

    def preview(self, number: str, entry: Signature) -> ToSign:
        """Say what a signature would cover now, for the person to see before the PIN is asked."""
        with self._store.reading() as session:
            return to_sign(session, number, entry, name=self._name(entry.by))

    def sign(
        self, number: str, entry: Signature, *, seen: ToSign, sitting: Sitting, pin: str
    ) -> Recorded:
        """Sign what was seen; the value goes into the record with its entry, in one act.

        Raises
        ------
        NotAllowedError
            If the person may not sign here now, or the record has moved on since it was seen.
        WrongSecretError, SittingClosedError
            If the PIN is another, or the sitting has ended.
        """
        if sitting.whose.person != entry.by:
            raise SittingClosedError(self._name(entry.by))
        value = self._signed(sitting, seen.text, pin)
        paper = sitting.whose
        signed = SignedWith(seen.text, value, paper.certificate, paper.authority)
        return self._acts.record(number, entry, signed=signed)

    # What it rests on ---------------------------------------------------------------------------

    def _signed(self, sitting: Sitting, text: str, pin: str) -> str:
        return self._confirmed(sitting, lambda: b64encode(sitting.sign(text, pin=pin)).decode())

    def _confirmed(self, sitting: Sitting, use: Callable[[], _T]) -> _T:
        """Use a sitting's key; a wrong PIN is counted on the record."""
        person = sitting.whose.person
        standing = self.standing(person)
        if standing.retired:
            raise TrustError(f"{sitting.whose.name} is retired and signs no more.")
        if standing.locked:
            sitting.close()
            raise LockedError(sitting.whose.name)
        try:
            return use()
        except WrongSecretError:
            with self._act("wrong PIN", person) as (_, act):
                key_rows.add_event(act, person=person, event="wrong PIN")
            raise

    def _proved(self, person: str, passphrase: str, what: str) -> Opened:
        name = self._name(person)
        standing = self.standing(person)
        if standing.retired:
            raise TrustError(f"{name} is retired.")
        if not standing.has_key:
            raise TrustError(f"{name} has no key yet. An inspector enrols at the Register desk.")
        if standing.locked:
            raise LockedError(name)
        since = self._steady() - self._last_try.get(person, self._started)
        wait = seconds_to_wait(standing.tries) - since
        if wait > 0.0:
            raise WaitError(name, wait)
        # Missing, it is no fault of the person's, and no try.
        self.secret_place().read()
        with self._act("tried to open a sitting", person) as (_, act):
            key_rows.add_event(act, person=person, event="tried")
        self._last_try[person] = self._steady()
        opened = self._unwrapped(person, passphrase, what)
        if opened is None:
            left = LOCKED_AFTER - standing.tries - 1
            if left <= 0:
                raise LockedError(name)
            raise WrongSecretError(name, "passphrase", left)
        with self._act("opened a sitting", person) as (_, act):
            key_rows.add_event(act, person=person, event="proved")
        return opened

    def _unwrapped(self, person: str, passphrase: str, what: str) -> Opened | None:
        with self._store.reading() as session:
            wrapped = key_rows.wrap_of(session, person, what)
        if wrapped is None:
            return None
        secret = self.secret_place().read()
        return wrapping.unwrap(wrapped, passphrase=passphrase, person=person, shop_secret=secret)

    def _authority_of(self, by: Sitting, pin: str) -> Identity:
        self._inspector(by.whose.person)
        private = self._confirmed(by, lambda: by.authority_key(pin=pin))
        with self._store.reading() as session:
            known = key_rows.authority_of_the_shop(session)
        if private is None or known is None:
            raise TrustError(
                f"{by.whose.name} does not hold the shop's authority; an inspector who does "
                "gives keys."
            )
        return Identity(private, known[1])

    def _give_key(
        self,
        person: Person,
        passphrase: str,
        pin: str,
        by: Sitting,
        by_pin: str,
        *,
        event: str,
        reason: str,
        act_id: str | None,
    ) -> None:
        wrapping.refuse_weak_passphrase(passphrase)
        wrapping.refuse_weak_pin(pin)
        authority = self._authority_of(by, by_pin)
        shop = self.shop
        assert shop is not None
        private = new_key()
        paper = issue(
            authority, private_key=private, name=person.name, person=person.key,
            shop=shop.name, now=self._now(),
        )  # fmt: skip
        secret = self.secret_place().read()
        with self._act(event, by.whose.person, act_id) as (session, act):
            if act.already_recorded:
                return
            if event == "enrolled" and key_rows.wrap_of(session, person.key, _OWN) is not None:
                raise TrustError(f"{person.name} has a key already; replace it if it is lost.")
            act.add_people([person])
            known = key_rows.authority_of_the_shop(session)
            assert known is not None
            key_rows.add_certificate(
                act, person=person.key, authority_key=known[0], certificate=paper, reason=reason
            )
            key_rows.add_event(act, person=person.key, event=event, words=reason)
            self._keep(session, person.key, _OWN, private, passphrase, pin, secret)
            if person.role == "inspector":
                self._keep(
                    session, person.key, _AUTHORITY, authority.private_key, passphrase, pin, secret
                )

    def _event(
        self,
        event: str,
        person: Person,
        reason: str,
        by: Sitting,
        pin: str,
        *,
        drop: bool,
        act_id: str | None,
    ) -> None:
        if not reason.strip():
            raise TrustError("Say why; it stands on the record.")
        text = canonical_text(
            {"what": f"third journal, {event}", "person": person.key, "reason": reason,
             "by": by.whose.person, "at": self._acts.now()}
        )  # fmt: skip
        value = self._signed(by, text, pin)
        with self._act(event, by.whose.person, act_id) as (session, act):
            if act.already_recorded:
                return
            key_rows.add_event(
                act,
                person=person.key,
                event=event,
                words=reason,
                signed=(text, value, by.whose.certificate),
            )
            if drop:
                key_rows.keep_wrap(session, person.key, _OWN, None)
                key_rows.keep_wrap(session, person.key, _AUTHORITY, None)

    def _keep(
        self, session: Session, person: str, what: str, private: bytes, passphrase: str, pin: str,
        secret: bytes,
    ) -> None:  # fmt: skip
        wrapped = wrapping.wrap(
            private, passphrase=passphrase, pin=pin, person=person, shop_secret=secret,
            cost=self._cost,
        )  # fmt: skip
        key_rows.keep_wrap(session, person, what, wrapped)

    def _inspector(self, person: str) -> None:
        role = next((one.role for one in self.people() if one.key == person), None)
        if role != "inspector":
            raise TrustError(f"{self._name(person)} is no inspector; an inspector does this.")

    def _name(self, person: str) -> str:
        return next((one.name for one in self.people() if one.key == person), person)

    @contextmanager
    def _act(self, kind: str, by: str, act_id: str | None = None) -> Iterator[tuple[Session, Act]]:
        with (
            self._store.writing() as session,
            journal.act(
                session, chain=journal.SHOP, kind=kind, by=by,
                act_id=act_id or str(uuid.uuid4()),
                done_at=self._acts.now(),
            ) as act,
        ):  # fmt: skip
            yield session, act

    def _now(self) -> datetime:
        return self._store.clock()
