"""The desks as pictures, for people to look at; written below the working folder."""

from pathlib import Path

import pytest

from tests.app.open_shop import COMPRESSOR

pytestmark = pytest.mark.pictures
FOLDER = Path("build") / "pictures"


@pytest.mark.parametrize("size", [(1280, 800), (1920, 1080)], ids=lambda size: str(size[0]))
@pytest.mark.parametrize("looks", [0, 1, 2], ids=["light", "dark", "contrast"])
def test_every_desk_is_written_as_a_picture(shop_folder, open_window, qtbot, size, looks):
    FOLDER.mkdir(parents=True, exist_ok=True)
    opened = open_window(shop_folder, sign_in="BQ", job=COMPRESSOR)
    opened.jobs.set_filter("All")
    opened.window.resize(*size)
    for _ in range(looks):
        opened.window.next_appearance()
    name = opened.settings.appearance.value
    drawn = {}
    for desk in opened.window.desks:
        opened.window.show_desk(desk)
        opened.settle()
        image = opened.window.grab().toImage()
        drawn[desk] = image
        assert image.save(str(FOLDER / f"desk_{desk.lower()}_{name}_{size[0]}.png"))

    ground = {image.pixelColor(4, size[1] - 200).name() for image in drawn.values()}
    assert ground <= {
        opened.window.look.palette.paper.lower(),
        opened.window.look.palette.sheet.lower(),
    }
