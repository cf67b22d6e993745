"""Where each section of the collected check values went: a table here, or why there is none.

The collection itself is not part of the project; its section numbers are kept so that whoever has
it can follow. `TABLES` names tables of this folder as module.NAME; `LEFT_OUT` says why values of a
section have no row; `CONTRADICTIONS` lists printed numbers that a recalculation does not bear out.
"""

__all__ = ["CONTRADICTIONS", "LEFT_OUT", "TABLES"]

TABLES: dict[str, tuple[str, ...]] = {
    "fits 1.1, stress and onset of yield": ("fits.YIELD_RATIOS", "fits.EQUIVALENT_STRESSES"),
    "fits 1.2, worked examples L1 to L13": (
        "fits.PRESSURES", "fits.HOOP_STRESSES", "holding.FORCES", "holding.TORQUES",
        "heating.RISES",
    ),
    "fits 1.3, limits of the closed forms": ("fits.PRESSURES",),
    "fits 2.1, rotation": ("rotation.GROWTHS", "rotation.TIP_SPEEDS", "fits.HOOP_STRESSES"),
    "fits 3.1, heating": (
        "heating.RISES", "heating.NEEDED", "heating.TABLE_EXPANSIONS", "heating.OTHER_BASES",
        "heating.POLYNOMIALS", "heating.TRUNNIONS", "heating.UNEVEN_DISCS",
    ),
    "fits 3.2 and materials.csv": (
        "materials.EXPANSIONS", "materials.TOTAL_EXPANSIONS", "materials.MODULI",
        "materials.CONSTANTS",
    ),
    "fits 4.2, cooling": (
        "cooling.PIPES", "cooling.FACES", "cooling.RADIATIONS", "cooling.BALLS",
        "cooling.POWER_LAWS", "cooling.INTO_SPACE", "cooling.AIR_ROWS",
    ),
    "fits 4.3, parts hanging in the room": ("cooling.HANGING_PARTS",),
    "fits 4.4, soak and thermal bow": ("cooling.SHAFTS", "cooling.BOWS", "cooling.REMAINDERS"),
    "fits 5.2, limits and fits": ("limits_and_fits.LIMITS", "limits_and_fits.INTERFERENCES"),
    "fits 5.3, force fits": ("limits_and_fits.FORCE_FITS",),
    "fits 6.1, reference temperature": ("sizes.READINGS_AWAY_FROM_20",),
    "fits 6.2, conformance": ("conformance.PROBABILITIES",),
    "fits 8, tapers": ("taper_fits.ADVANCES", "fits.PRESSURES"),
    "runout 0, limits L1 to L10": (
        "balance.JOURNAL_RULE", "balance.VERY_HIGH_SPEED", "balance.NAVAL", "balance.GRADES",
        "acceptance.VIBRATION", "acceptance.PUMP_SUBTRACTION", "acceptance.PUMP_TRIP",
        "acceptance.COMPRESSOR_TRIP", "acceptance.PEDESTAL_VELOCITY", "acceptance.PUMP_RUNOUT",
    ),
    "runout 1.4, one side warmer": ("runout.WARM_SIDES",),
    "runout 1.6, flexibility": ("shaft.FLEXIBILITY", "acceptance.PUMP_RUNOUT"),
    "runout 2.1, faces": ("runout.FACES",),
    "runout 2.2, harmonics and sampling": ("runout.TURNS", "runout.LOSSES"),
    "runout 2.3, V-blocks": ("runout.BLOCKS",),
    "runout 2.4, journal axis": ("runout.DATUM",),
    "runout 2.5, bow": ("runout.KINKS",),
    "runout 2.6, vector change": ("runout.CHANGES",),
    "design page, slips of the marks": ("runout.SLIPS",),
    "runout 2.8, worksheet": ("runout.WORKSHEET",),
    "runout 2.9, bent part as unbalance": ("balance.OFFSETS",),
    "runout 3.1 and 3.2, unbalance": (
        "balance.JOURNAL_RULE", "balance.NAVAL", "balance.GRADES", "balance.FORCES",
        "balance.ALLOCATIONS",
    ),
    "runout 3.3, journal loads": ("shaft.JOURNAL_LOADS",),
    "runout 3.4, residual": ("balance.ROUNDS",),
    "runout 3.5, influence": ("balance.ONE_PLANE",),
    "runout 3.6, splitting": ("balance.SPLITS",),
    "runout 4, vibration and probe tracks": ("acceptance.VIBRATION",),
    "runout 5.1, torque and shear": ("shaft.SHEAR", "shaft.TORQUE", "holding.TORQUES_FROM_POWER"),
    "runout 5.3, critical speed": ("shaft.CRITICAL_SPEED", "shaft.DEFLECTION"),
}  # fmt: skip

LEFT_OUT: dict[str, str] = {
    "fits 1.1, friction coefficients": "trade values; a plan names its own, with its source",
    "fits 1.2, L5, L8 and L10": "the collection itself has no such rows",
    "fits 2.2, metals warmed together": "by hand; rows beside their test in test_fits.py",
    "fits 2.3, smoothing": "from memory; rows beside their test in test_fits.py",
    "fits 2.1, R5, 160 000 r/min·in": "a rule of practice that no function states",
    "fits 3.3, how hot is allowed": "from memory; a plan's limit, or a margin below tempering",
    "fits 4.4, axial diffusion L²/a": "no function states it",
    "fits 5.1, ISO 286 formulas": "the tables are stored; a test holds them near the formulas",
    "fits 6.3 and 7, trade ratios": "practice and memory; the plan's limits go before",
    "runout 0, L11, L13, L14 and L17": "magnetism is a limit of the plan; the others no function",
    "runout 1.6, ends of electrical machines": "a plan types its limit with its origin",
    "runout 2.2, third harmonic": "fitted away with the others, and not given by any function",
    "runout 2.2, published circle through six points": "no function fits a circle to points",
    "runout 2.7, lever": "by hand; a row beside its test in test_indicator.py",
    "runout 3.7, errors of balancing": "from memory, and without numbers",
    "runout 5.2, span over diameter": "from memory: a threshold, common practice",
    "runout 8.2, frames of indicators": "no function reads frames",
}

CONTRADICTIONS: dict[str, str] = {
    "Brown, example 6 in US units, 2100 psi": "1 - 0.444 rounded to 0.56; two digits are kept",
    "Brown, example 6 in SI, 12.627 MPa": "rounded on its way; its end, 12.6, is the row",
    "posted disc of 0.5 m, 5.26e-5 m": "its own formula gives 5.25e-5; its stresses agree",
    "Bloch p. 217, 12 000 psi": "read off a graph; 11 905 follows, two digits are kept",
    "Bloch p. 219, 318 °F": "317.5 rounded upwards there",
    "Incropera and DeWitt, example 9.4, Nu 23.3": "its own numbers give 23.1; from memory",
    "Çengel's ball, 163 s": "the length rounded to 1.3 mm there; both are rows",
    "chart, 56 347·W/N²": "another standard gravity; 56 331 follows, 0.03 % away",
    "vector tutorial, 77.77 g at 35°": "a graph by hand; 81.37 g at 35.54° follows",
    "Mancuso, 8 oz·in for 50 lb at 0.001 in": "a lost decimal; 0.8 is the product",
    "pump manual, L⁴/D² > 1.9e9 for 25 and 75 µm": "two manuals print one label with two pairs",
    "hollow shaft of 4 ft, 5800 r/min": "the closed form gives 8264; some safety factor, no row",
    "worksheet, figure 16, .2965 and .3515": "digits transposed there; the totals used agree",
}
"""What is printed, and why it is not what the program finds."""
