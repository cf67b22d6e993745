"""The invented jobs, as they are packaged."""

from importlib.resources import files

from models import jobfile
from models.job import Job

__all__ = ["compressor", "pump"]


def compressor() -> Job:
    """Read the compressor's job: unfinished, just before its fourth impeller."""
    return _read("compressor.job.json")


def pump() -> Job:
    """Read the pump's job: finished and signed."""
    return _read("pump.job.json")


def _read(name: str) -> Job:
    return jobfile.loads(files("sample_data").joinpath(name).read_bytes())
