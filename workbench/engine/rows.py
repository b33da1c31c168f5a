"""What kind of row a formula gives, and that no formula mixes kinds: months, years, dates."""

from collections.abc import Iterator, Mapping
from functools import cache

from workbench.deal.deal import Deal
from workbench.deal.inputs import Field, declared
from workbench.engine import formula as f
from workbench.engine.lines.line import Per

_FACTS: Mapping[str, Per] = {
    "units": "once",
    "area": "once",
    "market_total": "once",
    "date_years": "date",
}
"""Facts that are not rows of months."""

_LOOKS: Mapping[str, tuple[Per | None, Per | None]] = {
    "running_sum": (None, None),
    "running_product": (None, None),
    "running_least": (None, None),
    "later_sum": (None, None),
    "following": (None, None),
    "year_sum": ("month", "year"),
    "year_end": ("month", "year"),
    "of_year": ("year", "month"),
    "month_starts": ("month", "date"),
    "over_dates": ("date", "once"),
    "before": (None, None),
    "on_dates": ("month", "date"),
    "at_year": ("year", "once"),
    "first_date": ("date", "once"),
}
"""What each look wants and gives; None is the row it was given."""

_NODES: Mapping[type[f.Formula], str] = {
    f.Before: "before",
    f.OnDates: "on_dates",
    f.AtYear: "at_year",
    f.FirstDate: "first_date",
}
"""Looks that are nodes of their own: the row first, then at most a single figure."""


class RowError(TypeError):
    """A formula that mixes rows, or a look along a row it does not fit."""


def row_of(node: f.Formula, lines: Mapping[str, Per]) -> Per:
    """The row of a formula whose lines have these rows. Raises RowError."""
    match node:
        case f.Number():
            return "once"
        case f.Line(key=key):
            return lines[key]
        case f.Given(path=path):
            return "year" if is_row(path) else "once"
        case f.Fact(name=name):
            return _FACTS.get(name, "month")
        case f.Look(along=along, of=of):
            return _look(along, row_of(of, lines))
        case f.Before() | f.OnDates() | f.AtYear() | f.FirstDate():
            row, *beside = [row_of(part, lines) for part in node.parts()]
            _single(beside, node)
            return _look(_NODES[type(node)], row)
        case f.OnDate():
            _single([row_of(part, lines) for part in node.parts()], node)
            return "date"
        case _:
            return _together([row_of(part, lines) for part in node.parts()], node)


def _look(along: str, given: Per) -> Per:
    wanted, made = _LOOKS[along]
    if given == "once" or (wanted is not None and given != wanted):
        raise RowError(f"{along} cannot look along a row of kind {given}")
    return given if made is None else made


def _single(rows: list[Per], node: f.Formula) -> None:
    for row in rows:
        if row != "once":
            raise RowError(f"{type(node).__name__} wants a single figure, not a row of kind {row}")


def _together(rows: list[Per], node: f.Formula) -> Per:
    kinds = {row for row in rows if row != "once"}
    if len(kinds) > 1:
        raise RowError(f"{type(node).__name__} mixes rows of kinds {sorted(kinds)}")
    return kinds.pop() if kinds else "once"


def is_row(path: str) -> bool:
    """Whether the input at a key path, of whatever deal, is a year row."""
    head, _, rest = path.partition(".")
    record = _records()[head.partition("@")[0]]
    field: Field | None = None
    for name in rest.split("."):
        field = declared(record)[name]
        record = field.kind
    return field is not None and field.is_row


@cache
def _records() -> Mapping[str, type]:
    """The record class behind each section and each list, at any depth."""
    return dict(_below(Deal))


def _below(record: type) -> Iterator[tuple[str, type]]:
    for field in declared(record).values():
        for below in field.records:
            yield field.name, below
            yield from _below(below)
