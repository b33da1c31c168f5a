"""Messages: every code has words, every word is used, and each names field, value and range."""

import ast
import re
from collections.abc import Iterator
from datetime import date
from pathlib import Path

import pytest

import workbench
from tests.crossing import CROSSINGS, Crossing
from tests.fullest import fullest
from workbench.deal.changes import set_value
from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.deal.issues import Issue
from workbench.engine.plan import HARMLESS, compile_deal
from workbench.engine.result import evaluate
from workbench.files.entries import with_entries
from workbench.text.messages import ISSUES, REASONS, word_issue, word_reason

PACKAGE = Path(workbench.__file__).parent
FULLEST = fullest()


def trees(room: str) -> Iterator[ast.AST]:
    for path in sorted((PACKAGE / room).rglob("*.py")):
        yield from ast.walk(ast.parse(path.read_text("utf-8")))


def calls(room: str, name: str, position: int) -> Iterator[ast.expr]:
    """One argument of every call of a name."""
    for node in trees(room):
        if isinstance(node, ast.Call) and getattr(node.func, "id", "") == name:
            yield node.args[position]


def texts(nodes: Iterator[ast.expr]) -> set[str]:
    """The texts that stand there as they are."""
    return {str(node.value) for node in nodes if isinstance(node, ast.Constant)}


def conditions() -> set[str]:
    """The codes beside the conditions of the lines: `(x <= 0, "code")`."""
    found = set()
    for node in trees("engine/lines"):
        if isinstance(node, ast.Tuple) and len(node.elts) == 2:
            condition, code = node.elts
            if isinstance(condition, ast.Compare) and isinstance(code, ast.Constant):
                found.add(str(code.value))
    return found


def test_every_issue_code_has_words_and_every_word_is_used() -> None:
    """A code that is made up at run time could not be looked for, so there is none."""
    given = list(calls("deal", "Issue", 1))
    assert all(isinstance(node, ast.Constant) for node in given)
    codes = texts(iter(given))
    assert len(codes) > 30
    assert codes == set(ISSUES)
    elsewhere = ("engine", "report", "files", "text", "commands")
    assert not any(list(calls(room, "Issue", 1)) for room in elsewhere)


def test_every_reason_code_has_words_and_every_word_is_used() -> None:
    codes = conditions() | texts(calls("engine", "Reason", 0))
    assert {"waits_for", "too_large", "no_rate", "no_loan"} <= codes
    assert codes == set(REASONS)


@pytest.mark.parametrize("method", ["forward_noi", "perpetuity", "price_per", "amount"])
def test_the_conditions_found_are_those_that_lines_have(method: str) -> None:
    deal = set_value(set_value(FULLEST, "leave.blend", ()), "leave.method", method)
    lines = evaluate(compile_deal(deal)).declared.values()
    used = {code for line in lines for _, code in line.unless}
    assert len(used) > 5
    assert used <= conditions()


def test_every_harmless_code_is_a_code() -> None:
    assert set(ISSUES) >= HARMLESS


def test_every_code_has_an_example() -> None:
    assert {one.code for one in CROSSINGS} == set(ISSUES)


@pytest.mark.parametrize("one", CROSSINGS, ids=lambda one: f"{one.code} {one.path}")
def test_example(one: Crossing) -> None:
    deal = with_entries(FULLEST, one.entries)
    found = [issue for issue in check(deal) if (issue.path, issue.code) == (one.path, one.code)]
    assert word_issue(deal, found[0]) == one.said


@pytest.mark.parametrize("code", ISSUES)
def test_words_are_whole(code: str) -> None:
    """A field's name goes before them, so they begin small and end without a full stop."""
    words = ISSUES[code]
    assert words[0] in "{“" or words[0].islower()
    assert not words.endswith(".")
    assert set(re.findall(r"{(\w+)}", words)) <= {
        "value", "low", "high", "a_value", "first", "last", "start", "end", "lease", "space",
        "because", "closing", "method", "id",
    }  # fmt: skip


@pytest.mark.parametrize("code", REASONS)
def test_reasons_are_clauses(code: str) -> None:
    assert REASONS[code][0].islower()
    assert not REASONS[code].endswith(".")


