"""How rotation widens a free ring and a free shaft, both taken as uniform discs."""

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = ["annulus_bore_growth", "annulus_bore_stress", "shaft_surface_growth"]


def annulus_bore_growth(
    *,
    bore_diameter: float,
    outer_diameter: float,
    modulus: float,
    poisson: float,
    density: float,
    speed: float,
) -> float:
    r"""Find how much the bore of a free rotating ring grows.

    .. math::

        \Delta d = \frac{\rho \omega^2 d}{16 E}\,[(3 + \nu) D^2 + (1 - \nu) d^2]

    Parameters
    ----------
    bore_diameter : float
        Diameter of the bore, :math:`d`, [m]
    outer_diameter : float
        Outer diameter, :math:`D`, [m]
    modulus : float
        Young's modulus, :math:`E`, [Pa]
    poisson : float
        Poisson's ratio, :math:`\nu`, [-]
    density : float
        Density, :math:`\rho`, [kg/m³]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    growth : float
        Growth of the bore on diameter, [m]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    Uniform thickness, elastic, plane stress. The same growth on radius is half as much.

    Examples
    --------
    A thin ring of 1 m grows by ρ·ω²·R²/E: 8000 · 200² · 0.5² / 200e9 = 400 µm on 1 m.

    >>> round(1e6 * annulus_bore_growth(
    ...     bore_diameter=1.0, outer_diameter=1.0000001, modulus=200e9, poisson=0.3,
    ...     density=8000.0, speed=200.0), 2)
    400.0

    References
    ----------
    .. [1] Gopalakrishnan et al., Design of Shrink Fit for Low Temperature Rotating Turbine
       Components, IJERT 6 (4), 2017, equation 3, on radius at any place.
    """
    _demand_disc(bore_diameter, outer_diameter, modulus, poisson, density)
    demand_positive("bore_diameter", bore_diameter)
    demand_not_negative("speed", speed)
    form = (3.0 + poisson) * outer_diameter**2 + (1.0 - poisson) * bore_diameter**2
    return density * speed**2 * bore_diameter / (16.0 * modulus) * form


def annulus_bore_stress(
    *, bore_diameter: float, outer_diameter: float, poisson: float, density: float, speed: float
) -> float:
    r"""Find the hoop stress that rotation alone makes at the bore of a ring.

    .. math::

        \sigma_\theta = \frac{\rho \omega^2}{16}\,[(3 + \nu) D^2 + (1 - \nu) d^2]

    Parameters
    ----------
    bore_diameter : float
        Diameter of the bore, :math:`d`, [m]
    outer_diameter : float
        Outer diameter, :math:`D`, [m]
    poisson : float
        Poisson's ratio, :math:`\nu`, [-]
    density : float
        Density, :math:`\rho`, [kg/m³]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    stress : float
        Hoop stress at the bore; that of the pressure left is added to it, [Pa]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    Uniform thickness, elastic, plane stress.

    Examples
    --------
    A thin ring of 1 m: ρ·ω²·R² = 8000 · 200² · 0.5² = 80 MPa.

    >>> round(annulus_bore_stress(
    ...     bore_diameter=1.0, outer_diameter=1.0000001, poisson=0.3, density=8000.0,
    ...     speed=200.0) / 1e6, 3)
    80.0

    References
    ----------
    .. [1] As for `annulus_bore_growth`; hoop strain times modulus, the radial stress being zero.
    """
    _demand_disc(bore_diameter, outer_diameter, 1.0, poisson, density)
    demand_positive("bore_diameter", bore_diameter)
    demand_not_negative("speed", speed)
    form = (3.0 + poisson) * outer_diameter**2 + (1.0 - poisson) * bore_diameter**2
    return density * speed**2 / 16.0 * form


def shaft_surface_growth(
    *,
    outer_diameter: float,
    bore_diameter: float,
    modulus: float,
    poisson: float,
    density: float,
    speed: float,
) -> float:
    r"""Find how much a free rotating shaft grows at its surface.

    .. math::

        \Delta d = \frac{\rho \omega^2 d}{16 E}\,[(1 - \nu) d^2 + (3 + \nu) b^2]

    Parameters
    ----------
    outer_diameter : float
        Diameter of the shaft, :math:`d`, [m]
    bore_diameter : float
        Bore of a hollow shaft, :math:`b`; 0 for a solid one, [m]
    modulus : float
        Young's modulus, :math:`E`, [Pa]
    poisson : float
        Poisson's ratio, :math:`\nu`, [-]
    density : float
        Density, :math:`\rho`, [kg/m³]
    speed : float
        Speed of rotation, :math:`\omega`, [rad/s]

    Returns
    -------
    growth : float
        Growth of the surface on diameter, [m]

    Raises
    ------
    OutOfRangeError
        If the diameters do not nest or a number cannot be what it is called.

    Notes
    -----
    On average along its length a solid shaft grows as much however long it is. Small beside the
    bore of a disc: 2 % of it for one three times as wide.

    Examples
    --------
    Solid, 200 mm, at 1000 rad/s: 8000 · 1000² · 0.2 · 0.7 · 0.04 / (16 · 200e9) = 14 µm.

    >>> round(1e6 * shaft_surface_growth(
    ...     outer_diameter=0.2, bore_diameter=0.0, modulus=200e9, poisson=0.3, density=8000.0,
    ...     speed=1000.0), 6)
    14.0

    References
    ----------
    .. [1] As for `annulus_bore_growth`, at the outer radius.
    """
    _demand_disc(bore_diameter, outer_diameter, modulus, poisson, density)
    demand_not_negative("speed", speed)
    form = (1.0 - poisson) * outer_diameter**2 + (3.0 + poisson) * bore_diameter**2
    return density * speed**2 * outer_diameter / (16.0 * modulus) * form


def _demand_disc(
    bore_diameter: float, outer_diameter: float, modulus: float, poisson: float, density: float
) -> None:
    demand_not_negative("bore_diameter", bore_diameter)
    demand_finite("outer_diameter", outer_diameter)
    if not bore_diameter < outer_diameter:
        raise OutOfRangeError("outer_diameter", outer_diameter, "exceed bore_diameter")
    demand_positive("modulus", modulus)
    if not 0.0 <= poisson <= 0.5:
        raise OutOfRangeError("poisson", poisson, "lie between 0 and 0.5")
    demand_positive("density", density)
