"""What people do with their keys in the window: signing, sittings, first start, the register.

Each act is asked for in one form: whose name is about to stand under what, then the secrets. The
secrets go to the writing thread and are kept nowhere.
"""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.entry.fields import ChoiceField, FormField, SecretField, TextField
from app.presenters.writing import Writer
from models.acts import Keys, KeyStanding, NotAllowedError, Recorded, new_id
from models.job import Person, Role, Signature
from models.record.errors import RecordError
from models.record.signed_text import ToSign
from models.trust.certificates import certificate_fingerprint, valid_between
from models.trust.errors import TrustError
from models.trust.sitting import Sitting

__all__ = ["Asking", "KeysPresenter", "RegisterRow"]

_ROLES: tuple[Role, ...] = ("technician", "inspector", "engineer", "witness")
_MEANINGS = {
    "performed": "did the work as it is recorded here",
    "inspected": "read the record and agrees with it",
    "witnessed": "was present at what is recorded here",
    "decided": "decided what is recorded here, and answers for it",
    "issued": "issues this for work",
}
Answers = Mapping[str, str]


@dataclass(frozen=True, kw_only=True)
class Asking:
    """One form to be filled: what is about to happen, in whose name, and what is asked."""

    title: str
    who: str
    lines: tuple[str, ...]
    fields: tuple[FormField, ...]
    take: str
    note: str = ""


@dataclass(frozen=True, kw_only=True)
class RegisterRow:
    """A person in the register, in words."""

    person: Person
    standing: str
    certificate: str
    locked: bool = False
    has_key: bool = False


