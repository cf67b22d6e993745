"""Published properties of materials, as printed in their sources."""

from typing import NamedTuple

__all__ = ["EXPANSIONS", "MODULI", "TOTAL_EXPANSIONS", "PropertyRow"]

FAHRENHEIT_COEFFICIENT = 1.8e-6
"""SI value of one µin/in/°F."""
MILLION_PSI = 6.894757293168e9


class PropertyRow(NamedTuple):
    """One printed property at one temperature."""

    key: str
    source: str
    temperature: float
    """In °C."""
    printed: str
    si_per_unit: float


def _fahrenheit(degrees: float) -> float:
    return (degrees - 32.0) / 1.8


def _te1(key: str, **printed: str) -> list[PropertyRow]:
    return [
        PropertyRow(
            key,
            "ASME BPVC II-D (2001), Table TE-1, column B, mean from 70 °F",
            _fahrenheit(float(at[1:])),
            number,
            FAHRENHEIT_COEFFICIENT,
        )
        for at, number in printed.items()
    ]


def _celsius(key: str, source: str, unit: float, **printed: str) -> list[PropertyRow]:
    return [PropertyRow(key, source, float(at[1:]), n, unit) for at, n in printed.items()]


_TUBE = "EN 10088-1 table, reproduced by a stainless-tube maker"
_CALLISTER = "Callister, Materials Science and Engineering, appendix B.6"

EXPANSIONS = [
    *_te1("low-alloy-steel-1", f200="6.7", f400="7.1", f600="7.4", f800="7.8", f1000="8.1"),
    *[
        row._replace(source="producer's data for alloy 718 as reproduced, mean from 70 °F")
        for row in _te1("alloy-718", f200="7.31", f400="7.53", f600="7.74", f800="7.97")
    ],
    *_celsius("410", _TUBE, 1e-6, c100="10.5", c200="11.0", c300="11.5", c400="12.0"),
    *_celsius("304", _TUBE, 1e-6, c100="16.0", c200="16.5", c300="17.0", c400="17.5"),
    *_celsius("13cr-4ni", "two 1.4313 datasheets", 1e-6, c100="10.5", c200="10.9", c300="11.3"),
    *_celsius("630", _TUBE, 1e-6, c100="10.9", c300="11.1"),
    *_celsius("ti-6al-4v", "supplier's datasheet", 1e-6, c100="8.6", c315="9.2", c650="9.7"),
    *_celsius("6061-t6", _CALLISTER, 1e-6, c100="23.6"),
    *_celsius("60-40-18", _CALLISTER, 1e-6, c100="11.2"),
    *_celsius("4140", "public materials table, 0 to 100 °C", 1e-6, c100="12.3"),
    # A third source for the same steel: within the spread, not at the same digit.
    PropertyRow(
        "4140",
        "distributor's 4140 datasheet, doubleeaglealloys.com: 6.83e-6 /°F, 68 to 212 °F",
        100.0,
        "6.8",
        FAHRENHEIT_COEFFICIENT,
    ),
]

TOTAL_EXPANSIONS = [
    PropertyRow(
        "low-alloy-steel-1",
        "ASME BPVC II-D (2001), Table TE-1, column C: inches in 100 ft from 70 °F",
        _fahrenheit(at),
        number,
        1.0 / 1200.0,
    )
    for at, number in ((200.0, "1.0"), (400.0, "2.8"), (600.0, "4.7"), (800.0, "6.8"))
]

MODULI = [
    *_celsius("410", _TUBE, 1e9, c20="215", c100="212", c200="205", c300="200", c400="190"),
    *_celsius("304", _TUBE, 1e9, c20="200", c100="194", c200="186", c300="179", c400="172"),
    *_celsius("630", _TUBE, 1e9, c20="200", c200="185", c400="170"),
    *_celsius("alloy-718", "supplier's data page", 1e9, c21="208", c93="205", c204="202"),
    *_celsius("en-gjs-400", "EN 1563:1997", 1e9, c20="169"),
    *_celsius("ti-6al-4v", "ASM and producer data", 1e9, c20="114"),
    # The 4140 table comes from ASME B31.1; its datasheet prints the value at room temperature.
    *_celsius("4140", "4140 datasheet, matweb.com: 205 GPa, 29700 ksi", 1e9, c20="205"),
    *_celsius("low-alloy-steel-1", "ASME B31.1 (1995), Cr-Mo 1/2 to 2 %", MILLION_PSI, c149="28.5"),
    *_celsius("9cr-1mo", "ASME B31.1 (1995), Cr-Mo 5 to 9 %", MILLION_PSI, c260="28.6"),
]
