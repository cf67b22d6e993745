"""The tabulated materials of rotor parts: one value a row, with its source beside it.

The table is ``data/materials.csv``; each value stands there in the unit its source prints.
"""

import csv
from collections import defaultdict
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from importlib import resources
from types import MappingProxyType

__all__ = ["MATERIALS", "Material", "MaterialSources"]

_SI_PER_UNIT = {
    "1e-6/K": 1e-6,
    "GPa": 1e9,
    "Msi": 6.894757293168e9,
    "MPa": 1e6,
    "kg/m3": 1.0,
    "W/(m K)": 1.0,
    "J/(kg K)": 1.0,
    "-": 1.0,
}


@dataclass(frozen=True)
class MaterialSources:
    """Where each property of one material was found.

    "read" says that the cited text was opened, "read second-hand" that a reproduction of it was,
    "from memory" that neither was.
    """

    mean_expansion: str
    modulus: str
    poisson: str
    density: str
    conductivity: str | None = None
    specific_heat: str | None = None
    yield_strength: str | None = None


@dataclass(frozen=True)
class Material:
    """One material with the source of every number."""

    key: str
    """Short name under which it is found in `MATERIALS`."""
    name: str
    """Name for people."""
    density: float
    """Density at 20 °C [kg/m³]."""
    poisson: float
    """Poisson's ratio [-]."""
    expansion_temperatures: tuple[float, ...]
    """Temperatures of the expansion table, rising [°C]."""
    mean_expansions: tuple[float, ...]
    """Mean coefficient from 20 °C to each of them [1/K]."""
    modulus_temperatures: tuple[float, ...]
    """Temperatures of the modulus table, rising [°C]."""
    moduli: tuple[float, ...]
    """Young's modulus at each of them [Pa]."""
    sources: MaterialSources
    """Where each property was found."""
    conductivity: float | None = None
    """Thermal conductivity near 20 °C [W/(m·K)]."""
    specific_heat: float | None = None
    """Specific heat capacity near 20 °C [J/(kg·K)]."""
    yield_strength: float | None = None
    """Least yield strength at 20 °C, None where heat treatment or section decides it [Pa]."""


def _joined(sources: Sequence[str]) -> str:
    return "; ".join(dict.fromkeys(sources))


def _loaded() -> Mapping[str, Material]:
    table = resources.files("models.engineering").joinpath("data", "materials.csv")
    rows: dict[str, list[dict[str, str]]] = defaultdict(list)
    for row in csv.DictReader(table.read_text(encoding="utf-8").splitlines()):
        rows[row["key"]].append(row)
    return MappingProxyType({key: _from_rows(key, rows[key]) for key in rows})


def _from_rows(key: str, rows: Sequence[Mapping[str, str]]) -> Material:
    values: dict[str, dict[float, float]] = defaultdict(dict)
    sources: dict[str, list[str]] = defaultdict(list)
    for row in rows:
        at = float(row["temperature_celsius"] or 20.0)
        values[row["property"]][at] = float(row["value"]) * _SI_PER_UNIT[row["unit"]]
        sources[row["property"]].append(row["source"])

    def single(name: str) -> float | None:
        return next(iter(values[name].values()), None)

    return Material(
        key=key,
        name=rows[0]["name"],
        density=values["density"][20.0],
        poisson=values["poisson"][20.0],
        expansion_temperatures=tuple(values["mean_expansion"]),
        mean_expansions=tuple(values["mean_expansion"].values()),
        modulus_temperatures=tuple(values["modulus"]),
        moduli=tuple(values["modulus"].values()),
        sources=MaterialSources(
            mean_expansion=_joined(sources["mean_expansion"]),
            modulus=_joined(sources["modulus"]),
            poisson=_joined(sources["poisson"]),
            density=_joined(sources["density"]),
            conductivity=_joined(sources["conductivity"]) or None,
            specific_heat=_joined(sources["specific_heat"]) or None,
            yield_strength=_joined(sources["yield_strength"]) or None,
        ),
        conductivity=single("conductivity"),
        specific_heat=single("specific_heat"),
        yield_strength=single("yield_strength"),
    )


MATERIALS: Mapping[str, Material] = _loaded()
"""Every tabulated material, by its key."""
