"""The form of a hub that is drawn up its taper on oil."""

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms.form import Answers, Bench, Form, Made, choice, entry_head
from app.presenters.bench.state import Field, FormTask
from models.assess import DrawnUp, ItemView
from models.job import Advance, DrawUp, Mount
from models.rules.progress import NextAct
from models.units import Angle, Duration, Length, Pressure, Ratio, UnreadableNumberError

__all__ = ["draw_up_form"]

# Stand-offs are taken all round, so that a hub that sits askew shows (common practice).
_AROUND = ("0", "90", "180", "270")


def draw_up_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form of a draw-up: contact, dry zero and drawn-up stand-offs, pressures, hold."""
    found = view.drawn_up
    if found is None:
        raise LookupError(f"{view.item.name} sits on no taper")
    taper = found.taper
    position = bench.units.unit("position")
    instruments = bench.instruments("depth", "caliper", "micrometer")
    fields = [
        choice("instrument", "Instrument", instruments, instruments[0][0]),
        Field("contact", "Contact by blue, percent", needed=taper.least_contact is not None),
    ]
    fields += [
        Field(f"{what} {angle}", f"{label}, {angle}°", unit=position, use="position")
        for angle in _AROUND
        for what, label in (("zero", "Dry zero"), ("up", "Drawn up"))
    ]
    fields += [
        Field("dilation", "Greatest dilation", unit=bench.units.unit("pressure"), use="pressure"),
        Field("axial", "Axial piston", unit=bench.units.unit("pressure"), use="pressure",
              needed=False),
        Field("hold", "Piston kept after the dilation was let off", unit="min", use="duration",
              needed=taper.least_hold is not None),
        Field("growth", "Growth of the hub outside", unit=bench.units.unit("fit"), use="fit",
              needed=False),
        Field("note", "What the blue and the pressure showed", needed=False),
    ]  # fmt: skip
    task = FormTask(
        heading=f"{view.item.name}, up its taper",
        lines=_lines(bench, found),
        fields=tuple(fields),
        take="Take these",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        drawn = DrawUp(
            **entry_head(bench),
            place=bench.place(act),
            item=view.item.key,
            instrument=answers.word("instrument"),
            advances=tuple(
                Advance(
                    angle=Angle.read(angle, "°"),
                    zero=answers.length(f"zero {angle}", "position"),
                    drawn_up=answers.length(f"up {angle}", "position"),
                )
                for angle in _AROUND
            ),
            contact=_share(answers.word("contact")),
            contact_note=answers.word("note"),
            dilation_pressure=Pressure.read(answers.word("dilation"), bench.units.unit("pressure")),
            axial_pressure=_pressure(bench, answers.word("axial")),
            hold=_time(answers.word("hold")),
            hub_growth=_growth(bench, answers.word("growth")),
        )
        if view.mount is not None:
            return Made((drawn,))
        mount = Mount(
            **entry_head(bench),
            place=bench.place(act),
            item=view.item.key,
            outcome="seated",
            seated_at=bench.now(),
        )
        return Made((drawn, mount))

    return Form(task, make)


def _lines(bench: Bench, found: DrawnUp) -> tuple[str, ...]:
    units, taper = bench.units, found.taper
    low, high = taper.least_advance, taper.greatest_advance
    lines = [
        f"From the dry zero, O-rings off and pushed on firmly, up by {low.value.written} to "
        f"{high.value.written} ({low.origin.words}).",
        f"By the limits of the fit alone: {units.bare(found.wanted[0], 'position')} to "
        f"{units.show(found.wanted[1], 'position')}; what lies above is seating loss.",
    ]
    if found.expected_pressure is not None:
        words = f"It floats at about {units.both(found.expected_pressure, 'pressure')}"
        if taper.greatest_dilation is not None:
            words += f"; no more than {taper.greatest_dilation.value.written} is allowed"
        if found.pressure_at_yield is not None:
            words += f"; its bore yields at {units.show(found.pressure_at_yield, 'pressure')}"
        lines.append(words + ".")
    if found.push_off is not None:
        lines.append(
            f"While it floats it pushes itself off with {units.both(found.push_off, 'force')}: the "
            "piston holds it until the oil has drained."
        )
    return tuple(lines)


def _share(text: str) -> Ratio | None:
    if not text:
        return None
    return Ratio.read(text, "%") if "%" not in text else Ratio.read(text)


def _pressure(bench: Bench, text: str) -> Pressure | None:
    return Pressure.read(text, bench.units.unit("pressure")) if text else None


def _time(text: str) -> Duration | None:
    return Duration.read(text, "min") if text else None


def _growth(bench: Bench, text: str) -> Length | None:
    if not text:
        return None
    grown = Length.read(text, bench.units.unit("fit"))
    if grown.whole < 0:
        raise UnreadableNumberError(text, "a hub grows when it is drawn up; type how much")
    return grown
