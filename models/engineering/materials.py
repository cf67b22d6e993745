"""Materials of rotor parts: how they expand, how stiff they are, and a shop's own.

The tabulated ones are in `material_table`. A shop that trusts its own certificate more makes its
own with `own_material`.
"""

import difflib
import math
from collections.abc import Sequence

from models.engineering.errors import OutOfRangeError
from models.engineering.material_table import MATERIALS, Material, MaterialSources

__all__ = [
    "EXPANSION_SPREAD",
    "LEAST_TEMPERATURE",
    "MATERIALS",
    "Material",
    "MaterialSources",
    "UnknownMaterialError",
    "material",
    "mean_expansion",
    "modulus",
    "own_material",
]

# Published mean coefficients from 20 to 100 °C of 0.4 % C Cr-Mo steel lie between 11.1 (European
# datasheets, from memory) and 13.1 (ASME II-D 2001, TE-1 group 2, read): 12.1 ± 8 %.
EXPANSION_SPREAD = 0.08
"""Spread of the mean expansion coefficient published for one steel, either way, relative."""

LEAST_TEMPERATURE = -50.0
"""Below this the tables say nothing, in °C."""

# Within this the held coefficient is off by less than a tenth of the published spread.
_EXPANSION_MARGIN = 10.0
# Steel loses about 2 % of its modulus in 40 K above room temperature (ASME B31.1 table of moduli).
_MODULUS_MARGIN = 40.0


class UnknownMaterialError(LookupError):
    """No material goes by that key; the message lists near ones."""


def mean_expansion(*, material: Material, temperature: float) -> float:
    r"""Mean coefficient of linear expansion from 20 °C to a temperature.

    A length grows by :math:`\Delta L = \bar\alpha(T)\,(T - 20)\,L`; between two tabulated
    temperatures the coefficient is taken on a straight line:

    .. math::

        \bar\alpha = \bar\alpha_a + (\bar\alpha_b - \bar\alpha_a)\frac{T - T_a}{T_b - T_a}

    Parameters
    ----------
    material : Material
        The material, with its table, [-]
    temperature : float
        Temperature of the part, :math:`T`, [°C]

    Returns
    -------
    expansion : float
        Mean coefficient from 20 °C, :math:`\bar\alpha`, [1/K]

    Raises
    ------
    OutOfRangeError
        If the temperature is below −50 °C or more than 10 K above the end of the table.

    Notes
    -----
    Below the first tabulated temperature its value holds, which says a little too much shrinkage
    for a chilled part: a few per cent at −50 °C. Tables that count from 70 °F (21 °C) are used as
    if they counted from 20 °C; that moves the coefficient by less than 0.1 %. One steel's published
    values differ by `EXPANSION_SPREAD` either way, whatever the digits of the table.

    Examples
    --------
    Half way between 12.3e-6 at 100 °C and 12.7e-6 at 200 °C:

    >>> mean_expansion(material=MATERIALS["4140"], temperature=150.0)
    1.25e-05

    References
    ----------
    .. [1] The material's own, in ``material.sources.mean_expansion``.
    """
    return _interpolated(
        temperature, material.expansion_temperatures, material.mean_expansions, _EXPANSION_MARGIN
    )


def modulus(*, material: Material, temperature: float) -> float:
    r"""Young's modulus at a temperature.

    Between two tabulated temperatures, on a straight line:

    .. math::

        E = E_a + (E_b - E_a)\frac{T - T_a}{T_b - T_a}

    Parameters
    ----------
    material : Material
        The material, with its table, [-]
    temperature : float
        Temperature of the part, :math:`T`, [°C]

    Returns
    -------
    modulus : float
        Young's modulus, :math:`E`, [Pa]

    Raises
    ------
    OutOfRangeError
        If the temperature is below −50 °C or more than 40 K above the end of the table; a material
        known at room temperature only thus serves up to 60 °C.

    Notes
    -----
    Outside the table, within those bounds, the end value holds; steel changes by about 2 % there.

    Examples
    --------
    Half way between 205 GPa at 100 °C and 195 GPa at 200 °C:

    >>> modulus(material=MATERIALS["42crmo4"], temperature=150.0)
    200000000000.0

    References
    ----------
    .. [1] The material's own, in ``material.sources.modulus``.
    """
    return _interpolated(
        temperature, material.modulus_temperatures, material.moduli, _MODULUS_MARGIN
    )


def material(*, name: str) -> Material:
    """Look a tabulated material up, and name near ones where there is none.

    Formula: the entry of `MATERIALS` under the key, capitals and blanks at the ends ignored.

    Parameters
    ----------
    name : str
        Key of the material, [-]

    Returns
    -------
    material : Material
        The material, [-]

    Raises
    ------
    UnknownMaterialError
        If there is none by that key.

    Examples
    --------
    >>> material(name="4140").name
    'AISI 4140 steel, quenched and tempered'

    References
    ----------
    .. [1] ``data/materials.csv``, a source on every row.
    """
    wanted = name.strip().lower()
    if wanted in MATERIALS:
        return MATERIALS[wanted]
    near = difflib.get_close_matches(wanted, MATERIALS, n=5, cutoff=0.4)
    near += [known for known in MATERIALS if wanted and wanted in known and known not in near]
    listed = ", ".join(near or MATERIALS)
    raise UnknownMaterialError(f"no material is called {name!r}; there are {listed}")


