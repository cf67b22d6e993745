"""What the two invented shops have: people, instruments, and how they write their numbers."""

from dataclasses import dataclass

from models.job import Calibration, Instrument, Person
from models.units import Expansion, Length, Temperature

__all__ = ["AMERICAN", "EUROPEAN", "Shop"]


@dataclass(frozen=True)
class Shop:
    """One shop: who works there, with what, and in which units."""

    name: str
    reader: str
    mate: str
    inspector: str
    engineer: str
    witness: str
    people: tuple[Person, ...]
    instruments: tuple[Instrument, ...]
    dial: str
    # Outside and inside micrometers with the greatest diameter that each is for.
    outside: tuple[tuple[float, str], ...]
    inside: tuple[tuple[float, str], ...]
    thermometer: str
    hot_thermometer: str
    depth: str
    size_unit: str
    size_decimals: int
    dial_unit: str
    dial_decimals: int
    position_decimals: int
    temperature_unit: str
    zeroes_at_first_mark: bool
    # Temperature of the hall, and how far the oven is turned up when the gauge does not pass.
    hall: float
    further: float

    def outside_for(self, diameter: float) -> str:
        """Choose the micrometer for a seat."""
        return next(tag for greatest, tag in self.outside if diameter < greatest)

    def inside_for(self, diameter: float) -> str:
        """Choose the micrometer for a bore."""
        return next(tag for greatest, tag in self.inside if diameter < greatest)

    def dial_text(self, value: float) -> str:
        """Write a dial reading as the reader types it."""
        return _typed(Length.in_unit(value, self.dial_unit), self.dial_decimals)

    def size_text(self, value: float) -> str:
        """Write a diameter as the reader types it."""
        return _typed(Length.in_unit(value, self.size_unit), self.size_decimals)

    def size(self, value: float) -> Length:
        """Write a diameter with its unit."""
        return Length.read(self.size_text(value), self.size_unit)

    def position(self, value: float) -> Length:
        """Write an axial position with its unit."""
        text = _typed(Length.in_unit(value, self.size_unit), self.position_decimals)
        return Length.read(text, self.size_unit)

    def temperature(self, value: float, decimals: int = 1) -> Temperature:
        """Write a temperature with its unit."""
        text = _typed(Temperature.in_unit(value, self.temperature_unit), decimals)
        return Temperature.read(text, self.temperature_unit)


def _typed(number: float, decimals: int) -> str:
    text = f"{number:.{decimals}f}"
    # Nobody types a minus before a zero.
    return text.lstrip("-") if not text.strip("-0.") else text


def _calibrated(done_on: str, due_on: str, certificate: str) -> Calibration:
    return Calibration(done_on=done_on, due_on=due_on, certificate=certificate)


def _gauge(
    tag: str, kind: str, span: str, resolution: str, doubt: str, cal: int, due: str = ""
) -> Instrument:
    return Instrument(
        tag=tag,
        kind=kind,
        resolution=Length.read(resolution),
        uncertainty=Length.read(doubt),
        expansion=Expansion.read("11.5 µm/(m·K)") if "micrometer" in kind else None,
        range=span,
        calibration=_calibrated(f"2026-0{cal}-14", due or f"2027-0{cal}-14", f"invented {tag}/26"),
    )


def _thermometer(tag: str, kind: str, span: str) -> Instrument:
    return Instrument(
        tag=tag,
        kind=kind,
        range=span,
        calibration=_calibrated("2026-06-02", "2027-06-02", f"invented {tag}/26"),
    )


AMERICAN = Shop(
    name="Harrowmill Rotor Works (invented)",
    reader="AT",
    mate="CV",
    inspector="BQ",
    engineer="DO",
    witness="ES",
    people=(
        Person(key="AT", name="Ansel Tarrowby", initials="AT", role="technician"),
        Person(key="CV", name="Cathal Vintergaard", initials="CV", role="technician"),
        Person(key="BQ", name="Brona Quillfeather", initials="BQ", role="inspector"),
        Person(key="DO", name="Dunja Ostermeer", initials="DO", role="engineer"),
        Person(
            key="ES",
            name="Ephraim Saltcote",
            initials="ES",
            role="witness",
            employer="Saltmarsh Gas Transmission (invented)",
        ),
    ),
    instruments=(
        _gauge("DI-31", "dial indicator", "0 to 0.030 in", "0.0001 in", "0.0001 in", 7),
        _gauge("OM-05", "outside micrometer", "3 to 5 in", "0.0001 in", "0.0001 in", 5),
        _gauge("OM-06", "outside micrometer", "5 to 6 in", "0.0001 in", "0.0001 in", 5),
        _gauge("IM-02", "inside micrometer", "3 to 7 in", "0.0001 in", "0.00015 in", 5),
        # Due soon, so that the registers have something to say.
        _gauge("DM-04", "depth gauge", "0 to 84 in", "0.001 in", "0.001 in", 8, "2026-12-18"),
        _thermometer("CT-11", "contact thermometer", "32 to 212 °F"),
        _thermometer("CT-14", "contact thermometer", "70 to 900 °F"),
    ),
    dial="DI-31",
    outside=((5.0 * 0.0254, "OM-05"), (6.0 * 0.0254, "OM-06")),
    inside=((7.0 * 0.0254, "IM-02"),),
    thermometer="CT-11",
    hot_thermometer="CT-14",
    depth="DM-04",
    size_unit="in",
    size_decimals=4,
    dial_unit="in",
    dial_decimals=4,
    position_decimals=3,
    temperature_unit="°F",
    zeroes_at_first_mark=True,
    hall=21.8,
    further=50 / 1.8,
)

EUROPEAN = Shop(
    name="Werkstatt am Erlengrund (invented)",
    reader="GM",
    mate="IR",
    inspector="HL",
    engineer="KB",
    witness="LW",
    people=(
        Person(key="GM", name="Gesa Moorkamp", initials="GM", role="technician"),
        Person(key="IR", name="Ingo Rautenfels", initials="IR", role="technician"),
        Person(key="HL", name="Hedda Lorbeersiek", initials="HL", role="inspector"),
        Person(key="KB", name="Konrad Brackwasser", initials="KB", role="engineer"),
        Person(
            key="LW",
            name="Lale Wiesenhagen",
            initials="LW",
            role="witness",
            employer="Quellverband Obertal (invented)",
        ),
    ),
    instruments=(
        _gauge("MU-07", "dial indicator", "0 to 1 mm", "1 µm", "1.5 µm", 7),
        _gauge("BM-75", "outside micrometer", "50 to 75 mm", "1 µm", "2 µm", 5),
        _gauge("BM-100", "outside micrometer", "75 to 100 mm", "1 µm", "2 µm", 5),
        _gauge("IM-100", "inside micrometer", "50 to 100 mm", "1 µm", "2.5 µm", 5),
        _gauge("TM-03", "depth gauge", "0 to 2000 mm", "0.01 mm", "0.02 mm", 8),
        _thermometer("TF-21", "contact thermometer", "0 to 100 °C"),
        _thermometer("TF-24", "contact thermometer", "20 to 450 °C"),
    ),
    dial="MU-07",
    outside=((0.075, "BM-75"), (0.100, "BM-100")),
    inside=((0.100, "IM-100"),),
    thermometer="TF-21",
    hot_thermometer="TF-24",
    depth="TM-03",
    size_unit="mm",
    size_decimals=3,
    dial_unit="µm",
    dial_decimals=0,
    position_decimals=2,
    temperature_unit="°C",
    zeroes_at_first_mark=False,
    hall=20.9,
    further=30.0,
)
