"""What README and DEVELOPERS say is there, is there."""

import re
from pathlib import Path

import pytest

from app.commands.parsing import parser as parser_of

ROOT = Path(__file__).resolve().parents[2]
README = (ROOT / "README.md").read_text(encoding="utf-8")
DEVELOPERS = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
BLOCKS = re.findall(r"^```sh\n(.*?)^```$", README, flags=re.MULTILINE | re.DOTALL)


def paths_in(text: str) -> list[str]:
    """Everything in backticks that looks like a path of this project."""
    found = re.findall(r"`([\w./-]+/[\w./-]*|[\w-]+\.(?:md|toml|py))`", text)
    return sorted({one for one in found if not one.startswith(("build/", "/"))})


@pytest.mark.parametrize("path", paths_in(DEVELOPERS))
def test_every_path_of_the_developers_page_exists(path: str) -> None:
    places = [ROOT / path, *ROOT.glob(f"models/**/{path}")]

    assert any(place.exists() for place in places), path


@pytest.mark.parametrize("link", re.findall(r"\]\(([^)#]+)\)", README))
def test_every_link_of_the_readme_leads_somewhere(link: str) -> None:
    assert (ROOT / link).exists()


def test_the_first_two_blocks_do_all_the_set_up() -> None:
    first, second = BLOCKS[0].strip(), BLOCKS[1].strip()

    assert first.startswith("bash .ci/ready && ")
    assert "thirdjournal demo" in first
    assert second.startswith("bash .ci/ready && ")
    assert "pytest" in second
    assert all("\n" not in block for block in (first, second))


def test_every_command_of_the_readme_is_one_the_program_takes() -> None:
    parser = parser_of()
    lines = re.findall(r"^thirdjournal ?(.*?)(?:  +.*)?$", README, flags=re.MULTILINE)
    assert len(lines) >= 5
    for line in lines:
        given = line.replace("[", "").replace("]", "").split()
        parser.parse_args(given)


def test_the_readme_says_at_the_top_what_it_is_for() -> None:
    title, paragraph = README.split("\n\n")[:2]

    assert title == "# Third Journal"
    assert "runout" in paragraph
    assert "traveler" in paragraph


def test_developers_names_every_dependency_with_its_reason() -> None:
    project = (ROOT / "pyproject.toml").read_text(encoding="utf-8")
    block = project[project.index("dependencies = [") :].split("]")[0]
    names = re.findall(r'^\s+"([\w-]+)', block, flags=re.MULTILINE)

    assert len(names) >= 8
    assert [name for name in names if name not in DEVELOPERS] == []


FORBIDDEN = ("/" + "work/", "/" + "home/", "/" + "root/", "pypi" + ".org")


@pytest.mark.parametrize("word", FORBIDDEN)
def test_no_page_of_the_project_names_a_machine(word: str) -> None:
    named = [
        str(path.relative_to(ROOT))
        for folder in ("app", "models", "reports", "sample_data", "tests")
        for path in (ROOT / folder).rglob("*.py")
        if word in path.read_text(encoding="utf-8")
    ]

    assert named == []
    assert word not in README + DEVELOPERS
