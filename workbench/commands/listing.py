"""The figures as text for a terminal: the answer first, then the years, then the cautions."""

import textwrap
from collections.abc import Iterator, Mapping, Sequence
from typing import Any

from workbench.deal.deal import Deal
from workbench.engine.figures import NOT_YET, STATEMENT
from workbench.report.cautions import IN_ONE
from workbench.text.excerpt import excerpt
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.numbers import MISSING, money, multiple, percent, scale_for

_WIDTH = 100
_GAP = 2
"""Blanks between columns, at least."""


def listing(deal: Deal, figures: Mapping[str, Any]) -> str:
    """Every figure a person reads first; `--json` has them all."""
    locale = find_locale(deal.conventions.locale) or DEFAULT
    lines = [
        excerpt(deal.property.name, _WIDTH) or "Property without a name",
        *_pairs(_head(deal, figures, locale)),
        "",
        *_statement(deal, figures, locale),
        *_reasons(figures),
        *textwrap.wrap(IN_ONE, _WIDTH),
    ]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _pairs(rows: Sequence[tuple[str, str]]) -> Iterator[str]:
    label_width = max(len(label) for label, _ in rows)
    width = max(len(value) for _, value in rows) + _GAP
    for label, value in rows:
        yield f"  {label:<{label_width}}{value:>{width}}"


def _head(deal: Deal, figures: Mapping[str, Any], locale: Locale) -> list[tuple[str, str]]:
    code = excerpt(deal.conventions.currency, 10)
    tiers, irr = figures["tiers"], figures["irr"]
    hold = figures["hold_years"]
    cover = [one for one in figures["dscr"]["noi"] if one is not None]
    span = MISSING if hold is None else f"{hold} year" if hold == 1 else f"{hold} years"
    rows = [
        (f"Price, {code}", money(figures["price"], locale)),
        ("Worth on these assumptions, not market value", money(figures["value"], locale)),
        ("  in hand", money(tiers["in_hand"], locale)),
        ("  expected", money(tiers["expected"], locale)),
        (f"  exit after {span}", money(tiers["exit"], locale)),
        ("Margin", money(figures["margin"], locale)),
        (f"Exit-value share, hold {span}", percent(figures["exit_value_share"], locale)),
        ("  reference share for that hold", percent(figures["reference_share"], locale)),
        ("Ground share", percent(figures["ground_share"], locale)),
        ("IRR, unlevered", percent(irr["unlevered"], locale, 2)),
    ]
    if deal.loans:
        rows += [
            ("IRR, levered", percent(irr["levered"], locale, 2)),
            ("Lowest DSCR on NOI", multiple(min(cover, default=None), locale)),
        ]
    rows.append(("Cash to close", money(figures["sources_uses"]["sources"]["equity"], locale)))
    return rows


def _statement(deal: Deal, figures: Mapping[str, Any], locale: Locale) -> Iterator[str]:
    """The statement by year, as many years across as the width holds."""
    table = {_label(key): figures["statement"][key] for key in STATEMENT if key not in NOT_YET}
    scale = scale_for(tuple(value for row in table.values() for value in row), locale, 10)
    years = figures["hold_years"] or 0
    unit = f"{excerpt(deal.conventions.currency, 10)} {scale.name}".strip() + ", year"
    shown = {label: [money(value, locale, scale) for value in row] for label, row in table.items()}
    label_width = max(map(len, (unit, *shown)))
    cells = (cell for row in shown.values() for cell in row)
    width = max(map(len, cells), default=0) + _GAP
    across = max(1, (_WIDTH - label_width - 2) // width)
    for first in range(0, years, across):
        span = range(first, min(first + across, years))
        yield f"  {unit:<{label_width}}" + "".join(f"{year + 1:>{width}}" for year in span)
        for label, row in shown.items():
            yield f"  {label:<{label_width}}" + "".join(f"{row[year]:>{width}}" for year in span)
        yield ""


def _label(key: str) -> str:
    if key == "noi":
        return "Net operating income"
    return key.replace("_", " ").capitalize()


def _reasons(figures: Mapping[str, Any]) -> Iterator[str]:
    """Why some figures have no number, those with the same reason together."""
    places: dict[str, list[str]] = {}
    for place, reason in figures["reasons"].items():
        places.setdefault(reason, []).append(place)
    for reason, without in places.items():
        yield from textwrap.wrap(f"No figure: {reason}", _WIDTH, subsequent_indent="    ")
        named = ", ".join(without)
        indent = "    "
        yield from textwrap.wrap(named, _WIDTH, initial_indent=indent, subsequent_indent=indent)
    if places:
        yield ""
