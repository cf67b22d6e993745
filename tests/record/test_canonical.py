"""The canonical form is that of RFC 8785, for everything that is recorded."""

import hashlib
import unicodedata

import pytest
import rfc8785
from hypothesis import given
from hypothesis import strategies as st

from models.record.canonical import (
    FIRST_PREVIOUS,
    UnfitValueError,
    act_digest,
    canonical_bytes,
    canonical_text,
    normal,
    parse,
)

WORDS = st.text(st.characters(exclude_categories=["Cs"])).map(normal)
NAMES = st.text(st.characters(max_codepoint=127))
WHOLES = st.integers(-(2**53) + 1, 2**53 - 1)
VALUES = st.recursive(
    st.none() | st.booleans() | WHOLES | WORDS,
    lambda inner: st.lists(inner) | st.dictionaries(NAMES, inner),
    max_leaves=20,
)


@given(VALUES)
def test_every_value_is_written_as_the_rfc_package_writes_it(value: object) -> None:
    assert canonical_bytes(value) == rfc8785.dumps(value)


@given(VALUES)
def test_every_value_comes_back(value: object) -> None:
    assert parse(canonical_text(value)) == value


@pytest.mark.parametrize(
    "value",
    [
        1.0,
        float("nan"),
        2**53,
        -(2**53),
        {"größe": 1},
        {1: 2},
        b"bytes",
        unicodedata.normalize("NFD", "é"),
        "\ud800",
    ],
)
def test_a_value_without_a_canonical_form_is_refused(value: object) -> None:
    with pytest.raises(UnfitValueError):
        canonical_text([value])


@pytest.mark.parametrize(
    "text", ['{"b":1,"a":2}', "[1, 2]", '"\\u0041"', "1.0", '{"a":1,"a":1}', "x"]
)
def test_another_form_of_the_same_value_is_refused(text: str) -> None:
    with pytest.raises(UnfitValueError):
        parse(text)


def test_a_digest_is_plain_sha256_so_that_anybody_can_repeat_it() -> None:
    # By hand: domain line, 32 bytes of the digest before, then the body.
    told = b"third journal, act, edition 1\n" + bytes(32) + b'{"a":1}'
    assert act_digest(FIRST_PREVIOUS, b'{"a":1}') == hashlib.sha256(told).hexdigest()
