"""The register's materials: the built-in table and the shop's own, each with its sources."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.entry.fields import FormField, TextField
from app.presenters.keys import Asking
from app.presenters.reasons import Reason
from app.presenters.shop import Said, ShopPresenter
from models.acts import NotAllowedError, new_id
from models.assess.materials import made_of
from models.engineering.errors import OutOfRangeError
from models.engineering.materials import MATERIALS, Material
from models.job import ExpansionAt, ModulusAt, OwnMaterial, Person
from models.record.errors import RecordError
from models.units import (
    Conductivity,
    Density,
    Expansion,
    HeatCapacity,
    Pressure,
    Quantity,
    Ratio,
    Temperature,
    UnreadableNumberError,
)

__all__ = ["MaterialRow", "MaterialsPresenter", "material_from"]

FIELDS: tuple[FormField, ...] = (
    TextField(name="name", label="Name by which plans call it"),
    TextField(name="source", label="Source: certificate, datasheet, own measurement"),
    TextField(name="density", label="Density, such as 7.85 g/cm³"),
    TextField(name="poisson", label="Poisson's ratio, such as 0.29"),
    TextField(
        name="expansions", label="Expansion from 20 °C, such as 100 °C: 12.0 µm/(m·K); 300 °C: 13.0"
    ),
    TextField(name="moduli", label="Young's modulus, such as 20 °C: 206 GPa; 200 °C: 194"),
    TextField(name="yield", label="Least yield strength, MPa", optional=True),
    TextField(name="conductivity", label="Thermal conductivity, W/(m·K)", optional=True),
    TextField(name="heat", label="Specific heat capacity, J/(kg·K)", optional=True),
)


@dataclass(frozen=True, kw_only=True)
class MaterialRow:
    """A material in words."""

    name: str
    kept_by: str
    expansion: str
    modulus: str
    density: str
    strength: str
    reasons: tuple[Reason, ...]
    own: OwnMaterial | None = None


class MaterialsPresenter(QObject):
    """Reads the shop's own materials beside the window; keeps one through the one door."""

    changed = Signal()
    """The materials are read."""
    kept = Signal()
    """A material is on the disk."""
    refused = Signal(str)
    """It cannot be kept; carries the sentence."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        self._own: tuple[OwnMaterial, ...] = ()
        shop.person_changed.connect(self.changed)

    @property
    def rows(self) -> tuple[MaterialRow, ...]:
        """The shop's own materials first, then the table's."""
        own = [_row(made_of(one), "the shop", one) for one in self._own]
        return (*own, *(_row(one, "built in") for one in MATERIALS.values()))

    @property
    def words(self) -> str:
        """What to know or do first."""
        if self.person is None:
            return (
                "A name in a plan is looked up among the plan's own copies first, then in this "
                "table. An engineer or an inspector adds a material: say who is at the window."
            )
        return (
            "What is added here stands on the record with its source; a plan carries a copy of "
            "what it uses, so that a later change moves nothing that was issued."
        )

    @property
    def person(self) -> Person | None:
        """Who is at the window, if one who may answer for numbers."""
        person = self._shop.person
        return person if person is not None and person.role in ("engineer", "inspector") else None

    def read(self) -> None:
        """Read the shop's own materials beside the window."""
        self._shop.background.run(
            self._shop.acts.materials,
            words="reading the materials",
            done=self._have,
            failed=lambda error: self._shop.said.emit(Said(what=str(error))),
        )

    def _have(self, own: tuple[OwnMaterial, ...]) -> None:
        self._own = own
        self.changed.emit()

    def asking(self) -> Asking | None:
        """Say what is asked of whoever adds a material; None where nobody may."""
        person = self.person
        if person is None:
            return None
        return Asking(
            title="A material of the shop's own",
            who=f"{person.name}, {person.role}, answers for these numbers.",
            lines=("The same name again is its next version; the one before stays on the record.",),
            fields=FIELDS,
            take="Keep it",
            note="Numbers carry their unit as typed; several temperatures are parted by a "
            "semicolon.",
        )

    def keep(self, answers: Mapping[str, str]) -> None:
        """Keep what was typed, or say what does not serve."""
        person = self.person
        if person is None:
            self.refused.emit("An engineer or an inspector keeps a material.")
            return
        try:
            material = material_from(answers)
        except UnreadableNumberError as trouble:
            self.refused.emit(str(trouble))
            return
        act_id = new_id()
        self._shop.writer.write(
            lambda: self._shop.acts.keep_material(material, person=person, act_id=act_id),
            done=self._written,
            refused=self._not_kept,
        )

    def _written(self, _: Any) -> None:  # noqa: ANN401  (the Writer hands back anything)
        self.kept.emit()
        self.read()

    def _not_kept(self, error: Exception) -> None:
        if isinstance(error, NotAllowedError):
            self.refused.emit(error.words)
        elif isinstance(error, RecordError | OutOfRangeError):
            self.refused.emit(str(error))
        else:
            raise error


