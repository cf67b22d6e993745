"""Materials that the shop answers for: who may keep one, and in which form."""

from models.acts.permissions import NotAllowedError
from models.assess.materials import material_problem
from models.job import OwnMaterial, Person
from models.record import journal, queries
from models.record.store import Store
from models.rules.progress import Permission

__all__ = ["keep_material", "materials_kept"]

_MAY_KEEP = ("engineer", "inspector")


def materials_kept(store: Store) -> tuple[OwnMaterial, ...]:
    """List the shop's own materials, each as it is known now."""
    with store.reading() as session:
        return queries.materials(session)


def keep_material(
    store: Store, material: OwnMaterial, *, person: Person, act_id: str, at: str
) -> int:
    """Keep a material, or its next version, in the shop's chain; give the act's place in it.

    Raises
    ------
    NotAllowedError
        If the person is neither engineer nor inspector, or the numbers cannot be a material's.
    """
    if person.role not in _MAY_KEEP:
        raise NotAllowedError(
            Permission(
                False,
                "role-may-not-keep",
                f"{person.name} is {person.role}; an engineer or an inspector answers for the "
                "numbers of a material.",
            )
        )
    problem = material_problem(material)
    if problem is not None:
        words = f"The material “{material.name}” cannot be kept: {problem}."
        raise NotAllowedError(Permission(False, "not-a-material", words))
    with (
        store.writing() as session,
        journal.act(
            session, chain=journal.SHOP, kind="material", by=person.key, act_id=act_id, done_at=at
        ) as act,
    ):
        act.flush()
        if all(one.key != person.key for one in queries.people(session)):
            act.add_people([person])
        act.add_materials([material])
    return act.sequence
