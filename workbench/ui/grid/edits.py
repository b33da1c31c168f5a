"""Edits of many cells of year rows at once: deals in, a deal out, in one step."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass, replace
from typing import get_args

from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.deal.inputs import YearRow
from workbench.deal.paths import field_of, get
from workbench.session.typed import in_percent, locale_of
from workbench.text.entry import NotTaken, parse_number


@dataclass(frozen=True)
class YearEntry:
    """What goes into one year of a row: a number, a text as typed, or None to follow again."""

    path: str
    year: int
    value: float | str | None


def with_entries(deal: Deal, entries: Iterable[YearEntry]) -> Deal:
    """The deal with the entries in it; texts that are not understood are kept as drafts."""
    by_path: dict[str, list[YearEntry]] = {}
    for entry in entries:
        by_path.setdefault(entry.path, []).append(entry)
    drafts = dict(deal.drafts)
    for path, own in by_path.items():
        row = dict(get(deal, path) or {})
        percent, locale = in_percent(deal, path), locale_of(deal)
        for entry in own:
            drafts.pop(f"{path}.{entry.year}", None)
            value = entry.value
            if isinstance(value, str) and value.strip():
                read = parse_number(value, locale, percent)
                if isinstance(read, NotTaken):
                    drafts[f"{path}.{entry.year}"] = value
                    continue
                row[entry.year] = read.value
            elif isinstance(value, float):
                row[entry.year] = value
            else:
                row.pop(entry.year, None)
        deal = _with_row(deal, path, row)
    return deal if drafts == deal.drafts else replace(deal, drafts=drafts)


def _with_row(deal: Deal, path: str, row: dict[int, float]) -> Deal:
    """The deal with a year row; what year 1 held stays if nothing is put in its place."""
    held: YearRow | None = get(deal, path)
    if held and 1 in held and 1 not in row and (row or not may_be_absent(deal, path)):
        row[1] = held[1]
    new = dict(sorted(row.items())) if row or not may_be_absent(deal, path) else None
    return deal if new == held else set_value(deal, path, new)


def may_be_absent(deal: Deal, path: str) -> bool:
    """Whether the whole row can be left out of the deal."""
    return type(None) in get_args(field_of(deal, path).kind)


def ramp(first: float, last: float, count: int) -> tuple[float, ...]:
    """So many values in equal steps from one end to the other, both exactly as they are."""
    between = (first + (last - first) * place / (count - 1) for place in range(1, count - 1))
    return (first, *(float(f"{value:.12g}") for value in between), last)


def years_in_words(years: Sequence[int]) -> str:
    """`year 3`, `years 3–7`, or `years 1, 3–4`."""
    runs: list[list[int]] = []
    for year in sorted(set(years)):
        if runs and runs[-1][-1] == year - 1:
            runs[-1].append(year)
        else:
            runs.append([year])
    parts = [str(run[0]) if len(run) == 1 else f"{run[0]}–{run[-1]}" for run in runs]
    return ("year " if len(set(years)) == 1 else "years ") + ", ".join(parts)


def step_name(verb: str, labels: Sequence[str], years: Sequence[int]) -> str:
    """The name of an undo step: `fill vacancy allowance years 3–7`, `paste 3 rows years 1–2`."""
    distinct = list(dict.fromkeys(labels))
    what = distinct[0] if len(distinct) == 1 else f"{len(distinct)} rows"
    return " ".join(part for part in (verb, what, years_in_words(years)) if part)
