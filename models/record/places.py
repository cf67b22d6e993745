"""Where a reading stands within its entry, in the words that corrections use too.

- runout: (station, index of the mark from 0, or `again`, `swept total`, `total`, `high spot`)
- sizes: (index of the position, index of the angle), both from 0
- the hot part: (`temperature`, where on the part, land, angle, when)
- along the rotor: (`temperature`, position, angle)
- a gauge: (`gauge`, land, when)

What a place does not have is an empty word.
"""

from models.job import GaugeTry, Hot, RunoutReading, SizeReading, Warmth

__all__ = ["AnyReading", "place_of", "words_of"]

AnyReading = RunoutReading | SizeReading | Hot | Warmth | GaugeTry


def place_of(reading: AnyReading) -> tuple[str, ...]:
    """Name the place of a reading within its entry.

    Examples
    --------
    >>> place_of(RunoutReading(station="journal", mark=3, typed="0.0002"))
    ('journal', '3')
    """
    if isinstance(reading, RunoutReading):
        return (reading.station, str(reading.mark))
    if isinstance(reading, SizeReading):
        return (str(reading.position), str(reading.angle))
    if isinstance(reading, Hot):
        angle = "" if reading.angle is None else reading.angle.written
        return ("temperature", reading.where, reading.land or "", angle, reading.at)
    if isinstance(reading, Warmth):
        return ("temperature", reading.position.written, reading.angle.written)
    return ("gauge", reading.land, reading.at)


def words_of(reading: AnyReading) -> str:
    """Say what was read, as a correction quotes it; an empty word where nothing could be read."""
    if isinstance(reading, RunoutReading | SizeReading):
        return reading.typed or ""
    if isinstance(reading, Hot | Warmth):
        return reading.temperature.written
    return f"{reading.size.written} {'passed' if reading.passed else 'did not pass'}"