def own_material(
    *,
    name: str,
    source: str,
    density: float,
    poisson: float,
    mean_expansions: Sequence[tuple[float, float]],
    moduli: Sequence[tuple[float, float]],
    conductivity: float | None = None,
    specific_heat: float | None = None,
    yield_strength: float | None = None,
) -> Material:
    r"""Make a material from a shop's own numbers and their source.

    Formula: none; the numbers are checked and kept, pairs are put in order of temperature.

    Parameters
    ----------
    name : str
        Name of the material, [-]
    source : str
        Where the numbers come from: certificate, datasheet, own measurement, [-]
    density : float
        Density at 20 °C, [kg/m³]
    poisson : float
        Poisson's ratio, [-]
    mean_expansions : sequence of pairs
        Temperature and mean coefficient from 20 °C to it, [°C], [1/K]
    moduli : sequence of pairs
        Temperature and Young's modulus at it, [°C], [Pa]
    conductivity : float, optional
        Thermal conductivity near 20 °C, [W/(m·K)]
    specific_heat : float, optional
        Specific heat capacity near 20 °C, [J/(kg·K)]
    yield_strength : float, optional
        Least yield strength at 20 °C, [Pa]

    Returns
    -------
    material : Material
        The material; its key is its name, [-]

    Raises
    ------
    OutOfRangeError
        If name or source is empty, a table is empty or has a temperature twice, or a number cannot
        be what it is called: coefficients stay between 0 and 100e-6 1/K, moduli between 1 and
        1000 GPa, Poisson's ratio between 0 and 0.5.

    Examples
    --------
    >>> forging = own_material(
    ...     name="shaft forging", source="certificate of the forge", density=7850.0, poisson=0.29,
    ...     mean_expansions=[(100.0, 12.0e-6), (300.0, 13.0e-6)], moduli=[(20.0, 206e9)])
    >>> mean_expansion(material=forging, temperature=200.0)
    1.25e-05

    References
    ----------
    .. [1] The source given.
    """
    for label, text in (("name", name), ("source", source)):
        if not text.strip():
            raise OutOfRangeError(label, text, "be written out")
    _require("density", density, 500.0, 25000.0, "kg/m³")
    _require("poisson", poisson, 0.0, 0.5, "")
    expansion_table = _table("mean_expansions", mean_expansions, 0.0, 100e-6, "1/K")
    modulus_table = _table("moduli", moduli, 1e9, 1e12, "Pa")
    for label, value, greatest, unit in (
        ("conductivity", conductivity, 1000.0, "W/(m·K)"),
        ("specific_heat", specific_heat, 5000.0, "J/(kg·K)"),
        ("yield_strength", yield_strength, 5e9, "Pa"),
    ):
        if value is not None:
            _require(label, value, 0.0, greatest, unit)
    return Material(
        key=name.strip(),
        name=name.strip(),
        density=density,
        poisson=poisson,
        expansion_temperatures=tuple(expansion_table),
        mean_expansions=tuple(expansion_table.values()),
        modulus_temperatures=tuple(modulus_table),
        moduli=tuple(modulus_table.values()),
        sources=MaterialSources(
            mean_expansion=source,
            modulus=source,
            poisson=source,
            density=source,
            conductivity=source if conductivity is not None else None,
            specific_heat=source if specific_heat is not None else None,
            yield_strength=source if yield_strength is not None else None,
        ),
        conductivity=conductivity,
        specific_heat=specific_heat,
        yield_strength=yield_strength,
    )


def _require(label: str, value: float, above: float, below: float, unit: str) -> None:
    if not above < value < below:
        raise OutOfRangeError(label, value, f"lie between {above:g} and {below:g} {unit}".rstrip())


def _table(
    label: str, pairs: Sequence[tuple[float, float]], above: float, below: float, unit: str
) -> dict[float, float]:
    ordered = dict(sorted(pairs))
    if not pairs or len(ordered) < len(pairs) or not all(map(math.isfinite, ordered)):
        raise OutOfRangeError(label, pairs, "give one value at each of one or more temperatures")
    for value in ordered.values():
        _require(label, value, above, below, unit)
    return ordered


def _interpolated(
    temperature: float, temperatures: tuple[float, ...], values: tuple[float, ...], margin: float
) -> float:
    greatest = temperatures[-1] + margin
    if not LEAST_TEMPERATURE <= temperature <= greatest:
        raise OutOfRangeError(
            "temperature", temperature, f"lie between {LEAST_TEMPERATURE:g} and {greatest:g} °C"
        )
    if temperature <= temperatures[0]:
        return values[0]
    for upper in range(1, len(temperatures)):
        if temperature <= temperatures[upper]:
            low, high = temperatures[upper - 1], temperatures[upper]
            share = (temperature - low) / (high - low)
            return values[upper - 1] * (1.0 - share) + values[upper] * share
    return values[-1]
