"""The bench's forms: the few fields an act needs, and the entries that their answers make."""

from app.presenters.bench.forms.choose import form_for
from app.presenters.bench.forms.form import Answers, Bench, Form, Made
from app.presenters.bench.forms.noting import note_form
from app.presenters.bench.forms.surveying import survey_form

__all__ = ["Answers", "Bench", "Form", "Made", "form_for", "note_form", "survey_form"]
