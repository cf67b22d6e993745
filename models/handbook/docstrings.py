"""The sections of a docstring in numpy's style."""

import re

from models.handbook.entry import Quantity

__all__ = ["flowing", "items", "paragraphs", "quantities", "section"]

_UNIT = re.compile(r"\s*,?\s*\[([^\[\]]+)\]\s*$")
_ROLE = re.compile(r":[a-z]+:`([^`]*)`")


def section(text: str, title: str) -> str:
    """Give the body of a section, up to the next underlined title; nothing where there is none."""
    found = re.search(
        rf"^{title}\n-+\n(.*?)(?=^\w[^\n]*\n-+\n|\Z)", text, flags=re.MULTILINE | re.DOTALL
    )
    return found.group(1).rstrip() if found else ""


def paragraphs(text: str) -> list[str]:
    """Split at empty lines; an indented block stays with the line that opens it."""
    parts = [part.rstrip() for part in re.split(r"\n\s*\n", text) if part.strip()]
    joined: list[str] = []
    for part in parts:
        if joined and part.startswith("    ") and joined[-1].lstrip().startswith(".. math::"):
            joined[-1] += "\n" + part
        else:
            joined.append(part)
    return joined


def flowing(text: str) -> str:
    """Write on one line, without the marks of the markup."""
    line = " ".join(text.split())
    return _ROLE.sub(r"\1", line).replace("``", "").replace("**", "").replace("`", "")


def quantities(body: str) -> tuple[Quantity, ...]:
    """Read a section of parameters or results: name, words, and the unit in brackets."""
    found: list[tuple[str, list[str]]] = []
    for line in body.splitlines():
        if line and not line[0].isspace():
            found.append((line.split(":")[0].strip(), []))
        elif line.strip() and found:
            found[-1][1].append(line.strip())
    read = []
    for name, lines in found:
        words = " ".join(lines)
        unit = _UNIT.search(words)
        read.append(
            Quantity(name=name, words=words[: unit.start()] if unit else words,
                     unit=unit.group(1) if unit else "-")
        )  # fmt: skip
    return tuple(read)


def items(body: str) -> tuple[str, ...]:
    """Read references: numbered ones one by one, else each paragraph."""
    if ".. [" in body:
        parts = re.split(r"^\s*\.\. \[\d+\]\s*", body, flags=re.MULTILINE)
    else:
        parts = paragraphs(body)
    return tuple(flowing(part) for part in parts if part.strip())
