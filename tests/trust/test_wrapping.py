"""Wrapped keys: who has what, opens nothing, until passphrase, person and shop secret are right."""

import json
from base64 import b64decode, b64encode

import pytest
from cryptography.hazmat.primitives.ciphers.aead import AESGCM
from cryptography.hazmat.primitives.kdf.argon2 import Argon2id

from models.trust import wrapping
from models.trust.certificates import new_key
from models.trust.errors import CertificateError, SecretTooShortError

CHEAP = wrapping.Cost(memory_kib=32, passes=1, lanes=1)
WORDS, PIN, SECRET = "otter brass lantern", "271828", b"s" * 32


def wrapped(key: bytes = b"private", **more: object) -> str:
    facts = {"passphrase": WORDS, "pin": PIN, "person": "AT", "shop_secret": SECRET, "cost": CHEAP}
    return wrapping.wrap(key, **(facts | more))


def opened(text: str, **more: object) -> wrapping.Opened | None:
    facts = {"passphrase": WORDS, "person": "AT", "shop_secret": SECRET}
    return wrapping.unwrap(text, **(facts | more))


def test_the_right_secrets_give_the_key_back():
    key = new_key()
    found = opened(wrapped(key))
    assert found is not None
    assert found.private_key == key
    assert wrapping.pin_fits(found, PIN, person="AT", shop_secret=SECRET)
    assert not wrapping.pin_fits(found, "271829", person="AT", shop_secret=SECRET)


@pytest.mark.parametrize(
    "wrong",
    [{"passphrase": WORDS + " "}, {"person": "BQ"}, {"shop_secret": b"t" * 32}],
    ids=["passphrase", "person", "shop secret"],
)
def test_anything_else_gives_nothing(wrong):
    assert opened(wrapped(), **wrong) is None


def test_neither_key_nor_pin_nor_a_print_of_it_can_be_read_in_the_wrap():
    key = new_key()
    text = wrapped(key)
    bare = b64decode(json.loads(text)["locked"])
    assert key not in bare
    assert b64encode(key).decode() not in text
    assert "pin" not in text


def test_a_wrap_changed_anywhere_opens_no_more():
    read = json.loads(wrapped())
    for name in ("salt", "nonce", "locked"):
        raw = bytearray(b64decode(read[name]))
        raw[0] ^= 1
        assert opened(json.dumps(read | {name: b64encode(raw).decode()})) is None


def test_two_wraps_of_one_key_share_nothing():
    one, other = json.loads(wrapped()), json.loads(wrapped())
    assert all(one[name] != other[name] for name in ("salt", "nonce", "locked"))


def test_the_wrap_is_what_the_standards_say():
    """The same steps by hand, from the libraries' own functions (RFC 9106; SP 800-38D)."""
    read = json.loads(wrapped(b"private"))
    key = Argon2id(
        salt=b64decode(read["salt"]),
        length=32,
        iterations=read["cost"]["passes"],
        lanes=read["cost"]["lanes"],
        memory_cost=read["cost"]["memory_kib"],
        ad=b"AT",
        secret=SECRET,
    ).derive(WORDS.encode())
    plain = AESGCM(key).decrypt(b64decode(read["nonce"]), b64decode(read["locked"]), b"AT")
    assert b64decode(json.loads(plain)["key"]) == b"private"


@pytest.mark.parametrize("form", ["{}", "no json", '{"form": 9}'])
def test_what_is_no_wrap_is_told(form):
    with pytest.raises(CertificateError, match="wrapped key"):
        opened(form)


@pytest.mark.parametrize("weak", ["short", "aaaaaaaaaaaa", "ababababab"])
def test_weak_passphrases_are_refused(weak):
    with pytest.raises(SecretTooShortError, match="10 characters"):
        wrapped(passphrase=weak)


@pytest.mark.parametrize(
    ("weak", "said"),
    [
        ("12345", "6 digits"),
        ("12345a", "6 digits"),
        ("٠١٢٣٤٧", "6 digits"),
        ("111111", "one digit"),
        ("456789", "counting"),
        ("987654", "counting"),
    ],
)
def test_weak_pins_are_refused(weak, said):
    with pytest.raises(SecretTooShortError, match=said):
        wrapped(pin=weak)
