"""The figures as text for a terminal: the answer first, then the years, then the cautions."""

import textwrap
from collections.abc import Iterator, Mapping, Sequence
from typing import Any

from workbench.deal.deal import Deal
from workbench.engine.figures import NOT_YET, STATEMENT
from workbench.report.cautions import FOOT
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.numbers import MISSING, money, multiple, percent, scale_for

_WIDTH = 100
_YEARS_ACROSS = 7


def listing(deal: Deal, figures: Mapping[str, Any]) -> str:
    """Every figure a person reads first; `--json` has them all."""
    locale = find_locale(deal.conventions.locale) or DEFAULT
    lines = [
        deal.property.name or "Property without a name",
        *_pairs(_head(deal, figures, locale)),
        "",
        *_statement(deal, figures, locale),
        *_reasons(figures),
        "",
        *textwrap.wrap(FOOT, _WIDTH),
    ]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _pairs(rows: Sequence[tuple[str, str]]) -> Iterator[str]:
    widest = max(len(value) for _, value in rows)
    for label, value in rows:
        yield f"  {label:<44}{value:>{widest}}"


def _head(deal: Deal, figures: Mapping[str, Any], locale: Locale) -> list[tuple[str, str]]:
    code = deal.conventions.currency
    tiers, irr = figures["tiers"], figures["irr"]
    hold = figures["hold_years"]
    cover = [one for one in figures["dscr"]["noi"] if one is not None]
    rows = [
        (f"Price, {code}", money(figures["price"], locale)),
        ("Worth on these assumptions, not market value", money(figures["value"], locale)),
        ("  in hand", money(tiers["in_hand"], locale)),
        ("  expected", money(tiers["expected"], locale)),
        (f"  exit after {hold or MISSING} years", money(tiers["exit"], locale)),
        ("Margin", money(figures["margin"], locale)),
        (f"Exit-value share, hold {hold or MISSING}", percent(figures["exit_value_share"], locale)),
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
    shown = [key for key in STATEMENT if key not in NOT_YET]
    table = {key: figures["statement"][key] for key in shown}
    scale = scale_for(tuple(value for row in table.values() for value in row), locale, 10)
    years = figures["hold_years"] or 0
    unit = f"{deal.conventions.currency} {scale.name}".strip()
    for first in range(0, years, _YEARS_ACROSS):
        span = range(first, min(first + _YEARS_ACROSS, years))
        yield f"  {unit + ', year':<24}" + "".join(f"{year + 1:>10}" for year in span)
        for key, row in table.items():
            cells = "".join(f"{money(row[year], locale, scale):>10}" for year in span)
            yield f"  {_label(key):<24}{cells}"
        yield ""


def _label(key: str) -> str:
    if key == "noi":
        return "Net operating income"
    return key.replace("_", " ").capitalize()


def _reasons(figures: Mapping[str, Any]) -> Iterator[str]:
    for place, reason in figures["reasons"].items():
        yield from textwrap.wrap(f"{place}: {reason}", _WIDTH, subsequent_indent="    ")