class KeysPresenter(QObject):
    """Asks one thing at a time and does it in the writing thread."""

    asked = Signal(object)
    """A form is to be shown; carries an `Asking`."""
    refused = Signal(str)
    """What was answered does not serve; the form stays. Carries the sentence."""
    finished = Signal()
    """What was asked is done; the form goes."""
    changed = Signal()
    """People, keys or the shop itself have changed."""

    def __init__(self, keys: Keys, writer: Writer, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._keys = keys
        self._writer = writer
        self._sitting: Sitting | None = None
        self._act: Callable[[Answers], Any] | None = None
        self._done: Callable[[Any], None] | None = None
        self._has_keys = False

    # What there is ------------------------------------------------------------------------------

    @property
    def needs_key(self) -> bool:
        """Whether a signature needs a key: the shop has an authority."""
        self._has_keys = self._has_keys or self._keys.shop is not None
        return self._has_keys

    @property
    def shop_words(self) -> str:
        """The shop's name and place, or that it has no keys yet."""
        shop = self._keys.shop
        if shop is None:
            return "This shop has no keys yet; names are taken on trust."
        return ". ".join(part for part in (shop.name, shop.place) if part)

    @property
    def sitting(self) -> Sitting | None:
        """The sitting that is open; None where nobody's is."""
        if self._sitting is not None and not self._sitting.is_open:
            self._sitting = None
        return self._sitting

    def leave(self) -> None:
        """End the sitting: somebody else sits down, or nobody does."""
        if self._sitting is not None:
            self._sitting.close()
            self._sitting = None

    def rows(self) -> tuple[RegisterRow, ...]:
        """Give the register's people."""
        papers = self._keys.papers()
        return tuple(
            _row(one, self._keys.standing(one.key), papers.get(one.key))
            for one in self._keys.people()
        )

    # Signing ------------------------------------------------------------------------------------

    def ask_to_sign(
        self, number: str, entry: Signature, *, done: Callable[[Recorded], None]
    ) -> None:
        """Show what a signature covers, then sign it with the secrets that are given."""

        def shown(seen: ToSign) -> None:
            self._act = lambda answers: self._sign(number, entry, seen, answers)
            self._done = done
            self.asked.emit(self._signing(number, entry, seen))

        self._writer.write(
            lambda: self._keys.preview(number, entry), done=shown, refused=self._refuse
        )

    def _signing(self, number: str, entry: Signature, seen: ToSign) -> Asking:
        name = self._name(entry.by)
        digest = " ".join(seen.digest[start : start + 4] for start in range(0, 12, 4))
        mine = self.sitting is not None and self.sitting.whose.person == entry.by
        secrets: tuple[FormField, ...] = (SecretField(name="pin", label="PIN"),)
        if not mine:
            secrets = (SecretField(name="passphrase", label="Passphrase"), *secrets)
        return Asking(
            title="Sign",
            who=name,
            lines=(
                f"Signs as {entry.role}, “{entry.meaning}”: {_MEANINGS[entry.meaning]}.",
                f"Covers {entry.covers} of job {number}, as recorded up to act "
                f"{seen.head.sequence}; digest {digest}.",
            ),
            fields=secrets,
            take=f"Sign as {name}",
            note=self.shop_words,
        )

    def _sign(self, number: str, entry: Signature, seen: ToSign, answers: Answers) -> Recorded:
        sitting = self._sitting_of(entry.by, answers)
        return self._keys.sign(number, entry, seen=seen, sitting=sitting, pin=answers["pin"])

    def _sitting_of(self, person: str, answers: Answers) -> Sitting:
        sitting = self.sitting
        if sitting is None or sitting.whose.person != person:
            self.leave()
            sitting = self._sitting = self._keys.open_sitting(person, answers.get("passphrase", ""))
        return sitting

    # First start and register ---------------------------------------------------------------------

    def ask_first_start(self) -> None:
        """Ask for the shop and its first inspector."""

        def act(answers: Answers) -> None:
            passphrase, pin = _twice(answers)
            inspector = _person(answers, "inspector")
            self._keys.set_up(
                name=answers["shop"], place=answers.get("place", ""), inspector=inspector,
                passphrase=passphrase, pin=pin, act_id=new_id(),
            )  # fmt: skip

        self._ask(
            Asking(
                title="A new shop",
                who="The shop and its first inspector",
                lines=(
                    "The shop gets an authority of its own, which vouches for its people's keys. "
                    "Its first inspector gives everybody else theirs.",
                    "Without the passphrase nobody can sign, and nobody can find it out for you.",
                ),
                fields=(
                    TextField(name="shop", label="Name of the shop"),
                    TextField(name="place", label="Place", optional=True),
                    TextField(name="name", label="Printed name of the inspector"),
                    TextField(name="initials", label="Initials"),
                    *_NEW_SECRETS,
                ),
                take="Make the shop",
                note=f"The shop secret is kept on this computer, outside the record: "
                f"{self._secret_words()}. Keep a copy of it in the safe.",
            ),
            act,
        )

    def ask_enrol(self, by: str) -> None:
        """Ask for a new person, whom an inspector gives a key."""

        def act(answers: Answers) -> None:
            passphrase, pin = _twice(answers)
            role = answers["role"]
            person = _person(answers, role, employer=answers.get("employer", ""))
            self._keys.enrol(
                person, passphrase=passphrase, pin=pin, by=self._sitting_of(by, _mine(answers)),
                by_pin=answers["my pin"], act_id=new_id(),
            )  # fmt: skip

        self._ask(
            Asking(
                title="A new person",
                who=f"{self._name(by)} gives somebody a key",
                lines=("The person types their own passphrase and PIN, unseen by anybody.",),
                fields=(
                    TextField(name="name", label="Printed name"),
                    TextField(name="initials", label="Initials"),
                    ChoiceField(name="role", label="Role", answers=_ROLES),
                    TextField(name="employer", label="Acts for, if not the shop", optional=True),
                    *_NEW_SECRETS,
                    *self._own_secrets(by),
                ),
                take="Give a key",
            ),
            act,
        )

    def ask_replace(self, person: Person, by: str) -> None:
        """Ask for new secrets of somebody whose key is lost."""

        def act(answers: Answers) -> None:
            passphrase, pin = _twice(answers)
            self._keys.replace_key(
                person, passphrase=passphrase, pin=pin, reason=answers["reason"],
                by=self._sitting_of(by, _mine(answers)), by_pin=answers["my pin"], act_id=new_id(),
            )  # fmt: skip

        self._ask(
            Asking(
                title="A new key for a lost one",
                who=f"{self._name(by)} gives {person.name} a new key",
                lines=("What was signed with the old key stays good.",),
                fields=(
                    TextField(name="reason", label="Why"),
                    *_NEW_SECRETS,
                    *self._own_secrets(by),
                ),
                take="Replace the key",
            ),
            act,
        )

    def ask_unlock(self, person: Person, by: str) -> None:
        """Ask an inspector to unlock somebody."""
        self._ask_event("Unlock", person, by, "unlocks", self._keys.unlock)

    def ask_retire(self, person: Person, by: str) -> None:
        """Ask an inspector to retire somebody."""
        self._ask_event("Retire", person, by, "retires", self._keys.retire)

    def _ask_event(
        self, take: str, person: Person, by: str, does: str, act_on: Callable[..., None]
    ) -> None:
        def act(answers: Answers) -> None:
            act_on(
                person, reason=answers["reason"], by=self._sitting_of(by, _mine(answers)),
                pin=answers["my pin"], act_id=new_id(),
            )  # fmt: skip

        self._ask(
            Asking(
                title=take,
                who=f"{self._name(by)} {does} {person.name}",
                lines=("Name, moment and reason stand on the record, signed.",),
                fields=(TextField(name="reason", label="Why"), *self._own_secrets(by)),
                take=f"{take} {person.name}",
            ),
            act,
        )

    def ask_change(self, person: Person) -> None:
        """Ask somebody for a new passphrase and PIN."""

        def act(answers: Answers) -> None:
            passphrase, pin = _twice(answers)
            self._keys.change_secret(
                person.key, passphrase=answers["my passphrase"], new_passphrase=passphrase,
                new_pin=pin,
            )  # fmt: skip
            self.leave()

        self._ask(
            Asking(
                title="New passphrase and PIN",
                who=person.name,
                lines=("The old ones open nothing afterwards; what was signed stays good.",),
                fields=(
                    SecretField(name="my passphrase", label="Passphrase until now"),
                    *_NEW_SECRETS,
                ),
                take="Change both",
            ),
            act,
        )

    # The form ---------------------------------------------------------------------------------

    def answer(self, answers: Answers) -> None:
        """Do what was asked with what was typed."""
        act = self._act
        if act is None:
            return
        given = dict(answers)
        self._writer.write(lambda: act(given), done=self._finish, refused=self._refuse)

    def give_up(self) -> None:
        """Put the form away; nothing happens."""
        self._act = self._done = None

    def _ask(self, asking: Asking, act: Callable[[Answers], Any]) -> None:
        self._act, self._done = act, None
        self.asked.emit(asking)

    def _finish(self, result: Any) -> None:  # noqa: ANN401  (the Writer hands back anything)
        done, self._act, self._done = self._done, None, None
        self.finished.emit()
        self.changed.emit()
        if done is not None:
            done(result)

    def _refuse(self, error: Exception) -> None:
        if isinstance(error, NotAllowedError):
            self.refused.emit(error.words)
        elif isinstance(error, TrustError | RecordError):
            self.refused.emit(str(error))
        else:
            raise error

    def _own_secrets(self, by: str) -> tuple[FormField, ...]:
        pin = SecretField(name="my pin", label=f"PIN of {self._name(by)}")
        if self.sitting is not None and self.sitting.whose.person == by:
            return (pin,)
        return (SecretField(name="my passphrase", label=f"Passphrase of {self._name(by)}"), pin)

    def _secret_words(self) -> str:
        from models.trust.shop_secret import usual_place

        return str(usual_place())

    def _name(self, person: str) -> str:
        return next((one.name for one in self._keys.people() if one.key == person), person)


_NEW_SECRETS: tuple[FormField, ...] = (
    SecretField(name="passphrase", label="New passphrase"),
    SecretField(name="passphrase again", label="The same again"),
    SecretField(name="pin", label="New PIN, six digits or more"),
    SecretField(name="pin again", label="The PIN again"),
)


def _twice(answers: Answers) -> tuple[str, str]:
    """Take new secrets that were typed twice.

    Raises
    ------
    TrustError
        If the two are not the same.
    """
    for what in ("passphrase", "pin"):
        if answers[what] != answers[f"{what} again"]:
            raise TrustError(f"The two {what}s typed are not the same. Type both again.")
    return answers["passphrase"], answers["pin"]


def _mine(answers: Answers) -> Answers:
    return {"passphrase": answers.get("my passphrase", "")}


def _person(answers: Answers, role: str, employer: str = "") -> Person:
    if role not in _ROLES:
        raise TrustError(f"A role is one of {', '.join(_ROLES)}.")
    initials = answers["initials"].strip()
    return Person(
        key=initials,
        name=answers["name"].strip(),
        initials=initials,
        role=role,
        employer=employer,
    )


def _row(person: Person, standing: KeyStanding, paper: Any) -> RegisterRow:  # noqa: ANN401
    words = "has no key"
    if standing.retired:
        words = "retired"
    elif standing.locked:
        words = f"locked after {standing.tries} wrong tries"
    elif standing.has_key:
        words = "may sign" if not standing.tries else f"may sign; {standing.tries} wrong tries"
    certificate = ""
    if paper is not None:
        print_ = certificate_fingerprint(paper.certificate)
        _, end = valid_between(paper.certificate)
        shown = " ".join(print_[start : start + 4] for start in range(0, 16, 4))
        certificate = f"{shown}, until {end:%Y-%m-%d}"
    return RegisterRow(
        person=person,
        standing=words,
        certificate=certificate,
        locked=standing.locked,
        has_key=standing.has_key,
    )
