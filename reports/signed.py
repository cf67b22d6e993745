"""What stands behind a signature, in the words that a page or a screen shows."""

import json

from models.job import Job, Signature
from models.trust.certificates import certificate_fingerprint

__all__ = ["ON_TRUST", "behind_words"]

ON_TRUST = "name taken on trust"
_SHOWN = 12


def behind_words(job: Job, signature: Signature) -> str:
    """Say by which key a signature was given, and over what: the first 12 figures of each digest.

    Both can be compared: the first with the certificate's fingerprint at the shop's register, the
    second with what `verify` recomputes.
    """
    key = next((one for one in job.key_signatures if one.entry == signature.id), None)
    if key is None:
        return ON_TRUST
    over = str(json.loads(key.text)["covered_digest"])
    return f"key {_grouped(certificate_fingerprint(key.certificate))}, over {_grouped(over)}"


def _grouped(digest: str) -> str:
    return " ".join(digest[start : start + 4] for start in range(0, _SHOWN, 4))
