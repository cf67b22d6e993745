"""The invented demo shop: made through the same door as everything else, judged, written up."""

import tempfile
import uuid
from dataclasses import dataclass
from pathlib import Path

from app.demo_keys import SECRET_WORDS, DemoKeys
from app.findings_text import summary
from models.acts import Acts
from models.assess import assess
from models.job import Job
from models.record.files import keep_file
from models.record.store import Store
from sample_data.beside import picture_content
from sample_data.load import compressor, pump

__all__ = ["Made", "make"]

# One name for every demo, so that making it again in the same folder brings nothing in twice.
_NAMESPACE = uuid.UUID("6f2f2f0e-7a55-4b0e-9c0b-5a3d4f3b9a10")


@dataclass(frozen=True)
class Made:
    """The demo shop that was made."""

    folder: Path
    job: str
    sign_in: str
    words: str


def make(folder: Path | None, *, secrets: Path | None = None) -> Made:
    """Make the demo shop in a folder, judge its jobs and write their travelers.

    Everybody has a key, under secrets that are printed: the demo's cost of guessing is nothing.
    """
    from reports import traveler

    home = folder if folder is not None else Path(tempfile.mkdtemp(prefix="thirdjournal-demo-"))
    home.mkdir(parents=True, exist_ok=True)
    unfinished = compressor()
    lines = ["The demo shop: two rotors, people and readings that are invented.", ""]
    with Store.open(home) as store:
        acts = Acts(store)
        # The file lies there before the row that speaks of it, as at every attaching.
        keep_file(home, picture_content())
        keys = DemoKeys(store, acts, secrets=secrets)
        keys.make((unfinished, pump()))
        for job in (unfinished, pump()):
            acts.bring_in(
                job,
                by=_technician(job),
                act_id=str(uuid.uuid5(_NAMESPACE, job.number)),
                signer=keys.signer,
            )
            view = assess(acts.read(job.number))
            written = home / f"traveler {job.number}.pdf"
            traveler.write(view, written)
            lines += [*summary(view), f"  traveler: {written}", f"  next: {view.next.words}", ""]
    lines += [SECRET_WORDS, ""]
    lines.append(f"Record: {home}")
    lines.append(f"Open it with: thirdjournal --shop {home}")
    return Made(home, unfinished.number, _technician(unfinished), "\n".join(lines))


def _technician(job: Job) -> str:
    return next(one.key for one in job.people if one.role == "technician")
