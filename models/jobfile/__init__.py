"""The portable form of a job: read, check, write.

`text` parses and lays out JSON, `schema` says what may stand where, `checks` what must hold true
across the job, `portable` leads through them.
"""

from models.jobfile.chain import Link, chain_of
from models.jobfile.faults import JobFileError
from models.jobfile.portable import EDITION, dumps, loads, read, write

__all__ = ["EDITION", "JobFileError", "Link", "chain_of", "dumps", "loads", "read", "write"]
