"""The worst of some findings as a cell: shape and sentence."""

from collections.abc import Sequence

from reportlab.platypus import Flowable, Table

from models.rules.rule import Finding
from reports.job_pictures import verdict_kind
from reports.parts import PlainStyle, note, shape, words

__all__ = ["judged_rows"]


def judged_rows(findings: Sequence[Finding]) -> Flowable | str:
    """Set the worst of some findings: shape and sentence."""
    if not findings:
        return "–"
    worst = max(findings, key=lambda one: one.verdict.severity)
    return Table(
        [[shape(verdict_kind(worst.verdict)), note(words(worst.message))]],
        colWidths=[10, None],
        style=PlainStyle(
            [
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 0),
                ("TOPPADDING", (0, 0), (-1, -1), 0),
                ("BOTTOMPADDING", (0, 0), (-1, -1), 0),
                ("VALIGN", (0, 0), (-1, -1), "TOP"),
            ]
        ),
    )
