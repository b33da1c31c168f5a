"""pydantic over the deal's plain records. Nothing else in the program imports pydantic."""

from functools import cache
from typing import Any

from pydantic import ConfigDict, TypeAdapter

from workbench.deal.deal import Deal
from workbench.deal.inputs import declared

_STRICT = ConfigDict(extra="forbid", strict=True, allow_inf_nan=False)


def record_classes(record: type = Deal) -> dict[str, type]:
    """Every record class below a record, by name."""
    found: dict[str, type] = {record.__name__: record}
    for field in declared(record).values():
        for below in field.records:
            found |= record_classes(below)
    return found


@cache
def deal_adapter() -> TypeAdapter[Any]:
    """Validates the JSON of a deal strictly: no extras, no NaN, no kinds turned into others."""
    for record in record_classes().values():
        type.__setattr__(record, "__pydantic_config__", _STRICT)
    return TypeAdapter(Deal)
