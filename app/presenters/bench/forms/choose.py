"""Which form belongs to which act."""

from collections.abc import Callable

from app.presenters.bench.forms.balancing import balance_form
from app.presenters.bench.forms.confirming import confirmation_form
from app.presenters.bench.forms.cooling import cooling_form
from app.presenters.bench.forms.drawing_up import draw_up_form
from app.presenters.bench.forms.form import Bench, Form
from app.presenters.bench.forms.heating import heat_form
from app.presenters.bench.forms.measuring import sizes_form
from app.presenters.bench.forms.mounting import axial_form, mount_form, removal_form
from models.assess import Attempt, ItemView
from models.rules.progress import Act, NextAct

__all__ = ["form_for"]


def form_for(bench: Bench, act: NextAct, attempt: Attempt | None) -> Form | None:
    """Give the form of an act; None where the act has none."""
    if attempt is None:
        return None
    item = next((one for one in attempt.items if one.item.key == act.item), None)
    on_item: dict[Act, Callable[[Bench, NextAct, ItemView], Form]] = {
        Act.MEASURE: sizes_form,
        Act.CONFIRM_FURNACE: confirmation_form,
        Act.CONFIRM_DOOR: confirmation_form,
        Act.HEAT: heat_form,
        Act.COMPLETE_MOUNT: mount_form,
        Act.DRAW_UP: draw_up_form,
        Act.MEASURE_AXIAL: axial_form,
        Act.REMOVE: removal_form,
    }
    if act.act is Act.COOL:
        return cooling_form(bench, act, attempt)
    if act.act is Act.BALANCE:
        return balance_form(bench, act, attempt)
    maker = on_item.get(act.act)
    return maker(bench, act, item) if maker is not None and item is not None else None
