"""The shop's authority and the certificates it gives its people; checks need no secret.

Elliptic-curve keys on P-256 with SHA-256: every reader of signed documents knows them, and a
signature is 72 bytes.
"""

from dataclasses import dataclass
from datetime import UTC, datetime, timedelta

from cryptography import x509
from cryptography.exceptions import InvalidSignature, UnsupportedAlgorithm
from cryptography.hazmat.primitives import hashes
from cryptography.hazmat.primitives.asymmetric import ec
from cryptography.hazmat.primitives.serialization import (
    Encoding,
    NoEncryption,
    PrivateFormat,
    load_der_private_key,
    pkcs12,
)
from cryptography.x509.oid import ExtendedKeyUsageOID, NameOID

from models.trust.errors import CertificateError

__all__ = [
    "Identity",
    "certificate_fingerprint",
    "is_issued_by",
    "issue",
    "make_authority",
    "new_key",
    "read_pkcs12",
    "sign",
    "signature_holds",
    "subject_of",
    "valid_between",
]

_YEARS_OF_AUTHORITY = 30
_YEARS_OF_PERSON = 10
# Clocks of a shop's computers differ; a certificate must hold from the moment it is made.
_EARLIER = timedelta(hours=1)


@dataclass(frozen=True)
class Identity:
    """A private key (PKCS#8 in DER) with its certificate (PEM) and those above it."""

    private_key: bytes
    certificate: str
    above: tuple[str, ...] = ()


def new_key() -> bytes:
    """Make a new private key, as PKCS#8 in DER."""
    return _der(ec.generate_private_key(ec.SECP256R1()))


def make_authority(shop: str, *, now: datetime) -> Identity:
    """Make a shop's own authority: a key and a certificate that vouches for itself.

    Parameters
    ----------
    shop : str
        Name of the shop as it stands in its people's certificates.
    now : datetime
        The present, with its offset.
    """
    key = ec.generate_private_key(ec.SECP256R1())
    name = _name(shop, f"{shop}, signing authority of its record")
    built = (
        _builder(name, name, key.public_key(), now, _YEARS_OF_AUTHORITY)
        .add_extension(x509.BasicConstraints(ca=True, path_length=0), critical=True)
        .add_extension(_usage(signs_certificates=True), critical=True)
        .add_extension(x509.SubjectKeyIdentifier.from_public_key(key.public_key()), critical=False)
        .sign(key, hashes.SHA256())
    )
    return Identity(_der(key), _pem(built))


def issue(
    authority: Identity, *, private_key: bytes, name: str, person: str, shop: str, now: datetime
) -> str:
    """Give a person's key a certificate of the shop's authority, in PEM.

    Parameters
    ----------
    authority : Identity
        The shop's authority.
    private_key : bytes
        The person's key, PKCS#8 in DER; only its public half goes into the certificate.
    name, person, shop : str
        Printed name, key of the person in the record, name of the shop.
    now : datetime
        The present, with its offset.

    Raises
    ------
    CertificateError
        If the authority's key cannot be used.
    """
    above = x509.load_pem_x509_certificate(authority.certificate.encode())
    public = _private(private_key).public_key()
    built = (
        _builder(_name(shop, name, person), above.subject, public, now, _YEARS_OF_PERSON)
        .add_extension(x509.BasicConstraints(ca=False, path_length=None), critical=True)
        .add_extension(_usage(signs_certificates=False), critical=True)
        .add_extension(_above(authority), critical=False)
        .add_extension(
            x509.ExtendedKeyUsage([ExtendedKeyUsageOID.EMAIL_PROTECTION]), critical=False
        )
        .sign(_private(authority.private_key), hashes.SHA256())
    )
    return _pem(built)


def read_pkcs12(data: bytes, passphrase: str) -> Identity:
    """Take a key and certificate of the shop's own from a PKCS#12 file.

    Raises
    ------
    CertificateError
        If the passphrase is another, or the file holds no P-256 key with its certificate.
    """
    try:
        key, certificate, above = pkcs12.load_key_and_certificates(data, passphrase.encode())
    except ValueError as error:
        raise CertificateError(
            "The PKCS#12 file cannot be opened: it is damaged, or the passphrase is another."
        ) from error
    if not isinstance(key, ec.EllipticCurvePrivateKey) or certificate is None:
        raise CertificateError(
            "The PKCS#12 file must hold an elliptic-curve key (P-256) and its certificate."
        )
    if key.curve.name != "secp256r1":
        raise CertificateError(f"The key is on the curve {key.curve.name}; P-256 is needed.")
    return Identity(_der(key), _pem(certificate), tuple(_pem(one) for one in above))


