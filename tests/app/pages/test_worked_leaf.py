"""The leaf of numbers worked out: filled when it is looked at, and each number opens."""

from app.frame.look import Look
from app.pages.worked_leaf import WorkedLeaf
from app.presenters.worked_rows import WorkedRow

ROWS = (
    WorkedRow(where="the rotor", what="mass", value="1 kg", reasons=(("formula", "a sum"),)),
    WorkedRow(where="step 1", what="least pressure", value="2 MPa", reasons=(("source", "b"),)),
)


def test_it_is_worked_out_when_looked_at_and_anew_after_a_change(qtbot):
    asked = []

    def rows():
        asked.append(1)
        return ROWS

    leaf = WorkedLeaf(rows, look=Look())
    qtbot.addWidget(leaf)
    leaf.refresh()
    assert not asked

    leaf.show()
    assert len(asked) == 1
    leaf.refresh()
    assert len(asked) == 2


def test_the_present_number_opens_to_what_stands_behind_it(qtbot):
    leaf = WorkedLeaf(lambda: ROWS, look=Look())
    qtbot.addWidget(leaf)
    leaf.show()

    leaf.table.selectRow(1)

    assert leaf.reasons.model_of_rows.rows == ROWS[1].reasons
