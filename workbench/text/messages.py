"""Issues and reasons in plain words: which field, which value, what would be right."""

from collections.abc import Mapping
from datetime import date
from typing import Any

from workbench.deal.checks import is_fraction
from workbench.deal.deal import Deal
from workbench.deal.issues import Issue
from workbench.deal.paths import UnknownPathError, field_of, locate, value_at
from workbench.text.excerpt import excerpt
from workbench.text.labels import item_name, label_of
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.numbers import MINUS, day, rate, trimmed

ISSUES: Mapping[str, str] = {
    "missing": "{a_value} is needed",
    "out_of_range": "{value} is not allowed; it must be from {low} to {high}",
    "no_such_day": "{value} is not allowed; it must be from {first} to {last}",
    "too_long": "the text has {value} characters; at most {high} are allowed",
    "no_such_year": "there is no deal year {value}; years run from {low} to {high}",
    "bad_currency": "“{value}” is not a currency code; three capital letters, such as USD",
    "no_spaces": "there is no space to let yet; enter at least one, with its count of units and "
    "its market rent",
    "area_needed": "{a_value} is needed, since a rent is given by area",
    "areas_needed": "an amount by area needs the area of every space; {space} has none",
    "date_missing": "a date is needed: a lease has both its first and its last day, or neither",
    "needs_dated_lease": "{value} needs a lease with a first and a last day",
    "steps_need_dates": "a date is needed, since only a lease with a first and a last day can have "
    "steps",
    "before_start": "{value} lies before the start on {start}; it must be that day or later",
    "outside_lease": "{value} lies outside the lease, which runs from {start} to {end}",
    "break_outside_lease": "{value} lies outside the lease; a break must lie from the start on "
    "{start} to the day before the end on {end}",
    "same_date_twice": "{value} already has a step in this lease; one step a day",
    "amount_or_change": "a step has a new rent or a change, and not both; enter one of them",
    "overlaps": "{value} lies before {lease} has ended on {end}; it must be later",
    "break_before_next": "{value} is a break although {lease} follows on {start}; only the last "
    "lease of a space may have one",
    "undated_beside_others": "a date is needed, since a space with several leases needs the dates "
    "of each",
    "closing_date_needed": "a date is needed, since {because} is dated",
    "date_or_year": "a year from {low} to {high} is needed, or a date",
    "date_and_year": "year {value} stands beside a date; keep one of the two",
    "before_closing": "{value} lies before closing on {closing}; works paid at closing are initial "
    "works",
    "longer_than_term": "{value} is more than the loan’s term; it must be from {low} to {high}",
    "longer_than_amortisation": "{value} is more than interest-only and amortisation together; it "
    "must be from {low} to {high}",
    "method_needs": "{a_value} is needed for the exit method “{method}”",
    "weights": "the weights of the blend sum to {value}; they must sum to 1",
    "id_ahead": "{value} is not above the number of {id}; it must be at least {low}",
    "no_such_lease": "“{value}” is not a lease with dates in this deal",
    "path_lost": "“{value}” is no longer in the deal; the rest of the case still stands",
    "too_many": "{value} pictures are held; at most {high} are allowed",
    "not_the_picture": "the data is not a JPEG with the SHA-256 {value}",
    "picture_lost": "the picture {value} is named but not held",
    "draft": "the entry “{value}” could not be understood and is not taken in",
}
"""What is wrong, by the code of the issue; the field's name goes before it."""

REASONS: Mapping[str, str] = {
    "waits_for": "waits for an input",
    "too_large": "the figures are too large to compute with",
    "return_not_above_growth": "a perpetuity has no finite value: the required return of the last "
    "year is not above the lasting growth of rent",
    "no_lasting_income": "a perpetuity has no value: the net cash flow of the last year is not "
    "above nothing",
    "value_not_positive": "the value is not above nothing, so that it has no shares",
    "negative_exit_income": "the income to be capitalised at the exit is negative",
    "exit_price_not_positive": "the exit price is not above nothing",
    "price_not_positive": "the price is not above nothing",
    "nothing_put_in": "no cash goes in",
    "nothing_comes_back": "no cash comes back",
    "not_paid_back": "the money put in does not come back within the hold",
    "no_debt_service": "no debt service falls in this year",
    "no_loan_balance": "no loan is owed at the start of this year",
    "no_equity": "loans and deposits cover all that is to be paid at closing",
    "no_gross_income": "there is no income in year 1 to divide by",
    "no_loan": "the deal has no loan",
    "no_rate": "no single rate can be given",
}
"""Why a figure cannot be given, by the code of the reason."""


def word_issue(deal: Deal, issue: Issue) -> str:
    """A sentence that names the field, the value and the allowed range."""
    locale = find_locale(deal.conventions.locale) or DEFAULT
    unit = "" if issue.code in _PLAIN else _unit(deal, issue.path)
    words = {name: _named(deal, value, locale) for name, value in issue.other.items()}
    low, high = _shown(issue.low, unit, locale), _shown(issue.high, unit, locale)
    words |= {"value": _shown(issue.value, unit, locale), "low": low, "high": high}
    if issue.code == "weights":
        words["value"] = trimmed(issue.value, locale, 0, 10)
    words["a_value"] = "a date" if unit == "date" else f"a value from {low} to {high}"
    return f"{label_of(deal, issue.path)}: {ISSUES[issue.code].format(**words)}"


def word_reason(deal: Deal, code: str, words: str = "", issue: Issue | None = None) -> str:
    """Why a figure is missing; where an input is at fault, that input's issue."""
    if issue is not None:
        return f"waits for an input. {word_issue(deal, issue)}"
    return words.rstrip(".") or REASONS[code]


_PLAIN = frozenset({"too_long", "no_such_year", "weights"})
"""Codes whose figures are not in the unit of the input: characters, a year, a sum."""

_LONGEST = 80
"""Characters of a typed text that a sentence repeats; room for a SHA-256."""


def _named(deal: Deal, value: Any, locale: Locale) -> str:
    """What else a sentence names: a date, an item of the deal, or plain text."""
    if isinstance(value, date):
        return day(value, locale)
    for name in (str(value), f"leases@{value}", f"spaces@{value}"):
        try:
            return item_name(deal, name)
        except UnknownPathError:
            continue
    return excerpt(str(value))


def _unit(deal: Deal, path: str) -> str:
    """The unit of the input behind a path, with amounts that are shares told from money."""
    try:
        declared = field_of(deal, path).input
        steps = locate(deal, path)
    except UnknownPathError:
        return ""
    if is_fraction(value_at(deal, steps[:-1]), str(steps[-1])):
        return "fraction"
    return declared.unit if declared is not None else ""


def _shown(value: Any, unit: str, locale: Locale) -> str:
    """A value with all its decimals, since a rounded one could look as if it were allowed."""
    if isinstance(value, date):
        return day(value, locale)
    if isinstance(value, str) or value is None:
        return excerpt(str(value), _LONGEST)
    if unit == "year":
        return str(value)
    if value and not 1e-12 < abs(value) < 1e21:
        return f"{value:g}".replace("e+", "e").replace(".", locale.decimal).replace("-", MINUS)
    return rate(value, locale, 0, 30) if unit == "fraction" else trimmed(value, locale, 0, 30)
