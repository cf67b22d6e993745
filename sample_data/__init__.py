"""An invented scenario: two rotors that never existed, and the truth behind their readings."""

from sample_data.load import compressor, pump

__all__ = ["compressor", "pump"]
