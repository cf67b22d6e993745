"""What can be wrong with keys, secrets and certificates; each message names the way out."""

__all__ = [
    "CertificateError",
    "LockedError",
    "SecretTooShortError",
    "ShopSecretMissingError",
    "SittingClosedError",
    "TrustError",
    "WaitError",
    "WrongSecretError",
]


class TrustError(Exception):
    """Something about keys or secrets that a person can put right."""


class WrongSecretError(TrustError):
    """A passphrase or a PIN that does not fit."""

    def __init__(self, name: str, what: str, left: int | None = None) -> None:
        more = "" if left is None else f" {left} more and {name} is locked."
        super().__init__(f"That is not the {what} of {name}.{more} Type it again.")


class WaitError(TrustError):
    """Too soon after a wrong try."""

    def __init__(self, name: str, seconds: float) -> None:
        self.seconds = seconds
        super().__init__(
            f"After wrong tries {name} has to wait {seconds:.0f} s before the next one."
        )


class LockedError(TrustError):
    """Too many wrong tries."""

    def __init__(self, name: str) -> None:
        super().__init__(
            f"{name} is locked after too many wrong tries. Another inspector unlocks at the "
            "Register desk."
        )


class SecretTooShortError(TrustError):
    """A new passphrase or PIN that is too easy to guess."""


class SittingClosedError(TrustError):
    """Nobody has opened a sitting, or it has ended."""

    def __init__(self, name: str) -> None:
        super().__init__(f"The sitting of {name} has ended. Open it with the passphrase.")


class ShopSecretMissingError(TrustError):
    """The shop secret of this record is not on this computer."""

    def __init__(self, place: object) -> None:
        super().__init__(
            f"The shop secret is not on this computer ({place}). Bring it over from a computer "
            "that has it, or from the envelope in the safe; without it nobody can sign here."
        )


class CertificateError(TrustError):
    """A certificate or key that cannot be used."""