def material_from(answers: Mapping[str, str]) -> OwnMaterial:
    """Make a material from what was typed.

    Raises
    ------
    UnreadableNumberError
        If a number cannot be read; the sentence names its field.
    """

    def text(name: str) -> str:
        return answers.get(name, "").strip()

    def number(kind: type[Quantity], name: str, unit: str) -> Any:  # noqa: ANN401
        return _read(kind, text(name), unit, name) if text(name) else None

    for name in ("name", "source", "density", "poisson", "expansions", "moduli"):
        if not text(name):
            raise UnreadableNumberError("", f"{name} is still empty")
    return OwnMaterial(
        name=text("name"),
        source=text("source"),
        density=number(Density, "density", "g/cm³"),
        poisson=number(Ratio, "poisson", ""),
        expansions=tuple(
            ExpansionAt(temperature=at, coefficient=value)
            for at, value in _pairs(Expansion, text("expansions"), "µm/(m·K)", "expansions")
        ),
        moduli=tuple(
            ModulusAt(temperature=at, modulus=value)
            for at, value in _pairs(Pressure, text("moduli"), "GPa", "moduli")
        ),
        conductivity=number(Conductivity, "conductivity", "W/(m·K)"),
        specific_heat=number(HeatCapacity, "heat", "J/(kg·K)"),
        yield_strength=number(Pressure, "yield", "MPa"),
    )


def _pairs(kind: type[Quantity], typed: str, unit: str, name: str) -> list[tuple[Temperature, Any]]:
    found = []
    for part in typed.split(";"):
        at, colon, value = part.partition(":")
        if not colon:
            raise UnreadableNumberError(
                part.strip(), f"{name} are written as temperature, colon, value: 100 °C: 12.0"
            )
        found.append((_read(Temperature, at, "°C", name), _read(kind, value, unit, name)))
    return found


def _read(kind: type[Quantity], typed: str, unit: str, name: str) -> Any:  # noqa: ANN401
    try:
        return kind.read(typed.strip(), unit)
    except UnreadableNumberError as trouble:
        raise UnreadableNumberError(typed.strip(), f"in {name}, {trouble}") from trouble


def _row(material: Material, kept_by: str, own: OwnMaterial | None = None) -> MaterialRow:
    sources = material.sources
    reasons = (
        ("expansion from", sources.mean_expansion),
        ("modulus from", sources.modulus),
        ("Poisson's ratio", f"{material.poisson:g}; {sources.poisson}"),
        ("density from", sources.density),
        ("conductivity", _with(material.conductivity, "W/(m·K)", sources.conductivity)),
        ("specific heat", _with(material.specific_heat, "J/(kg·K)", sources.specific_heat)),
        ("yield from", sources.yield_strength or "no value: heat treatment or section decides it"),
    )
    strength = material.yield_strength
    return MaterialRow(
        name=material.key if own is None else own.name,
        kept_by=kept_by,
        expansion=_table(material.expansion_temperatures, material.mean_expansions, 1e6, 2),
        modulus=_table(material.modulus_temperatures, material.moduli, 1e-9, 0),
        density=f"{material.density:.0f} kg/m³",
        strength=f"{strength / 1e6:.0f} MPa" if strength is not None else "–",
        reasons=(("name", material.name), *reasons),
        own=own,
    )


def _with(value: float | None, unit: str, source: str | None) -> str:
    return f"{value:g} {unit}; {source}" if value is not None else "not known"


def _table(at: tuple[float, ...], values: tuple[float, ...], scale: float, decimals: int) -> str:
    """Show the first, a middle and the last row of a table over temperature."""
    places = sorted({0, len(at) // 2, len(at) - 1})
    return "; ".join(f"{at[place]:.0f} °C {values[place] * scale:.{decimals}f}" for place in places)
