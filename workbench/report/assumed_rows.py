"""Assumptions by year: what was typed told apart from what follows the year before."""

from collections.abc import Iterator

from workbench.deal.inputs import Leaf, at_year, leaves
from workbench.deal.paths import find_item, value_at
from workbench.report.document import Block, Subheading, YearLine, YearTable, plain
from workbench.report.names import item_title
from workbench.report.typed import amount_text, decimals_of, is_default
from workbench.report.voice import Voice
from workbench.report.years import Years
from workbench.text import numbers


def row_table(years: Years) -> Iterator[Block]:
    """The year rows that were typed, over the hold; nothing where there is no year or no row."""
    rows = [leaf for leaf in leaves(years.voice.deal) if _is_typed(leaf)]
    if not years.count or not rows:
        return
    yield Subheading("By year")
    yield plain("Upright: typed for that year. Slanting: follows the year before.", "small")
    lines = tuple(_line(years.voice, leaf, years.count) for leaf in rows)
    yield YearTable("year to" if "\n" in years.headings()[0] else "year", years.headings(), lines)


def _is_typed(leaf: Leaf) -> bool:
    if not leaf.field.is_row or not leaf.value:
        return False
    return leaf.input.needed or not is_default(leaf.owner, leaf.field.name)


def _line(voice: Voice, leaf: Leaf, count: int) -> YearLine:
    row, unit = leaf.value, leaf.input.unit
    values = [at_year(row, year) for year in range(1, count + 1)]
    decimals = decimals_of(voice, unit, (value for value in values if value is not None))
    cells = tuple(
        numbers.MISSING if value is None else amount_text(voice, unit, value, decimals)
        for value in values
    )
    following = frozenset(place for place in range(count) if place + 1 not in row)
    return YearLine(_label(voice, leaf), cells, following=following)


def _label(voice: Voice, leaf: Leaf) -> str:
    """The input's label with the item it belongs to, and the currency of amounts."""
    label = leaf.input.label
    head, at, identity = leaf.path.partition(".")[0].partition("@")
    if at:
        item = value_at(voice.deal, find_item(voice.deal, f"{head}@{identity}"))
        label = f"{label}, {item_title(item)}"
    return f"{label}, {voice.unit()}" if leaf.input.unit == "money" else label
