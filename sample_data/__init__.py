"""An invented scenario: two rotors that never existed, and the truth behind their readings."""
