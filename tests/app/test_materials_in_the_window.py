"""Materials at the Register desk: the table with its sources, and one that the shop adds."""

import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QLineEdit

from app.pages.register.materials import MaterialsLeaf
from app.presenters.materials import material_from
from models.acts import Acts
from models.record.store import Store
from models.units import UnreadableNumberError
from tests.app.open_shop import COMPRESSOR
from tests.record.a_job import FORGING

TYPED = {
    "name": "own forging",
    "source": "certificate 17",
    "density": "0.2836 lb/in³",
    "poisson": "0.29",
    "expansions": "100 °C: 12 µm/(m·K); 300: 13",
    "moduli": "20 °C: 206",
    "yield": "640",
    "conductivity": "42",
    "heat": "470",
}


def leaf_of(opened, qtbot):
    opened.window.show_desk("Register")
    leaf = opened.window.findChild(MaterialsLeaf)
    parent = leaf.parent()
    while not hasattr(parent, "turn_to"):
        parent = parent.parent()
    parent.turn_to("Materials")
    qtbot.waitUntil(leaf.isVisible)
    return leaf


def test_what_is_typed_becomes_the_material_of_the_certificate():
    assert material_from(TYPED) == FORGING


@pytest.mark.parametrize(("change", "words"), [
    ({"source": ""}, "source is still empty"),
    ({"density": "7,85"}, "in density"),
    ({"expansions": "12.0"}, "temperature, colon, value"),
    ({"moduli": "20 °C: stiff"}, "in moduli"),
    ({"yield": "many"}, "in yield"),
])  # fmt: skip
def test_what_cannot_be_read_names_its_field(change, words):
    with pytest.raises(UnreadableNumberError, match=words):
        material_from(TYPED | change)


def test_each_material_opens_to_the_source_of_every_number(shop_folder, open_window, qtbot):
    leaf = leaf_of(open_window(shop_folder, sign_in="AT", job=COMPRESSOR), qtbot)
    names = [row.name for row in leaf.table.model_of_rows.rows]

    leaf.table.selectRow(names.index("13cr-4ni"))

    said = dict(leaf.sources.model_of_rows.rows)
    assert "1.4313 datasheets" in said["expansion from"]
    assert said["density from"]
    # A technician adds none.
    assert not leaf.add.isVisible()


def test_an_engineer_adds_one_which_stands_first_and_on_the_record(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder, sign_in="DO", job=COMPRESSOR)
    qtbot.waitUntil(lambda: opened.shop.person is not None, timeout=10000)
    leaf = leaf_of(opened, qtbot)
    qtbot.mouseClick(leaf.add, Qt.MouseButton.LeftButton)
    form = leaf.form

    fields = form.findChildren(QLineEdit)
    assert len(fields) == len(TYPED)
    for field, text in zip(fields, {**TYPED, "poisson": "0.9"}.values(), strict=True):
        field.setText(text)
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: form.said.isVisible(), timeout=10000)
    assert "cannot be kept" in form.said.text()

    fields[3].setText("0.29")
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: leaf.form is None, timeout=10000)
    qtbot.waitUntil(lambda: leaf.table.model_of_rows.rows[0].kept_by == "the shop", timeout=10000)

    assert leaf.table.model_of_rows.rows[0].name == "own forging"
    opened.close()
    with Store.open(shop_folder) as store:
        assert Acts(store).materials() == (FORGING,)
