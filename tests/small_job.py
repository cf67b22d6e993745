"""The smallest job file that holds one of everything that a check looks at; all invented."""

import json
from typing import Any

ORIGIN = {"document": "plan sheet, invented"}
START = "2026-10-05T07:30:00-05:00"


def _entry(kind: str, key: str, **rest: Any) -> dict[str, Any]:
    place = {"kind": "attempt", "step": "first", "attempt": 1}
    return {
        "entry": kind,
        "id": key,
        "place": place,
        "by": "AB",
        "done_at": START,
        "entered_at": START,
        "plan": "A",
    } | rest


SET_UP = {"attitude": "horizontal", "supports": "lined V-blocks"}
ANGLES = ["0 °", "90 °", "180 °", "270 °"]
LIMIT = {"value": "0.0010 in", "origin": ORIGIN}


def _station(key: str, position: str, **rest: Any) -> dict[str, Any]:
    return {"key": key, "name": f"station {key}", "position": position} | rest


def _readings(station: str) -> dict[str, Any]:
    return {"station": station, "typed": ["0", "0.0003", "0.0005", "0.0002"], "again": "0"}


_JOB: dict[str, Any] = {
    "form": "thirdjournal job",
    "edition": 1,
    "number": "J-1",
    "opened_at": START,
    "people": [
        {"key": "AB", "name": "A. Brewer", "initials": "AB", "role": "technician"},
        {"key": "CD", "name": "C. Dyer", "initials": "CD", "role": "inspector"},
    ],
    "instruments": [
        {
            "tag": "DI-1",
            "kind": "dial indicator",
            "resolution": "0.0001 in",
            "calibration": {"done_on": "2026-03-02", "due_on": "2027-03-02"},
        }
    ],
    "components": [{"serial": "W-1", "name": "Wheel", "item": "wheel"}],
    "plans": [
        {
            "revision": "A",
            "reason": "first issue",
            "written_by": "CD",
            "issued_by": "CD",
            "issued_at": START,
            "decision_rule": "simple",
            "rotor": {"serial": "R-1", "name": "Small rotor", "units": "inch", "invented": True},
            "shaft": {
                "serial": "S-1",
                "material": "4140",
                "steps": [
                    {"start": "0 in", "end": "10 in", "diameter": "3 in"},
                    {"start": "254 mm", "end": "20 in", "diameter": "4.000 in"},
                ],
            },
            "first_journal": "J1",
            "second_journal": "J2",
            "stations": [
                _station("J1", "2 in", kind="journal"),
                _station("S1", "10.5 in", covered_by="first"),
                _station("S2", "15 in", reached_from="first", covered_by="second"),
                _station("J2", "18 in", kind="journal"),
            ],
            "steps": [
                {
                    "key": "first",
                    "title": "First wheel",
                    "change_limit": LIMIT,
                    "items": [
                        {
                            "key": "wheel",
                            "name": "Wheel",
                            "kind": "hot",
                            "outline": {
                                "kind": "impeller",
                                "start": "11 in",
                                "end": "14 in",
                                "bore": "3.995 in",
                                "outer": "12 in",
                            },
                            "lands": [
                                {
                                    "key": "only",
                                    "start": "11 in",
                                    "end": "14 in",
                                    "nominal_diameter": "4 in",
                                    "hub_outer_diameter": "6 in",
                                    "least_interference": LIMIT,
                                    "greatest_interference": LIMIT,
                                }
                            ],
                        }
                    ],
                },
                {"key": "second", "title": "Nothing yet", "items": []},
            ],
            "runout": {"marks": ANGLES, "attitude": "horizontal", "supports": "lined V-blocks"},
            "cooling": {
                "side_to_side": "2 °F",
                "above_surroundings": "4 °F",
                "agreement": "0.0002 in",
                "origin": ORIGIN,
            },
        }
    ],
    "entries": [
        _entry(
            "runout",
            "bare",
            place={"kind": "bare shaft"},
            purpose="bare shaft",
            set_up=SET_UP,
            unit="in",
            angles=ANGLES,
            stations=[_readings("J1"), _readings("S1"), _readings("J2")],
            instrument="DI-1",
            read_by="AB",
            closed_at=START,
        ),
        _entry("attempt", "a1", baseline="bare", components=[["wheel", "W-1"]]),
        _entry(
            "sizes",
            "bore",
            item="wheel",
            land="only",
            feature="bore",
            instrument="DI-1",
            unit="in",
            positions=["11.5 in", "13.5 in"],
            angles=["0 °", "90 °"],
            typed=[["3.9950", "3.9951"], ["3.9950", None]],
            corrections=[
                {
                    "where": ["0", "0"],
                    "was": "3.9590",
                    "now": "3.9950",
                    "reason": "digits swapped",
                    "by": "AB",
                    "at": START,
                }
            ],
        ),
        _entry(
            "heating",
            "heat",
            item="wheel",
            method="oven",
            set_point="400 °F",
            temperatures=[{"where": "bore", "temperature": "390 °F", "at": START, "land": "only"}],
            gauge=[{"land": "only", "size": "4.004 in", "passed": True, "at": START}],
        ),
        _entry("mount", "on", item="wheel", outcome="seated", clock_position="0 °"),
        _entry(
            "cooling",
            "cool",
            surroundings="70 °F",
            temperatures=[{"position": "12 in", "angle": "0 °", "temperature": "71 °F"}],
        ),
        _entry("settled", "end", outcome="within limits", survey="bare"),
        _entry("note", "n1", words="Oil on the bench.", supersedes="end", reason="wrong step"),
    ],
    "verdicts": [
        {
            "id": "v1",
            "subject": "runout of S1",
            "rule": "runout-changed",
            "edition": 1,
            "verdict": "within",
            "message": "0.0004 in of 0.0010 in",
            "inputs": {"change": 0.00001016, "judged": True, "worst": "S1", "drift": None},
            "judged_at": START,
            "step": "first",
            "attempt": 1,
        }
    ],
    "head": {"sequence": 12, "digest": "ab" * 32},
}


def document() -> dict[str, Any]:
    """Give a fresh copy, for a test to spoil."""
    # Not a deep copy: that would keep parts shared that the job names twice.
    return json.loads(json.dumps(_JOB))


def as_bytes(value: object) -> bytes:
    """Write any JSON value, well laid out or not."""
    return json.dumps(value, ensure_ascii=False).encode()
