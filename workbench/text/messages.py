"""Issues and reasons in plain words: which field, which value, what would be right."""

from collections.abc import Mapping
from datetime import date
from typing import Any

from workbench.deal.checks import is_fraction
from workbench.deal.deal import Deal
from workbench.deal.inputs import Input
from workbench.deal.issues import Issue
from workbench.deal.paths import UnknownPathError, field_of, locate, value_at
from workbench.text.labels import item_name, label_of
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.numbers import day, rate, trimmed

ISSUES: Mapping[str, str] = {
    "missing": "is needed and has no value yet; {range}",
    "out_of_range": "{value} is outside what is allowed; {range}",
    "too_long": "the text has {value} characters; at most {high} are allowed",
    "no_such_year": "there is no deal year {value}; years run from {low} to {high}",
    "bad_currency": "“{value}” is not a currency code; three capital letters, such as USD",
    "no_spaces": "there is no space to let yet; enter at least one, with its count of units and "
    "its market rent",
    "area_needed": "is needed because a rent is given by area; {range}",
    "areas_needed": "an amount by area needs the area of every space; {space} has none",
    "date_missing": "is needed: a lease has both its first and its last day, or neither",
    "needs_dated_lease": "{value} needs a lease with a first and a last day",
    "steps_need_dates": "is needed: only a lease with a first and a last day can have steps",
    "before_start": "{value} lies before the start on {start}; it must be that day or later",
    "outside_lease": "{value} lies outside the lease, which runs from {start} to {end}",
    "break_outside_lease": "{value} must lie from the start on {start} to the day before the end "
    "on {end}",
    "same_date_twice": "{value} already has a step in this lease; one step a day",
    "amount_or_change": "a step has a new rent or a change, and not both; enter one of them",
    "overlaps": "{value} lies before {lease} has ended on {end}; it must be later",
    "break_before_next": "{value} is a break although {lease} follows on {start}; only the last "
    "lease of a space may have one",
    "undated_beside_others": "is needed: a space with several leases needs the dates of each",
    "closing_date_needed": "is needed because {because} is dated",
    "date_or_year": "is needed: works have a date or a deal year from {low} to {high}",
    "date_and_year": "{value} stands beside a date; keep one of them",
    "before_closing": "{value} lies before closing on {closing}; works paid at closing are initial "
    "works",
    "longer_than_term": "{value} is longer than the loan's term; {range}",
    "longer_than_amortisation": "{value} is longer than interest-only and amortisation together; "
    "{range}",
    "method_needs": "is needed for the exit method “{method}”; {range}",
    "weights": "the weights of the blend sum to {value}; they must sum to 1",
    "id_ahead": "{value} is not above the id {id}; it must be at least {low}",
    "no_such_lease": "“{value}” is not a lease with dates in this deal",
    "path_lost": "names “{value}”, which the deal no longer has; the rest of the case still stands",
    "too_many": "{value} pictures are held; at most {high} are allowed",
    "not_the_picture": "the data is not a JPEG with this SHA-256",
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
    words = {name: _word(deal, value, locale) for name, value in issue.other.items()}
    low, high = _shown(deal, issue, issue.low, locale), _shown(deal, issue, issue.high, locale)
    words |= {"value": _shown(deal, issue, issue.value, locale), "low": low, "high": high}
    words["range"] = f"allowed is {low} to {high}"
    return f"{label_of(deal, issue.path)}: {ISSUES[issue.code].format(**words)}"


def word_reason(deal: Deal, code: str, words: str = "", issue: Issue | None = None) -> str:
    """Why a figure is missing; where an input is at fault, that input's issue."""
    if issue is not None:
        return f"waits for an input. {word_issue(deal, issue)}"
    return words.rstrip(".") or REASONS[code]


def _word(deal: Deal, value: Any, locale: Locale) -> str:
    """A value named in a sentence: a date, the id of an item or plain text."""
    if isinstance(value, date):
        return day(value, locale)
    for list_name in ("leases", "spaces"):
        try:
            return item_name(deal, value if "@" in str(value) else f"{list_name}@{value}")
        except (UnknownPathError, KeyError):
            continue
    return str(value)


def _shown(deal: Deal, issue: Issue, value: Any, locale: Locale) -> str:
    if isinstance(value, date):
        return day(value, locale)
    if isinstance(value, str) or value is None:
        return str(value)
    declared, fraction = _unit(deal, issue.path)
    if fraction and issue.code != "weights" and issue.code != "no_such_year":
        return rate(value, locale, 0, 4)
    if declared is not None and declared.unit == "year":
        return str(value)
    return trimmed(value, locale)


def _unit(deal: Deal, path: str) -> tuple[Input | None, bool]:
    """The declaration behind a path, and whether its value is a fraction shown in per cent."""
    try:
        declared = field_of(deal, path).input
    except (UnknownPathError, KeyError):
        return None, False
    if declared is None:
        return None, False
    steps = locate(deal, path)
    owner = value_at(deal, steps[:-1])
    return declared, declared.unit == "fraction" or is_fraction(owner, str(steps[-1]))
