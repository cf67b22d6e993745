"""Whether an entry may be made now: by its person's role, then by the order of the work."""

from models.acts.beside import MAY_DECIDE, NO_WORK, beside_permission
from models.assess import Assessment
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    DrawUp,
    Heating,
    Mount,
    Removal,
    RunoutSurvey,
    Settled,
    Signature,
    SizeSurvey,
    StationWatched,
)
from models.rules.progress import Act, Permission, may

__all__ = ["NotAllowedError", "demand", "permission_for"]


class NotAllowedError(Exception):
    """An act that may not start now; `name` says why in one word of the program's own."""

    def __init__(self, permission: Permission) -> None:
        self.name = permission.name
        self.words = permission.words
        super().__init__(permission.words)


def demand(permission: Permission) -> None:
    """Refuse an act that is not allowed."""
    if not permission.allowed:
        raise NotAllowedError(permission)


def _refuse(name: str, words: str) -> Permission:
    return Permission(False, name, words)


def permission_for(view: Assessment, entry: AnyEntry) -> Permission:
    """Ask whether an entry may be made now: by its person's role, then by the order of the work."""
    role = _role_permission(view, entry)
    if not role.allowed:
        return role
    if isinstance(entry, RunoutSurvey):
        known = {one.key for one in view.job.plan.stations}
        strange = [one.station for one in entry.stations if one.station not in known]
        if strange:
            return _refuse(
                "station-unknown",
                f"The plan knows no station {', '.join(strange)}. Read those of the plan, or have "
                "it revised.",
            )
    if entry.supersedes is not None:
        return _correction_permission(view, entry)
    act = _act_of(entry)
    step = entry.place.step
    if act is None:
        return Permission(True)
    if act is Act.SURVEY_BARE_SHAFT:
        return may(view.progress, act, step=view.job.plan.steps[0].key)
    if step is None:
        return _refuse("no-step-named", "The entry names no step of the plan.")
    if isinstance(entry, RunoutSurvey) and entry.purpose == "before":
        return _before_permission(view, step)
    permission = may(view.progress, act, step=step, item=getattr(entry, "item", None))
    if permission.allowed and not isinstance(entry, AttemptOpened):
        latest = view.progress.latest(step)
        if latest is not None and entry.place.attempt != latest.number:
            return _refuse(
                "not-the-latest-attempt",
                f"Attempt {entry.place.attempt} at step {step} is not the latest; "
                f"attempt {latest.number} is.",
            )
    if permission.allowed and isinstance(entry, Settled):
        return _settled_permission(view, entry)
    return permission


def _act_of(entry: AnyEntry) -> Act | None:
    if isinstance(entry, Confirmation):
        furnace = entry.moment == "before the furnace"
        return Act.CONFIRM_FURNACE if furnace else Act.CONFIRM_DOOR
    if isinstance(entry, RunoutSurvey):
        return {
            "bare shaft": Act.SURVEY_BARE_SHAFT,
            "bare seat": Act.SURVEY_SEAT,
        }.get(entry.purpose, Act.SURVEY)
    if isinstance(entry, SizeSurvey) and entry.place.kind != "attempt":
        return None
    acts: dict[type, Act] = {
        AttemptOpened: Act.OPEN_ATTEMPT,
        SizeSurvey: Act.MEASURE,
        Heating: Act.HEAT,
        Mount: Act.MOUNT,
        AxialMeasured: Act.MEASURE_AXIAL,
        Cooling: Act.COOL,
        StationWatched: Act.COOL,
        DrawUp: Act.DRAW_UP,
        Removal: Act.REMOVE,
        Settled: Act.SETTLE,
        Signature: Act.SIGN,
    }
    return acts.get(type(entry))


def _correction_permission(view: Assessment, entry: AnyEntry) -> Permission:
    """Let a correction stand that names what it replaces, and a reason; it only records."""
    old = next((one for one in view.job.entries if one.id == entry.supersedes), None)
    if old is None or type(old) is not type(entry) or old.place != entry.place:
        return _refuse("nothing-to-correct", "The entry to be corrected is not in this place.")
    if any(one.supersedes == old.id for one in view.job.entries):
        return _refuse(
            "corrected-already", "That entry has been corrected already; correct the correction."
        )
    if not entry.reason:
        return _refuse("reason-missing", "A correction says why.")
    return Permission(True)


def _before_permission(view: Assessment, step: str) -> Permission:
    latest = view.progress.latest(step)
    if latest is None or latest.outcome is not None:
        return _refuse("no-attempt-open", f"No attempt at step {step} is open.")
    if any(item.mounted for item in latest.items):
        return _refuse(
            "part-is-on", "A part of this step is on; it is too late for a survey before."
        )
    return Permission(True)


def _settled_permission(view: Assessment, entry: Settled) -> Permission:
    latest = view.progress.latest(entry.place.step or "")
    came_off = latest is not None and latest.is_coming_off
    if (entry.outcome == "removed") != came_off:
        return _refuse(
            "outcome-not-true",
            "The attempt came off and cannot be settled otherwise."
            if came_off
            else "Nothing has been removed in this attempt.",
        )
    return Permission(True)


def _role_permission(view: Assessment, entry: AnyEntry) -> Permission:
    """Hold signatures and decisions to the roles of the people who give them."""
    person = next((one for one in view.job.people if one.key == entry.by), None)
    if person is None:
        return _refuse("person-unknown", f"Nobody in this job has the key “{entry.by}”.")
    if isinstance(entry, Decision) and person.role not in MAY_DECIDE:
        return _refuse(
            "role-may-not-decide", f"{person.name} is {_a(person.role)}; an inspector decides."
        )
    beside = beside_permission(view, entry, person)
    if not beside.allowed or not isinstance(entry, Signature):
        return beside
    if entry.role != person.role:
        return _refuse(
            "role-not-held", f"{person.name} is {_a(person.role)} and cannot sign as {entry.role}."
        )
    wanted = {"performed": "technician", "inspected": "inspector", "witnessed": "witness"}
    if wanted.get(entry.meaning, person.role) != person.role:
        return _refuse(
            "role-not-held",
            f"{person.name} is {_a(person.role)}; “{entry.meaning}” is signed by "
            f"{_a(wanted[entry.meaning])}.",
        )
    attempt = view.attempt(entry.place.step or "", entry.place.attempt or 0)
    did_it = attempt is not None and any(
        one.by == entry.by and not isinstance(one, NO_WORK) for one in attempt.entries
    )
    agreed = any(one.what == "whoever performed may inspect" for one in view.job.plan.waivers)
    if entry.meaning == "inspected" and did_it and not agreed:
        return _refuse(
            "performer-cannot-inspect",
            f"{person.name} worked on this step and cannot inspect it.",
        )
    return Permission(True)


def _a(role: str) -> str:
    return f"an {role}" if role[0] in "aeiou" else f"a {role}"
