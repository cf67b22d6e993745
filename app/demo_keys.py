"""Keys of the demo's people: made like any others, with secrets that everybody may read."""

from base64 import b64encode
from collections.abc import Sequence
from pathlib import Path

from models.acts import Acts, Keys
from models.job import Job, KeySignature, Person, Signature
from models.record.signed_text import to_sign
from models.record.store import Session, Store
from models.trust.sitting import Sitting
from models.trust.wrapping import Cost

__all__ = ["PASSPHRASE", "PIN", "SECRET_WORDS", "DemoKeys"]

PASSPHRASE = "three invented words"
PIN = "271828"
SECRET_WORDS = f"Everybody's passphrase in the demo is \u201c{PASSPHRASE}\u201d, their PIN {PIN}."
# There is nothing to guess, so a guess may be cheap: the demo is made in seconds.
_COST = Cost(memory_kib=1024, passes=1, lanes=1)


class DemoKeys:
    """Gives everybody in the demo's jobs a key, and signs what they signed."""

    def __init__(self, store: Store, acts: Acts, *, secrets: Path | None) -> None:
        self._keys = Keys(store, acts, secrets=secrets, cost=_COST)
        self._sittings: dict[str, Sitting] = {}

    def make(self, jobs: Sequence[Job]) -> None:
        """Make the shop, its authority and a key for everybody; once."""
        people = {one.key: one for job in jobs for one in job.people}
        first = next(one for one in people.values() if one.role == "inspector")
        if self._keys.shop is None:
            self._keys.set_up(
                name="The demo shop (invented)",
                place=SECRET_WORDS,
                inspector=first,
                passphrase=PASSPHRASE,
                pin=PIN,
            )
        by = self._sitting(first.key)
        for person in people.values():
            self._enrol(person, by)
        for job in jobs:
            for one in job.entries:
                if isinstance(one, Signature):
                    self._sitting(one.by)

    def _enrol(self, person: Person, by: Sitting) -> None:
        if not self._keys.standing(person.key).has_key:
            self._keys.enrol(person, passphrase=PASSPHRASE, pin=PIN, by=by, by_pin=PIN)

    def _sitting(self, person: str) -> Sitting:
        if person not in self._sittings:
            self._sittings[person] = self._keys.open_sitting(person, PASSPHRASE)
        return self._sittings[person]

    def signer(self, session: Session, number: str, entry: Signature) -> KeySignature:
        """Put the person's key behind a signature that comes in."""
        # Opened beforehand: within the writing of a job no other act can be recorded.
        mine = self._sittings[entry.by]
        seen = to_sign(session, number, entry, name=mine.whose.name)
        value = mine.sign(seen.text, pin=PIN)
        return KeySignature(
            entry=entry.id,
            text=seen.text,
            value=b64encode(value).decode(),
            certificate=mine.whose.certificate,
            authority=mine.whose.authority,
        )
