"""Where something stands in a file’s plain data, as a key path, and what is declared for it."""

from typing import Any, TypeAlias, get_args

from workbench.deal.deal import Deal
from workbench.deal.inputs import Field, declared
from workbench.text.excerpt import excerpt

Location: TypeAlias = tuple[str | int, ...]
"""Keys and list positions from the whole file downwards."""


def place_of(raw: Any, location: Location) -> str:
    """The key path of a location: items by id where they have one, else by number from 1."""
    place = ""
    here = raw
    for part in location:
        if isinstance(part, int):
            here = here[part] if isinstance(here, list) else None
            identity = here.get("id") if isinstance(here, dict) else None
            name = place.rpartition(".")[2]
            known = isinstance(identity, str)
            place = f"{name}@{excerpt(str(identity))}" if known else f"{place}[{part + 1}]"
        else:
            here = here.get(part) if isinstance(here, dict) else None
            place = f"{place}.{excerpt(part)}" if place else excerpt(part)
    return place


def within(raw: Any, location: Location) -> Location:
    """The part of a location that the data has."""
    for depth, part in enumerate(location):
        try:
            raw = raw[part]
        except (LookupError, TypeError):
            return location[:depth]
    return location


def field_at(location: Location) -> Field | None:
    """The field of a record that a location leads to or into."""
    record: Any = Deal
    field = None
    for part in location:
        if isinstance(part, int):
            continue
        if record is None or part not in declared(record):
            return field if record is None else None
        field = declared(record)[part]
        kinds = (field.kind, *get_args(field.kind))
        record = next((kind for kind in kinds if hasattr(kind, "__dataclass_fields__")), None)
    return field


def allowed_at(location: Location) -> str:
    """The end of a sentence that says what is allowed at a location, where a range is declared."""
    field = field_at(location)
    mark = None if field is None else field.input
    if field is None or mark is None or (field.is_row and location[-1] == field.name):
        return ""
    if mark.high is None:
        return ""
    if mark.low is None:
        return f"; at most {mark.high:.0f} characters are allowed"
    return f"; it must be from {mark.low:.16g} to {mark.high:.16g}"
