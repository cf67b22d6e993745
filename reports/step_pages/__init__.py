"""Pages of a stacking step."""

from reports.step_pages.pages import step_pages

__all__ = ["step_pages"]
