"""Certificates and signatures, checked also by the library's own verifier."""

from datetime import UTC, datetime

import pytest
from cryptography import x509
from cryptography.hazmat.primitives import hashes
from cryptography.hazmat.primitives.asymmetric import ec, rsa
from cryptography.hazmat.primitives.serialization import (
    BestAvailableEncryption,
    load_der_private_key,
    pkcs12,
)
from cryptography.x509 import verification

from models.trust.certificates import (
    certificate_fingerprint,
    is_issued_by,
    issue,
    make_authority,
    new_key,
    read_pkcs12,
    sign,
    signature_holds,
    subject_of,
    valid_between,
)
from models.trust.errors import CertificateError

NOW = datetime(2026, 12, 1, 10, 0, tzinfo=UTC)
SHOP = "Shop (invented)"


@pytest.fixture(scope="module")
def authority():
    return make_authority(SHOP, now=NOW)


@pytest.fixture(scope="module")
def person(authority):
    key = new_key()
    paper = issue(
        authority, private_key=key, name="Ansel Tarrowby", person="AT", shop=SHOP, now=NOW
    )
    return key, paper


def test_a_certificate_names_its_person_and_shop(person):
    _, paper = person
    assert subject_of(paper) == ("Ansel Tarrowby", "AT")
    begin, end = valid_between(paper)
    assert begin < NOW < end
    assert (end - begin).days == round(10 * 365.25)


def test_the_librarys_own_verifier_accepts_the_chain(authority, person):
    _, paper = person
    above = x509.load_pem_x509_certificate(authority.certificate.encode())
    verifier = (
        verification.PolicyBuilder()
        .store(verification.Store([above]))
        .time(NOW)
        .extension_policies(
            ca_policy=verification.ExtensionPolicy.webpki_defaults_ca(),
            ee_policy=verification.ExtensionPolicy.permit_all(),
        )
        .build_client_verifier()
    )
    chain = verifier.verify(x509.load_pem_x509_certificate(paper.encode()), []).chain
    assert chain[-1] == above


def test_only_the_authority_that_gave_it_vouches(authority, person):
    _, paper = person
    assert is_issued_by(paper, authority.certificate)
    assert not is_issued_by(paper, make_authority(SHOP, now=NOW).certificate)
    # A person's certificate vouches for nobody, not even if it signed.
    assert not is_issued_by(paper, paper)
    assert not is_issued_by("no paper", authority.certificate)


def test_a_signature_holds_for_its_text_and_key_alone(person):
    key, paper = person
    value = sign(key, "0.0003 in")
    assert signature_holds(paper, "0.0003 in", value)
    assert not signature_holds(paper, "0.0004 in", value)
    assert not signature_holds(paper, "0.0003 in", sign(new_key(), "0.0003 in"))
    assert not signature_holds(paper, "0.0003 in", b"no value")
    # The same by the library alone.
    public = load_der_private_key(key, None).public_key()
    public.verify(value, b"0.0003 in", ec.ECDSA(hashes.SHA256()))


def test_the_fingerprint_is_the_digest_of_the_whole_certificate(person):
    _, paper = person
    read = x509.load_pem_x509_certificate(paper.encode())
    assert certificate_fingerprint(paper) == read.fingerprint(hashes.SHA256()).hex()


def as_pkcs12(key, paper, words, above=()):
    return pkcs12.serialize_key_and_certificates(
        b"x", key, paper, list(above), BestAvailableEncryption(words)
    )


def test_papers_of_the_shops_own_come_from_a_pkcs12_file(authority, person):
    key, paper = person
    above = x509.load_pem_x509_certificate(authority.certificate.encode())
    mine = x509.load_pem_x509_certificate(paper.encode())
    data = as_pkcs12(load_der_private_key(key, None), mine, b"words", [above])
    brought = read_pkcs12(data, "words")
    assert brought.private_key == key
    assert brought.certificate == paper
    assert brought.above == (authority.certificate,)
    with pytest.raises(CertificateError, match="cannot be opened"):
        read_pkcs12(data, "other words")
    with pytest.raises(CertificateError, match="cannot be opened"):
        read_pkcs12(b"no file", "words")


def test_keys_of_another_kind_are_refused(person):
    big = rsa.generate_private_key(65537, 2048)
    with pytest.raises(CertificateError, match="elliptic-curve"):
        read_pkcs12(as_pkcs12(big, None, b"words"), "words")
