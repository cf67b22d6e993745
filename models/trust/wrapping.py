"""Private keys wrapped under a passphrase and a secret of the shop.

Whoever has the record's folder has the wrapped keys, but not the shop secret, which lies elsewhere;
whoever has both still has to guess the passphrase at the price of argon2id for each guess.
"""

import hmac
import json
import os
from base64 import b64decode, b64encode
from dataclasses import asdict, dataclass
from itertools import pairwise

from cryptography.exceptions import InvalidTag
from cryptography.hazmat.primitives.ciphers.aead import AESGCM
from cryptography.hazmat.primitives.kdf.argon2 import Argon2id

from models.trust.errors import CertificateError, SecretTooShortError

__all__ = [
    "LEAST_PASSPHRASE",
    "LEAST_PIN",
    "USUAL_COST",
    "Cost",
    "Opened",
    "pin_fits",
    "refuse_weak_passphrase",
    "refuse_weak_pin",
    "unwrap",
    "wrap",
]

LEAST_PASSPHRASE = 10
LEAST_PIN = 6
_FORM = 1


@dataclass(frozen=True)
class Cost:
    """What one guess costs: memory in KiB, passes over it, lanes."""

    memory_kib: int
    passes: int
    lanes: int


# A quarter of a second and 64 MiB a guess on a bench's computer (RFC 9106, second choice: 64 MiB,
# three passes, four lanes).
USUAL_COST = Cost(memory_kib=65536, passes=3, lanes=4)


@dataclass(frozen=True)
class Opened:
    """What a wrap holds: the private key, and how the PIN is recognised."""

    private_key: bytes
    pin_salt: bytes
    pin_print: bytes
    cost: Cost


def refuse_weak_passphrase(passphrase: str) -> None:
    """Refuse a new passphrase that is short or all one character.

    Raises
    ------
    SecretTooShortError
        If it is.
    """
    if len(passphrase) < LEAST_PASSPHRASE or len(set(passphrase)) < 4:
        raise SecretTooShortError(
            f"A passphrase has {LEAST_PASSPHRASE} characters or more, of different kinds; three "
            "or four words that nobody connects are easy to keep."
        )


def refuse_weak_pin(pin: str) -> None:
    """Refuse a new PIN that is no number of six digits or more, one digit repeated, or a run.

    Raises
    ------
    SecretTooShortError
        If it is.
    """
    if not (pin.isascii() and pin.isdigit()) or len(pin) < LEAST_PIN:
        raise SecretTooShortError(f"A PIN has {LEAST_PIN} digits or more, and nothing else.")
    steps = {int(after) - int(before) for before, after in pairwise(pin)}
    if len(steps) == 1 and steps <= {-1, 0, 1}:
        raise SecretTooShortError("A PIN of one digit, or counting up or down, is guessed first.")


def wrap(
    private_key: bytes,
    *,
    passphrase: str,
    pin: str,
    person: str,
    shop_secret: bytes,
    cost: Cost = USUAL_COST,
) -> str:
    """Wrap a private key; the result is text that may lie beside the record.

    Parameters
    ----------
    private_key : bytes
        The key, unencrypted PKCS#8 in DER.
    passphrase, pin : str
        The person's secrets. The PIN's print lies inside the wrap, so that nobody can guess at the
        PIN without the passphrase.
    person : str
        The person's key, bound into the wrap: nobody else's wrap takes its place.
    shop_secret : bytes
        The shop's own secret, from outside the record's folder.
    cost : Cost, optional
        What one guess at the passphrase costs.

    Returns
    -------
    str
        JSON with salt, nonce, cost and the encrypted key.

    Raises
    ------
    SecretTooShortError
        If passphrase or PIN is too weak.

    References
    ----------
    .. [1] RFC 9106, Argon2 memory-hard function; NIST SP 800-38D, Galois/Counter Mode.
    """
    refuse_weak_passphrase(passphrase)
    refuse_weak_pin(pin)
    salt, nonce, pin_salt = os.urandom(16), os.urandom(12), os.urandom(16)
    pin_print = _derived(pin, pin_salt, person, shop_secret, cost)
    plain = json.dumps(
        {"key": _text(private_key), "pin_salt": _text(pin_salt), "pin_print": _text(pin_print)}
    ).encode()
    locked = AESGCM(_derived(passphrase, salt, person, shop_secret, cost)).encrypt(
        nonce, plain, person.encode()
    )
    return json.dumps(
        {
            "form": _FORM,
            "cost": asdict(cost),
            "salt": _text(salt),
            "nonce": _text(nonce),
            "locked": _text(locked),
        },
        sort_keys=True,
    )


def unwrap(wrapped: str, *, passphrase: str, person: str, shop_secret: bytes) -> Opened | None:
    """Unwrap a key; None if the passphrase, the person or the shop secret is another.

    Raises
    ------
    CertificateError
        If the wrap is of a form that this program does not know, or damaged beyond reading.
    """
    try:
        read = json.loads(wrapped)
        if read["form"] != _FORM:
            raise CertificateError(f"The wrapped key has form {read['form']}, not {_FORM}.")
        cost = Cost(**read["cost"])
        key = _derived(passphrase, _bytes(read["salt"]), person, shop_secret, cost)
        plain = AESGCM(key).decrypt(_bytes(read["nonce"]), _bytes(read["locked"]), person.encode())
    except InvalidTag:
        return None
    except (KeyError, TypeError, ValueError) as error:
        raise CertificateError(
            f"The wrapped key of {person} cannot be read ({error}). Restore it from a backup, or "
            "give the person a new key."
        ) from error
    inside = json.loads(plain)
    key, pin_salt, pin_print = (_bytes(inside[name]) for name in ("key", "pin_salt", "pin_print"))
    return Opened(key, pin_salt, pin_print, cost)


def pin_fits(opened: Opened, pin: str, *, person: str, shop_secret: bytes) -> bool:
    """Say whether a PIN is the one that was set with the passphrase."""
    tried = _derived(pin, opened.pin_salt, person, shop_secret, opened.cost)
    return hmac.compare_digest(tried, opened.pin_print)


def _derived(secret: str, salt: bytes, person: str, shop_secret: bytes, cost: Cost) -> bytes:
    return Argon2id(
        salt=salt,
        length=32,
        iterations=cost.passes,
        lanes=cost.lanes,
        memory_cost=cost.memory_kib,
        ad=person.encode(),
        secret=shop_secret,
    ).derive(secret.encode())


def _text(value: bytes) -> str:
    return b64encode(value).decode()


def _bytes(value: str) -> bytes:
    return b64decode(value, validate=True)