def said(path: str, value: object, locale: str = "en-US") -> str:
    deal = set_value(set_value(FULLEST, "conventions.locale", locale), path, value)
    return word_issue(deal, next(one for one in check(deal) if one.path == path))


@pytest.mark.parametrize(
    ("path", "value", "words"),
    [
        ("leave.hold", 41, "Hold: 41 is not allowed; it must be from 1 to 40"),
        ("leave.exit_yield", 1.5, "Exit yield: 150% is not allowed; it must be from 0.01% to 100%"),
        (
            "spaces@s6.area",
            0.001,
            "Area of one unit of space s6 “Flats”: 0.001 is not allowed; it must be from 0.01 to "
            "1,000,000,000",
        ),
        (
            "purchase.price",
            -0.004,
            "Price: −0.004 is not allowed; it must be from 0 to 1,000,000,000,000,000",
        ),
        (
            "purchase.price",
            1e300,
            "Price: 1e300 is not allowed; it must be from 0 to 1,000,000,000,000,000",
        ),
        (
            "purchase.price",
            -1.5e-200,
            "Price: −1.5e−200 is not allowed; it must be from 0 to 1,000,000,000,000,000",
        ),
        (
            "leave.selling_cost",
            1.0000000000001,
            "Selling cost: 100.00000000001% is not allowed; it must be from 0% to 100%",
        ),
        (
            "leave.selling_cost",
            -1e-300,
            "Selling cost: −1e−300 is not allowed; it must be from 0% to 100%",
        ),
        (
            "works@w20.year",
            10**25,
            f"Deal year of works w20 “Boiler”: 1{'0' * 25} is not allowed; it must be from 1 to 41",
        ),
    ],
)
def test_a_value_is_shown_so_that_it_is_seen_to_be_wrong(
    path: str, value: float, words: str
) -> None:
    assert said(path, value) == words


def test_numbers_and_dates_are_in_the_locale_of_the_deal() -> None:
    assert said("leave.exit_yield", 1.25, "de-DE") == (
        "Exit yield: 125\u00a0% is not allowed; it must be from 0,01\u00a0% to 100\u00a0%"
    )
    assert said("purchase.price", 1.5e300, "de-DE").startswith("Price: 1,5e300 is not allowed")
    assert "1 January 3000" in said("purchase.closing_date", date(3000, 1, 1), "en-GB")


def test_a_text_of_the_user_stays_on_one_line_and_is_cut() -> None:
    issue = Issue("leave.hold", "draft", "ten\n\x1b[31m{low} {nothing}" + "x" * 500)
    words = word_issue(FULLEST, issue)
    assert words.startswith("Hold: the entry “ten [31m{low} {nothing}xxx")
    assert words.isprintable()
    assert len(words) < 160


def test_braces_in_names_are_not_taken_for_places() -> None:
    deal = set_value(
        set_value(FULLEST, "leases@e2.tenant", "{end} {0}"), "purchase.closing_date", None
    )
    assert word_issue(deal, check(deal)[0]).endswith("since lease e2 “{end} {0}” is dated")


def test_an_issue_of_a_path_that_is_not_there_is_still_worded() -> None:
    issue = Issue("nowhere.at.all", "out_of_range", 5.25, 1, 4)
    assert word_issue(Deal(), issue) == (
        "nowhere.at.all: 5.25 is not allowed; it must be from 1 to 4"
    )


def test_a_reason_that_is_an_issue_says_what_it_waits_for() -> None:
    issue = Issue("leave.hold", "missing", None, 1, 40)
    assert word_reason(FULLEST, "waits_for", issue=issue) == (
        "waits for an input. Hold: a value from 1 to 40 is needed"
    )


def test_a_reason_has_its_own_words_or_those_of_its_code() -> None:
    assert word_reason(FULLEST, "no_rate", "Every flow is positive.") == "Every flow is positive"
    assert word_reason(FULLEST, "no_loan") == "the deal has no loan"
    assert word_reason(FULLEST, "waits_for") == "waits for an input"
