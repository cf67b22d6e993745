"""The shop's own secret: a file outside the record's folder that only its owner may read."""

import os
from pathlib import Path

from platformdirs import user_config_path

from models.trust.errors import ShopSecretMissingError

__all__ = ["SecretPlace", "usual_place"]

_SIZE = 32


def usual_place() -> Path:
    """Give the folder where the secrets of a user's shops lie."""
    return user_config_path("thirdjournal") / "shop secrets"


class SecretPlace:
    """Where the secret of one shop lies on this computer."""

    def __init__(self, shop: str, folder: Path | None = None) -> None:
        self.path = (folder or usual_place()) / f"{shop}.secret"

    def make(self) -> bytes:
        """Make a new secret, once; one that is there is given as it is."""
        self.path.parent.mkdir(parents=True, exist_ok=True, mode=0o700)
        try:
            handle = os.open(self.path, os.O_CREAT | os.O_EXCL | os.O_WRONLY, 0o600)
        except FileExistsError:
            return self.read()
        secret = os.urandom(_SIZE)
        try:
            os.write(handle, secret)
            os.fsync(handle)
        finally:
            os.close(handle)
        return secret

    def read(self) -> bytes:
        """Read the secret.

        Raises
        ------
        ShopSecretMissingError
            If it is not on this computer, or not whole.
        """
        try:
            secret = self.path.read_bytes()
        except OSError as error:
            raise ShopSecretMissingError(self.path) from error
        if len(secret) != _SIZE:
            raise ShopSecretMissingError(self.path)
        return secret

    @property
    def is_narrow(self) -> bool:
        """Whether nobody but its owner may read it."""
        return os.name != "posix" or self.path.stat().st_mode & 0o077 == 0
