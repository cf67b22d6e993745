"""The only door to change anything.

Each function is one act of a person: it opens the write transaction, takes the facts, asks
`progress`, has the journal insert the rows and the verdicts due at this gate, and closes the link
of the chain, all in one transaction. What comes back is on the disk.

The gate refuses to start; it never refuses to record what already happened: an entry that gives
its reason in `out_of_order` is taken and becomes a finding. Nothing ever stands before a removal.
"""

from models.acts.door import Acts, Reading, Recorded
from models.acts.instruments import Instruments, Touched
from models.acts.keys import Keys, KeyStanding
from models.acts.permissions import NotAllowedError
from models.acts.verdicts import new_id

__all__ = [
    "Acts",
    "Instruments",
    "KeyStanding",
    "Keys",
    "NotAllowedError",
    "Reading",
    "Recorded",
    "Touched",
    "new_id",
]
