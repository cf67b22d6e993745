"""Each package keeps to its floor: who may import whom, read from the syntax trees."""

import ast
from collections.abc import Iterator
from pathlib import Path

import pytest

ROOT = Path(__file__).resolve().parents[2]

# What each package must not import; a name stands for itself and all below it.
MUST_NOT_IMPORT = {
    "models/engineering": ["app", "reports", "sample_data", "models.units", "models.job",
                           "models.jobfile", "models.rules", "models.record", "models.assess",
                           "models.acts", "sqlalchemy", "PySide6", "matplotlib", "reportlab",
                           "pandas", "scipy"],
    "models/job": ["app", "reports", "sample_data", "models.rules", "models.record",
                   "models.assess", "models.acts", "models.engineering", "sqlalchemy", "PySide6"],
    "models/rules": ["app", "reports", "sample_data", "models.record", "models.job",
                     "models.jobfile", "models.assess", "models.acts", "sqlalchemy", "PySide6"],
    "models/record": ["app", "reports", "sample_data", "models.rules", "models.engineering",
                      "models.assess", "models.acts", "PySide6"],
    "models/assess": ["app", "reports", "sample_data", "models.record", "models.acts",
                      "sqlalchemy", "PySide6"],
    "models/trust": ["app", "reports", "sample_data", "models.record", "models.job", "models.rules",
                     "models.assess", "models.acts", "models.engineering", "models.units",
                     "sqlalchemy", "PySide6"],
    "models/handbook": ["app", "reports", "sample_data", "models.record", "models.job",
                        "models.jobfile", "models.assess", "models.acts", "sqlalchemy", "PySide6"],
    "models/units.py": ["app", "reports", "models", "sqlalchemy", "PySide6"],
    "models/jobfile": ["app", "reports", "sample_data", "models.record", "models.rules",
                          "models.assess", "models.acts", "sqlalchemy", "PySide6"],
    "models/acts": ["app", "reports", "sample_data", "sqlalchemy", "PySide6"],
    "reports": ["app", "sample_data", "PySide6", "sqlalchemy", "models.record", "models.acts"],
    "app/presenters": ["PySide6.QtWidgets", "sqlalchemy", "models.record.journal"],
    "app/pages": ["sqlalchemy", "models.record", "models.acts"],
    "app/entry": ["sqlalchemy", "models.record", "models.acts", "models.job", "models.assess"],
    "app/frame": ["sqlalchemy", "models.record", "models.acts", "models.job", "models.assess"],
    "app": ["sqlalchemy", "models.record.journal", "models.record.tables"],
    "sample_data": ["app", "reports", "models.record", "sqlalchemy", "PySide6"],
}  # fmt: skip

# The journal is the only writer, and acts the only door to it.
MAY_IMPORT_JOURNAL = "models/acts"


def modules_of(package: str) -> list[Path]:
    place = ROOT / package
    if place.is_file():
        return [place]
    return sorted(place.rglob("*.py"))


def imported_names(path: Path) -> Iterator[str]:
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (one.name for one in node.names)
        elif isinstance(node, ast.ImportFrom) and node.module is not None:
            yield node.module
            yield from (f"{node.module}.{one.name}" for one in node.names)


def offends(name: str, forbidden: str) -> bool:
    return name == forbidden or name.startswith(forbidden + ".")


@pytest.mark.parametrize("package", sorted(MUST_NOT_IMPORT))
def test_package_keeps_to_its_floor(package: str) -> None:
    offences = [
        f"{path.relative_to(ROOT)} imports {name}"
        for path in modules_of(package)
        for name in sorted(set(imported_names(path)))
        for forbidden in MUST_NOT_IMPORT[package]
        if offends(name, forbidden)
    ]

    assert not offences, "\n".join(offences)


def test_every_named_package_is_there() -> None:
    assert [name for name in MUST_NOT_IMPORT if not modules_of(name)] == []


def test_only_acts_write_through_the_journal() -> None:
    offences = [
        f"{path.relative_to(ROOT)} imports {name}"
        for package in ("app", "models", "reports", "sample_data")
        for path in modules_of(package)
        for name in imported_names(path)
        if offends(name, "models.record.journal")
        and ROOT / MAY_IMPORT_JOURNAL not in path.parents
        and (ROOT / "models/record") not in path.parents
    ]

    assert not offences, "\n".join(offences)


def test_a_forbidden_import_would_be_seen() -> None:
    assert offends("models.record.journal", "models.record")
    assert not offends("models.records", "models.record")


def test_top_level_holds_only_what_it_should() -> None:
    allowed = {"README.md", "DEVELOPERS.md", "pyproject.toml", "app", "models", "reports", "tests",
               "sample_data"}  # fmt: skip
    found = {path.name for path in ROOT.iterdir() if not path.name.startswith(".")}

    assert found <= allowed | {"dist", "build"}
