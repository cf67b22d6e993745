"""A sitting: somebody has proved who they are, for a while, at this window.

It opens with the passphrase only. While it is open, the PIN confirms each signature; it ends after
minutes without use, after a longer time in any case, and after wrong PINs. Time is the computer's
steady count, which setting the clock does not move.
"""

import time
from collections.abc import Callable
from dataclasses import dataclass

from models.trust.certificates import sign
from models.trust.errors import SittingClosedError, WrongSecretError
from models.trust.wrapping import Opened, pin_fits

__all__ = ["IDLE_SECONDS", "PIN_TRIES", "WHOLE_SECONDS", "Sitting"]

# Common practice for a bench that several people share.
IDLE_SECONDS = 5 * 60.0
WHOLE_SECONDS = 60 * 60.0
PIN_TRIES = 3


@dataclass(frozen=True)
class Whose:
    """Whose sitting it is, with the certificates that vouch for it."""

    person: str
    name: str
    certificate: str
    authority: str


class Sitting:
    """One person's open sitting; it holds the private key in memory and never writes it."""

    def __init__(
        self,
        whose: Whose,
        opened: Opened,
        *,
        shop_secret: bytes,
        authority_key: bytes | None = None,
        steady: Callable[[], float] = time.monotonic,
    ) -> None:
        self.whose = whose
        self._opened: Opened | None = opened
        self._shop_secret = shop_secret
        self._authority_key = authority_key
        self._steady = steady
        self._begun = self._used = steady()
        self._wrong = 0

    @property
    def is_open(self) -> bool:
        """Whether a PIN is enough to sign."""
        now = self._steady()
        if now - self._used > IDLE_SECONDS or now - self._begun > WHOLE_SECONDS:
            self.close()
        return self._opened is not None

    def close(self) -> None:
        """End the sitting; the keys are dropped."""
        self._opened = self._authority_key = None

    def authority_key(self, *, pin: str) -> bytes | None:
        """Give the key of the shop's authority once the PIN has confirmed it; None without one.

        Raises
        ------
        SittingClosedError, WrongSecretError
            As `confirm` does.
        """
        self.confirm(pin)
        return self._authority_key

    def confirm(self, pin: str) -> None:
        """Hold a PIN against the one that was set.

        Raises
        ------
        SittingClosedError
            If the sitting has ended.
        WrongSecretError
            If the PIN is another; at the third the sitting ends.
        """
        if not self.is_open or self._opened is None:
            raise SittingClosedError(self.whose.name)
        if pin_fits(
            self._opened,
            pin,
            person=self.whose.person,
            shop_secret=self._shop_secret,
        ):
            self._wrong = 0
            self._used = self._steady()
            return
        self._wrong += 1
        if self._wrong >= PIN_TRIES:
            self.close()
        raise WrongSecretError(self.whose.name, "PIN")

    def sign(self, text: str, *, pin: str) -> bytes:
        """Sign a text, once the PIN has confirmed it.

        Raises
        ------
        SittingClosedError, WrongSecretError
            As `confirm` does.
        """
        self.confirm(pin)
        assert self._opened is not None
        return sign(self._opened.private_key, text)
