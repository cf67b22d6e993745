"""What moved in service, in words, for the command line."""

from models.assess import assess
from models.assess.in_service import in_service
from models.job import Job

__all__ = ["compared"]


def compared(earlier: Job, present: Job) -> tuple[str, bool]:
    """Say what moved between two jobs of one rotor, and whether it is told that nothing did.

    Raises
    ------
    models.assess.in_service.InServiceError
        If the two jobs cannot be compared.
    """
    found = in_service(assess(earlier), present)
    lines = [
        f"Rotor {present.plan.rotor.serial}: as received in job {present.number} "
        f"({found.received.done_at}) less as left by job {earlier.number} ({found.left.done_at})",
        found.sentence,
        *(f"Look out: {words}." for words in found.cautions),
        "",
        *(f"  {one.sentence}" for one in found.stations),
    ]
    told = any(one.one_clock and one.change.tir is not None for one in found.stations)
    return "\n".join(lines), told and not found.moved and not found.cautions
