"""The one bend that best explains what a mount has moved."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
import numpy.typing as npt

from models.engineering.bow_shape import is_blind, kink_shape
from models.engineering.errors import OutOfRangeError
from models.engineering.weighed_stations import WeighedStations

__all__ = ["KinkFit", "fit_one_kink"]

_GRID = 401


@dataclass(frozen=True)
class KinkFit:
    """One place at which a change bends the shaft.

    Attributes
    ----------
    position : float
        Axial position of the kink, [m]
    position_uncertainty : float
        Half of the interval below, about one standard uncertainty, [m]
    position_interval : tuple of float
        Where else the kink may sit without fitting worse than noise does, [m]
    bend_angle : float
        Angle between the two straight lengths, never negative, [rad]
    clock_angle : float
        Clock angle towards which the shaft bulges between its journals, from 0 to 2π, [rad]
    bulge : float
        Offset of the kink from the journal axis, 0 on an overhang, [m]
    share_explained : float
        Share of the squared change, beyond a straight line, that the kink explains, [-]
    residual_rms : float
        Root mean square of what is left over the stations, [m]
    misfit_ratio : float
        What is left in units of its uncertainty: about 1 where one kink is the whole story, [-]
    improvement : float
        By how much the kink lowers the weighted squares below those of a straight line, in units of
        the scatter; below about 12 a kink is not proven, [-]
    blind : bool
        Whether the kink was put into a stretch that no indicator reaches, [-]
    """

    position: float
    position_uncertainty: float
    position_interval: tuple[float, float]
    bend_angle: float
    clock_angle: float
    bulge: float
    share_explained: float
    residual_rms: float
    misfit_ratio: float
    improvement: float
    blind: bool


def fit_one_kink(
    *,
    positions: npt.ArrayLike,
    changes: npt.ArrayLike,
    uncertainties: npt.ArrayLike,
    first_journal_position: float,
    second_journal_position: float,
    candidates: npt.ArrayLike | None = None,
    blind_stretches: Sequence[tuple[float, float]] = (),
) -> KinkFit:
    r"""Place, angle and direction of the one bend that best explains a change.

    .. math:: \min_{z_0,\,\kappa,\,a,\,b} \sum_k
        \frac{|\Delta_k - a - b z_k + \kappa \langle z_k - z_0 \rangle|^2}{u_k^2}

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, journals included, in any order, [m]
    changes : array_like
        Complex change at each, as `change_at_stations` gives it, NaN where unknown, [m]
    uncertainties : array_like
        Standard uncertainty of either component of after less before at each station, without the
        journals' share (`reading_uncertainties` of `change_at_stations`), [m]
    first_journal_position : float
        Axial position of one journal, [m]
    second_journal_position : float
        Axial position of the other, further along, [m]
    candidates : array_like, optional
        Only places to consider; without them the whole reach is searched, [m]
    blind_stretches : sequence of tuple
        Start and end of each stretch that no indicator reaches, [m]

    Returns
    -------
    kink : KinkFit
        Best place, angle and direction, and how well each is known, [m]

    Raises
    ------
    OutOfRangeError
        If fewer than four places have a change, an uncertainty is not positive, or the journals are
        not in order.

    Notes
    -----
    The line a + b z is left free, so that an error at a journal, which tilts every station's change
    together, does not pose as a kink. A bend between the last two stations at either end moves one
    station alone and cannot be placed within that stretch: it is put at its inner station, and the
    interval covers the stretch. The interval widens with the misfit where that exceeds 1.

    Examples
    --------
    40 µrad in the middle of 2 m: 20 µm there, 10 µm half-way.

    >>> kink = fit_one_kink(
    ...     positions=[0.0, 0.5, 1.0, 1.5, 2.0], changes=[0, 10e-6, 20e-6, 10e-6, 0],
    ...     uncertainties=[1e-6] * 5, first_journal_position=0.0, second_journal_position=2.0)
    >>> round(kink.position, 4), round(kink.bend_angle * 1e6, 4), round(kink.bulge * 1e6, 4)
    (1.0, 40.0, 20.0)

    References
    ----------
    .. [1] By hand: least squares of two lines that meet; no publication.
    """
    data = WeighedStations.of(positions, changes, uncertainties, minimum=4)
    kink, squares = _best_place(data, candidates)
    bend = data.bends(np.array([kink]))[0]
    angle = complex(bend @ data.left / (bend @ bend)) if bend @ bend > 0.0 else 0j
    freedom = max(2 * data.places.size - 7, 1)
    scale = max(1.0, squares / freedom)
    low, high = _interval(data, kink, squares + scale)
    shape = kink_shape(
        positions=[kink],
        kink_position=kink,
        first_journal=first_journal_position,
        second_journal=second_journal_position,
    )
    return KinkFit(
        position=kink,
        position_uncertainty=(high - low) / 2.0,
        position_interval=(low, high),
        bend_angle=abs(angle),
        clock_angle=float(np.angle(angle) % (2.0 * math.pi)),
        bulge=abs(angle) * float(shape[0]),
        share_explained=data.share_explained(squares),
        residual_rms=data.residual_rms(bend * angle),
        misfit_ratio=math.sqrt(squares / freedom),
        improvement=(data.squares - squares) / scale,
        blind=is_blind(position=kink, stretches=blind_stretches),
    )


def _best_place(data: WeighedStations, candidates: npt.ArrayLike | None) -> tuple[float, float]:
    if candidates is not None:
        grid = np.atleast_1d(np.asarray(candidates, dtype=np.float64))
        if grid.size < 1:
            raise OutOfRangeError("candidates", grid.size, "be one place or more")
        squares = data.squares_with(grid)
        best = int(np.argmin(squares))
        return float(grid[best]), float(squares[best])
    distinct = np.unique(data.places)
    low, high = distinct[1], distinct[-2]
    step = (high - low) / (_GRID - 1)
    grid = np.linspace(low, high, _GRID)
    for _ in range(2):
        squares = data.squares_with(grid)
        best = int(np.argmin(squares))
        grid = np.clip(grid[best] + np.linspace(-step, step, _GRID), low, high)
        step = 2.0 * step / (_GRID - 1)
    squares = data.squares_with(grid)
    best = int(np.argmin(squares))
    return float(grid[best]), float(squares[best])


def _interval(data: WeighedStations, kink: float, ceiling: float) -> tuple[float, float]:
    inside = np.linspace(data.places[0], data.places[-1], 2 * _GRID + 1)[1:-1]
    fitting = inside[data.squares_with(inside) <= ceiling]
    return float(min(fitting, default=kink)), float(max(fitting, default=kink))
