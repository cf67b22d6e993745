"""Formulas of docstrings in plain signs, for screens and lines that set no mathematics."""

import re

__all__ = ["plain_formula"]

_SIGNS = {
    "alpha": "α", "beta": "β", "gamma": "γ", "delta": "δ", "Delta": "Δ", "epsilon": "ε",
    "varepsilon": "ε", "theta": "θ", "kappa": "κ", "lambda": "λ", "mu": "μ", "nu": "ν", "pi": "π",
    "rho": "ρ", "sigma": "σ", "Sigma": "Σ", "tau": "τ", "phi": "φ", "varphi": "φ", "Phi": "Φ",
    "psi": "ψ", "omega": "ω", "Omega": "Ω", "ell": "l", "partial": "∂", "infty": "∞",
    "sum": "Σ", "int": "∫", "prod": "Π", "cdot": "·", "times": "×", "pm": "±", "mp": "∓",
    "le": "≤", "leq": "≤", "ge": "≥", "geq": "≥", "ne": "≠", "neq": "≠", "approx": "≈",
    "sim": "~", "to": "→", "leftrightarrow": "↔", "exists": "∃", "in": "∈", "ldots": "…",
    "dots": "…", "cdots": "…", "langle": "⟨", "rangle": "⟩", "lvert": "|", "rvert": "|",
    "bmod": "mod", "circ": "°", "min": "min", "max": "max", "sin": "sin", "cos": "cos",
    "tan": "tan", "arg": "arg", "ln": "ln", "log": "log", "exp": "exp", "left": "", "right": "",
    "big": "", "Big": "", "bigl": "", "bigr": "", "qquad": ";  ", "quad": "  ", "displaystyle": "",
    "Re": "Re", "Im": "Im", "median": "median", "prime": "′", "propto": "∝",
    "forall": "∀", "mid": "|", "lfloor": "⌊", "rfloor": "⌋", "Vert": "‖", "parallel": "∥",
}  # fmt: skip
_MARKS = {"bar": "\u0304", "tilde": "\u0303", "hat": "\u0302", "dot": "\u0307", "vec": "\u20d7"}
_PLAIN = ("text", "mathrm", "mathbf", "operatorname", "textrm", "mathit")
_RAISED = str.maketrans("0123456789+-n", "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻ⁿ")
_TOKEN = re.compile(r"\\[A-Za-z]+|\\.|[{}^_&]|\s+|[^\\{}^_&\s]", re.DOTALL)


def plain_formula(text: str) -> str:
    r"""Write a formula in plain signs, fractions with a stroke.

    Parameters
    ----------
    text : str
        The formula as docstrings write it.

    Returns
    -------
    str
        The same on one line.

    Examples
    --------
    >>> plain_formula(r"p = \frac{\Delta}{d}\left[\frac{1}{E_h} + \nu_h\right]^{-1}")
    'p = Δ/d [1/E_h + ν_h]⁻¹'
    >>> plain_formula(r"\omega = \sqrt{\frac{a + b}{2\,\bar c}}")
    'ω = √((a + b)/(2 c̄))'
    """
    tokens = _TOKEN.findall(text.replace("\\\\", " ; "))
    written, _ = _group(tokens, 0)
    written = re.sub(r"\s+", " ", written)
    # A fraction and the factor after it stand apart.
    written = re.sub(r"\s*([;,])\s*", r"\1 ", written)
    written = re.sub(r"[,;] ;", ";", written)
    return re.sub(r"\(\s+", "(", re.sub(r"\s+\)", ")", written)).strip(" ;,.")


def _group(tokens: list[str], place: int) -> tuple[str, int]:
    """Write what stands up to the closing brace."""
    out: list[str] = []
    while place < len(tokens) and tokens[place] != "}":
        written, place = _one(tokens, place)
        out.append(written)
    return "".join(out), place


def _argument(tokens: list[str], place: int) -> tuple[str, int]:
    while place < len(tokens) and tokens[place].isspace():
        place += 1
    if place >= len(tokens):
        return "", place
    if tokens[place] == "{":
        inner, place = _group(tokens, place + 1)
        return inner.strip(), place + 1
    return _one(tokens, place)


def _one(tokens: list[str], place: int) -> tuple[str, int]:
    token = tokens[place]
    place += 1
    if token == "{":
        inner, place = _group(tokens, place)
        return inner, place + 1
    if token in ("^", "_"):
        inner, place = _argument(tokens, place)
        return _raised(inner) if token == "^" else f"_{_joined(inner)}", place
    if token == "&":
        return "", place
    if not token.startswith("\\"):
        return (" " if token.isspace() else token), place
    return _command(token[1:], tokens, place)


def _command(name: str, tokens: list[str], place: int) -> tuple[str, int]:
    if name in ("frac", "tfrac", "dfrac"):
        above, place = _argument(tokens, place)
        below, place = _argument(tokens, place)
        return f"{_closed(above)}/{_closed(below, tight=True)} ", place
    if name == "sqrt":
        root = "√"
        if tokens[place : place + 3] == ["[", "3", "]"]:
            root, place = "∛", place + 3
        under, place = _argument(tokens, place)
        return f"{root}({under})" if len(under) > 1 else f"{root}{under}", place
    if name in _MARKS:
        inner, place = _argument(tokens, place)
        return inner[:1] + _MARKS[name] + inner[1:], place
    if name in _PLAIN:
        return _argument(tokens, place)
    if name in ("begin", "end"):
        kind, place = _argument(tokens, place)
        return ("{ " if kind == "cases" and name == "begin" else ""), place
    if not name.isalpha():
        return (name if name in "{}|%" else " "), place
    return _SIGNS.get(name, name), place


def _closed(text: str, *, tight: bool = False) -> str:
    """Put brackets round what would fall apart beside a stroke."""
    text = text.strip()
    loose = r"[\s+\-−±·/×]" if tight else r"[\s]?[+\-−±/]"
    bare = not re.search(loose, text) or re.fullmatch(r"[√]?\([^()]*\)", text)
    return text if bare else f"({text})"


def _raised(text: str) -> str:
    if text and all(sign in "0123456789+-n" for sign in text):
        return text.translate(_RAISED)
    return f"^{text}" if len(text) == 1 else ("°" if text == "°" else f"^({text})")


def _joined(text: str) -> str:
    return text if len(text) < 2 or text.replace(",", "").isalnum() else f"({text})"