def sign(private_key: bytes, text: str) -> bytes:
    """Sign a text (as UTF-8) with ECDSA and SHA-256; the value is DER."""
    return _private(private_key).sign(text.encode(), ec.ECDSA(hashes.SHA256()))


def signature_holds(certificate: str, text: str, value: bytes) -> bool:
    """Say whether a value is the signature of a certificate's key over a text."""
    try:
        public = x509.load_pem_x509_certificate(certificate.encode()).public_key()
        if not isinstance(public, ec.EllipticCurvePublicKey):
            return False
        public.verify(value, text.encode(), ec.ECDSA(hashes.SHA256()))
    except (InvalidSignature, UnsupportedAlgorithm, ValueError):
        return False
    return True


def is_issued_by(certificate: str, authority: str) -> bool:
    """Say whether a certificate was given by an authority that may give certificates."""
    try:
        mine = x509.load_pem_x509_certificate(certificate.encode())
        above = x509.load_pem_x509_certificate(authority.encode())
        mine.verify_directly_issued_by(above)
        limits = above.extensions.get_extension_for_class(x509.BasicConstraints).value
    except (InvalidSignature, UnsupportedAlgorithm, ValueError, TypeError, x509.ExtensionNotFound):
        return False
    return limits.ca


def subject_of(certificate: str) -> tuple[str, str]:
    """Read whose a certificate is: printed name, and key of the person in the record.

    Raises
    ------
    CertificateError
        If it is no certificate, or names nobody.
    """
    try:
        subject = x509.load_pem_x509_certificate(certificate.encode()).subject
    except ValueError as error:
        raise CertificateError(f"It is no certificate: {error}.") from error
    names = subject.get_attributes_for_oid(NameOID.COMMON_NAME)
    if not names:
        raise CertificateError("The certificate names nobody.")
    keys = subject.get_attributes_for_oid(NameOID.USER_ID)
    return str(names[0].value), str(keys[0].value) if keys else ""


def valid_between(certificate: str) -> tuple[datetime, datetime]:
    """Read from when to when a certificate holds, in UTC."""
    read = x509.load_pem_x509_certificate(certificate.encode())
    return read.not_valid_before_utc, read.not_valid_after_utc


def certificate_fingerprint(certificate: str) -> str:
    """Give the SHA-256 of a certificate, 64 hexadecimal digits: what people compare."""
    return x509.load_pem_x509_certificate(certificate.encode()).fingerprint(hashes.SHA256()).hex()


def _name(shop: str, common: str, person: str = "") -> x509.Name:
    parts = [
        x509.NameAttribute(NameOID.ORGANIZATION_NAME, shop[:64]),
        x509.NameAttribute(NameOID.COMMON_NAME, common[:64]),
    ]
    if person:
        parts.append(x509.NameAttribute(NameOID.USER_ID, person))
    return x509.Name(parts)


def _builder(
    subject: x509.Name,
    issuer: x509.Name,
    public: ec.EllipticCurvePublicKey,
    now: datetime,
    years: int,
) -> x509.CertificateBuilder:
    begin = now.astimezone(UTC) - _EARLIER
    return (
        x509.CertificateBuilder()
        .subject_name(subject)
        .issuer_name(issuer)
        .public_key(public)
        .serial_number(x509.random_serial_number())
        .not_valid_before(begin)
        .not_valid_after(begin + timedelta(days=round(365.25 * years)))
    )


def _above(authority: Identity) -> x509.AuthorityKeyIdentifier:
    public = _private(authority.private_key).public_key()
    return x509.AuthorityKeyIdentifier.from_issuer_public_key(public)


def _usage(*, signs_certificates: bool) -> x509.KeyUsage:
    return x509.KeyUsage(
        digital_signature=not signs_certificates,
        content_commitment=not signs_certificates,
        key_encipherment=False,
        data_encipherment=False,
        key_agreement=False,
        key_cert_sign=signs_certificates,
        crl_sign=signs_certificates,
        encipher_only=False,
        decipher_only=False,
    )


def _private(data: bytes) -> ec.EllipticCurvePrivateKey:
    try:
        key = load_der_private_key(data, None)
    except ValueError as error:
        raise CertificateError(f"The private key cannot be read: {error}.") from error
    if not isinstance(key, ec.EllipticCurvePrivateKey):
        raise CertificateError("The private key is of another kind than the program makes.")
    return key


def _der(key: ec.EllipticCurvePrivateKey) -> bytes:
    return key.private_bytes(Encoding.DER, PrivateFormat.PKCS8, NoEncryption())


def _pem(certificate: x509.Certificate) -> str:
    return certificate.public_bytes(Encoding.PEM).decode()
