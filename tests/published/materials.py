"""Published properties of materials, as printed in their sources."""

from typing import NamedTuple

__all__ = ["CONSTANTS", "EXPANSIONS", "MODULI", "TOTAL_EXPANSIONS", "ConstantRow", "PropertyRow"]

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


class ConstantRow(NamedTuple):
    """One printed property that is stored without a temperature."""

    key: str
    source: str
    property: str
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
    *_te1(
        "low-alloy-steel-1",
        f100="6.5",
        f150="6.6",
        f200="6.7",
        f250="6.8",
        f300="6.9",
        f350="7.0",
        f400="7.1",
        f450="7.2",
        f500="7.3",
        f550="7.3",
        f600="7.4",
        f650="7.5",
        f700="7.6",
        f750="7.7",
        f800="7.8",
        f1000="8.1",
    ),
    *_te1(
        "low-alloy-steel-2",
        f100="7.1",
        f150="7.2",
        f200="7.3",
        f250="7.3",
        f300="7.4",
        f350="7.5",
        f400="7.6",
        f450="7.6",
        f500="7.7",
        f550="7.8",
        f600="7.8",
        f700="7.9",
        f800="8.1",
        f1000="8.2",
    ),
    *_te1(
        "5cr-1mo",
        f200="6.7",
        f300="6.9",
        f400="7.0",
        f500="7.1",
        f600="7.2",
        f700="7.2",
        f800="7.3",
    ),
    *_te1("9cr-1mo", f200="6.0", f300="6.2", f400="6.3", f500="6.4", f600="6.5", f700="6.6"),
    *[
        row._replace(source="producer's data for alloy 718 as reproduced, mean from 70 °F")
        for row in _te1("alloy-718", f200="7.31", f400="7.53", f600="7.74", f800="7.97")
    ],
    *_celsius("410", _TUBE, 1e-6, c100="10.5", c200="11.0", c300="11.5", c400="12.0"),
    *_celsius("304", _TUBE, 1e-6, c100="16.0", c200="16.5", c300="17.0", c400="17.5", c500="18.0"),
    *_celsius("316", _TUBE, 1e-6, c100="16.0"),
    *_celsius("304-aisi", "public materials table, 0 to 100 °C", 1e-6, c100="17.2"),
    *_celsius("316-aisi", "public materials table, 0 to 100 °C", 1e-6, c100="15.9"),
    *_celsius("4340", "public materials table, tempered at 600 °C", 1e-6, c100="12.3"),
    *_celsius(
        "structural-steel",
        "polynomial of NIST NCSTAR 1-3E as quoted second-hand, integrated independently",
        1e-6,
        c100="12.51",
        c200="13.08",
        c300="13.58",
        c400="14.02",
        c500="14.39",
        c600="14.70",
    ),
    *_celsius("aluminium-99.5", "producer's data", 1e-6, c100="23.5"),
    *_celsius("grey-iron-20", "a materials site, range not stated", 1e-6, c100="10.5"),
    *_celsius("alloy-718", "producer's data in SI as reproduced", 1e-6, c538="14.56", c649="15.10"),
    *_celsius(
        "13cr-4ni",
        "two 1.4313 datasheets",
        1e-6,
        c100="10.5",
        c200="10.9",
        c300="11.3",
        c400="11.6",
    ),
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
    *_celsius(
        "304", _TUBE, 1e9, c20="200", c100="194", c200="186", c300="179", c400="172", c500="165"
    ),
    *_celsius("316", _TUBE, 1e9, c20="200", c100="194"),
    *_celsius("630", _TUBE, 1e9, c20="200", c100="195", c200="185", c300="175", c400="170"),
    *_celsius("13cr-4ni", "two 1.4313 datasheets", 1e9, c20="200"),
    *_celsius("aluminium-99.5", "producer's data", 1e9, c20="68.6"),
    *_celsius(
        "alloy-718",
        "supplier's data page",
        1e9,
        c21="208",
        c93="205",
        c204="202",
        c316="194",
        c427="186",
        c538="179",
        c649="172",
    ),
    *_celsius("en-gjs-400", "EN 1563:1997", 1e9, c20="169"),
    *_celsius("ti-6al-4v", "ASM and producer data", 1e9, c20="114"),
    # The 4140 table comes from ASME B31.1; its datasheet prints the value at room temperature.
    *_celsius("4140", "4140 datasheet, matweb.com: 205 GPa, 29700 ksi", 1e9, c20="205"),
    *_celsius("low-alloy-steel-1", "ASME B31.1 (1995), Cr-Mo 1/2 to 2 %", MILLION_PSI, c149="28.5"),
    *_celsius("9cr-1mo", "ASME B31.1 (1995), Cr-Mo 5 to 9 %", MILLION_PSI, c260="28.6"),
]


def _constants(key: str, source: str, **values: str) -> list[ConstantRow]:
    units = {"density": 1.0, "poisson": 1.0, "conductivity": 1.0, "specific_heat": 1.0,
             "yield_strength": 1e6}  # fmt: skip
    return [ConstantRow(key, source, name, text, units[name]) for name, text in values.items()]


_EN = "EN 10088-1 data"

CONSTANTS = [
    *_constants("4140", "4140 datasheet", density="7850", poisson="0.29"),
    *_constants("42crmo4", "datasheet of 42CrMo4", conductivity="42.6"),
    *_constants("42crmo4", "EN 10083-3, over 160 to 250 mm", yield_strength="500"),
    *_constants("410", _TUBE, density="7700", conductivity="30", specific_heat="460"),
    *_constants("13cr-4ni", _EN, density="7700", conductivity="25", specific_heat="430"),
    *_constants("13cr-4ni", "1.4313 datasheets, QT650", yield_strength="520"),
    *_constants("630", _EN, density="7800", conductivity="16", specific_heat="500"),
    *_constants("304", _EN, density="7900", conductivity="15", specific_heat="500"),
    *_constants("316", _EN, density="8000", conductivity="15", specific_heat="500"),
    *_constants(
        "alloy-718",
        "supplier's data page",
        density="8220",
        poisson="0.29",
        conductivity="11.1",
        specific_heat="435",
    ),
    *_constants(
        "ti-6al-4v",
        "ASM and producer data",
        density="4430",
        poisson="0.33",
        conductivity="6.7",
        specific_heat="526",
    ),
    *_constants("ti-6al-4v", "minimum, read second-hand", yield_strength="828"),
    *_constants("en-gjs-400", "EN 1563:1997", density="7100", yield_strength="250"),
    *_constants("2618-t6", "producer's table", density="2760"),
    *_constants("aluminium-99.5", "producer's data", density="2710"),
    *_constants("grey-iron-20", "a materials site", density="7200"),
]
