"""Time one guess at a passphrase, and what signing costs.

Run it as `python -m tests.bench.key_speed`; it prints milliseconds and asserts nothing.
"""

import statistics
import sys
import time
from collections.abc import Callable

from models.trust.certificates import new_key, sign
from models.trust.wrapping import USUAL_COST, unwrap, wrap

WORDS, PIN, SECRET = "otter brass lantern", "271828", b"s" * 32


def timed(name: str, times: int, what: Callable[[], object]) -> None:
    spent = []
    for _ in range(times):
        begun = time.perf_counter()
        what()
        spent.append((time.perf_counter() - begun) * 1000.0)
    sys.stdout.write(f"{name:<48} median {statistics.median(spent):9.2f} ms\n")


def main() -> None:
    """Print the figures."""
    key = new_key()
    kept = wrap(key, passphrase=WORDS, pin=PIN, person="AT", shop_secret=SECRET)
    sys.stdout.write(f"{USUAL_COST}\n")
    timed(
        "one guess at a passphrase",
        10,
        lambda: unwrap(kept, passphrase="not it at all", person="AT", shop_secret=SECRET),
    )
    timed("one signature", 200, lambda: sign(key, "x" * 2000))


if __name__ == "__main__":
    main()
