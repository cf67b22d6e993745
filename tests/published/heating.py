"""Printed numbers on growth with temperature and on heating a part for its seat."""

from typing import NamedTuple

BLOCH = "H. P. Bloch, Improving Machinery Reliability, p. 219"
II_D = "ASME BPVC II-D (2001), Table TE-1 Group 1, columns B and C"
NOT_PUBLISHED = "computed apart from the tabulated coefficients; no publication claimed"


class RiseAboveShaft(NamedTuple):
    """Temperature difference that takes up an interference, part and shaft of one steel."""

    case: str
    source: str
    interference_ratio: float
    clearance_ratio: float
    expansion_per_degree_fahrenheit: float
    rise_fahrenheit: str


RISES = [
    RiseAboveShaft("0.0015 in/in", BLOCH, 0.0015, 0.0, 6.3e-6, "238"),
    RiseAboveShaft(
        "0.0015 in/in and 0.0005 in/in to spare",
        f"by hand, 0.0020/6.3e-6; {BLOCH} prints 318, rounded upwards",
        0.0015,
        0.0005,
        6.3e-6,
        "317.5",
    ),
]


class NeededTemperature(NamedTuple):
    """Temperature from a shaft at 20 °C, coefficients as table: °C, 1e-6/K."""

    case: str
    source: str
    ratio: float
    table: list[tuple[float, float]]
    temperature: str


_ONE = [(100.0, 12.6)]
_BY_HAND = "by hand, 20 + ratio/12.6e-6"

NEEDED = [
    NeededTemperature("carbon steel", f"{II_D}; {NOT_PUBLISHED}", 0.0025,
                      [(204.0, 12.78), (232.0, 12.96)], "215"),
    NeededTemperature("304", f"EN 10088-1 table; {NOT_PUBLISHED}", 0.0025,
                      [(100.0, 16.0), (200.0, 16.5)], "173"),
    NeededTemperature("alloy 718", f"maker's data; {NOT_PUBLISHED}", 0.0025,
                      [(93.0, 13.16), (204.0, 13.55), (316.0, 13.93)], "204"),
    NeededTemperature("410", f"EN 10088-1 table; {NOT_PUBLISHED}", 0.0025,
                      [(100.0, 10.5), (200.0, 11.0), (300.0, 11.5)], "243"),
    NeededTemperature("13Cr-4Ni", f"EN 10088-1 data; {NOT_PUBLISHED}", 0.0025,
                      [(100.0, 10.5), (200.0, 10.9), (300.0, 11.3)], "246"),
    NeededTemperature("Ti-6Al-4V", f"supplier data; {NOT_PUBLISHED}", 0.0025,
                      [(100.0, 8.6), (315.0, 9.2)], "294"),
    NeededTemperature("0.0005, nothing to spare", _BY_HAND, 0.0005, _ONE, "60"),
    NeededTemperature("0.0005 and 0.0005 to spare", _BY_HAND, 0.0010, _ONE, "99"),
    NeededTemperature("0.00075 and 0.0010 to spare", _BY_HAND, 0.00175, _ONE, "159"),
    NeededTemperature("0.0010 and 0.0015 to spare", _BY_HAND, 0.0025, _ONE, "218"),
    NeededTemperature("0.0015 and 0.0015 to spare", _BY_HAND, 0.0030, _ONE, "258"),
    NeededTemperature("0.0020 and 0.0015 to spare", _BY_HAND, 0.0035, _ONE, "298"),
]  # fmt: skip


class TableExpansion(NamedTuple):
    """Growth of 100 ft from 70 °F, with the mean coefficient printed beside it."""

    case: str
    source: str
    temperature_fahrenheit: float
    coefficient_per_degree_fahrenheit: float
    growth_inches: str


TABLE_EXPANSIONS = [
    TableExpansion("200 °F", II_D, 200.0, 6.7e-6, "1.0"),
    TableExpansion("400 °F", II_D, 400.0, 7.1e-6, "2.8"),
    TableExpansion("600 °F", II_D, 600.0, 7.4e-6, "4.7"),
    TableExpansion("800 °F", II_D, 800.0, 7.8e-6, "6.8"),
    TableExpansion("1000 °F", II_D, 1000.0, 8.1e-6, "9.0"),
]


class OtherBase(NamedTuple):
    """Growth from one temperature to another out of mean coefficients that count from a third."""

    case: str
    source: str
    table_base_fahrenheit: float
    table_fahrenheit: list[tuple[float, float]]
    from_fahrenheit: float
    to_fahrenheit: float
    growth: str


OTHER_BASES = [
    OtherBase(
        "50 to 350 °F from a table based on 70 °F",
        "posted worked example with ASME B31.3, Table C, Group 1",
        70.0,
        [(-50.0, 6.2e-6), (70.0, 6.4e-6), (300.0, 6.9e-6), (400.0, 7.1e-6)],
        50.0,
        350.0,
        "0.00208733",
    )
]


class Polynomial(NamedTuple):
    """Growth between two temperatures from a coefficient that holds at each one."""

    case: str
    source: str
    coefficients: tuple[float, ...]
    from_temperature: float
    to_temperature: float
    growth: str


POLYNOMIALS = [
    Polynomial(
        "structural steel, 293 to 873 K",
        "NIST NCSTAR 1-3E, polynomial in kelvin, as quoted in a secondary source",
        (7.3633e-6, 1.8723e-8, -9.8382e-12, 1.6718e-16),
        293.0,
        873.0,
        "0.00852626",
    )
]


class Trunnion(NamedTuple):
    """Contraction of a trunnion of 12.363 in from 80 to −108 °F, polynomial in °F."""

    case: str
    source: str
    coefficients: tuple[float, ...]
    contraction_inches: str


KAW = (
    "A. Kaw, University of South Florida, bascule-bridge trunnion; coefficients and answer "
    "from memory"
)

TRUNNIONS = [
    Trunnion("coefficient that falls in the cold", KAW,
             (6.0217e-6, 6.2782e-9, -1.2218e-11), "0.0137"),
    Trunnion("coefficient of a warm day", KAW, (6.47e-6,), "0.01504"),
]  # fmt: skip


class UnevenDisc(NamedTuple):
    """Disc with a straight-line profile from bore to rim, kelvin above the shaft."""

    case: str
    source: str
    bore_radius: float
    rim_radius: float
    bore_rise: float
    rim_rise: float
    mean_rise: str


_SEGMENT = "by hand, 2/(b² − a²) ∫ T r dr of a straight line"

UNEVEN_DISCS = [
    UnevenDisc("hot bore, cool rim", _SEGMENT, 0.075, 0.250, 300.0, 100.0, "182.05"),
    UnevenDisc("cool bore, hot rim", _SEGMENT, 0.075, 0.250, 100.0, 300.0, "217.9"),
]
