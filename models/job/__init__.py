"""The frozen job: its plan, its entries, and nothing that computes.

Everything that judges, draws or prints a job starts from these types. They hold numbers as typed
(`models.units`), never bare floats, except where a setting has no unit.
"""

from models.job.acceptance import *  # noqa: F403
from models.job.acceptance_plan import *  # noqa: F403
from models.job.balance import *  # noqa: F403
from models.job.balance_plan import *  # noqa: F403
from models.job.base import *  # noqa: F403
from models.job.cooling_watch import *  # noqa: F403
from models.job.draw_up import *  # noqa: F403
from models.job.entries import *  # noqa: F403
from models.job.events import *  # noqa: F403
from models.job.heat_words import *  # noqa: F403
from models.job.job import *  # noqa: F403
from models.job.limits import *  # noqa: F403
from models.job.loads import *  # noqa: F403
from models.job.material import *  # noqa: F403
from models.job.origin import *  # noqa: F403
from models.job.plan import *  # noqa: F403
from models.job.standing import *  # noqa: F403
from models.job.taper import *  # noqa: F403
