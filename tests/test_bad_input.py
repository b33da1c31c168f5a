"""Bad input of every kind in every input: words, an exit status, and every other figure.

For each input of a deal that has at least one of every record, a value below, above, of the wrong
kind, not a number, and none at all; and everything that cannot stand beside something else.
"""

import json
import math
from collections.abc import Iterator
from dataclasses import dataclass
from pathlib import Path
from typing import Any
from unicodedata import category

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.commands.running import Ran, run
from tests.crossing import CROSSINGS, Crossing
from tests.fullest import choices, fullest, kinds
from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.deal.inputs import Leaf, leaves
from workbench.deal.paths import locate
from workbench.files.deal_file import deal_from_raw, deal_from_text, deal_to_raw, deal_to_text
from workbench.files.entries import with_entries
from workbench.files.faults import UnreadableError
from workbench.places import sample_deals
from workbench.report.record import record_of
from workbench.text.labels import label_of
from workbench.text.messages import word_issue

Raw = dict[str, Any]

FULLEST = fullest()
RAW = deal_to_raw(FULLEST)
INPUTS = list(leaves(FULLEST))
SHARES = ("costs@c13.amount", "expenses@x17.amount")
"""Amounts that are shares, from 0 to 1, by the basis beside them."""


@dataclass(frozen=True)
class Spoilt:
    """A bad value in the place of an input: the status to follow, and how the value may read."""

    value: Any
    status: int
    shown: tuple[str, ...] = ()


def bounds(leaf: Leaf) -> tuple[float, float]:
    if leaf.path in SHARES:
        return 0, 1
    assert leaf.input.low is not None and leaf.input.high is not None
    return leaf.input.low, leaf.input.high


def is_number(leaf: Leaf) -> bool:
    return leaf.input.low is not None


def place(leaf: Leaf) -> str:
    return f"{leaf.path}.1" if leaf.field.is_row else leaf.path


def beyond(leaf: Leaf, upwards: bool) -> Spoilt | None:
    """A value just outside what is allowed; None where there is no such thing."""
    if is_number(leaf):
        low, high = bounds(leaf)
        whole = int in kinds(leaf.field)
        value = high * 1.25 + 1 if upwards else low - 0.5
        if whole:
            value = int(high) + 1 if upwards else int(low) - 1
        return Spoilt(value, 1, readings(value))
    if leaf.input.unit == "date":
        day = "3000-01-01" if upwards else "0999-12-31"
        return Spoilt(day, 1, ("January 1, 3000" if upwards else "December 31, 999",))
    if upwards and leaf.input.high is not None:
        return Spoilt("x" * 5001, 1, ("5,001",))
    return None


def readings(value: float) -> tuple[str, ...]:
    """How a number may read in a message: as it is, or in per cent."""
    plain = f"{value:,.10f}".rstrip("0").rstrip(".")
    share = f"{value * 100:,.8f}".rstrip("0").rstrip(".")
    return tuple(text.replace("-", "−") for text in (plain, f"{share}%", str(value)))


def wrong_kind(leaf: Leaf) -> Spoilt:
    if leaf.input.unit in ("text", "reference"):
        return Spoilt(5.5, 2, ("5.5",))
    value: Any = 7 if leaf.input.unit in ("choice", "switch") else "soon"
    return Spoilt(value, 2, (json.dumps(value),))


def not_a_number(leaf: Leaf) -> Spoilt:
    return Spoilt(math.nan, 2, ("NaN",))


def nothing(leaf: Leaf) -> Spoilt:
    """None: refused where it has no meaning, missed where it is needed, else fine or a clash."""
    if leaf.field.is_row or type(None) not in kinds(leaf.field):
        return Spoilt(None, 2, ("null",))
    return Spoilt(None, 1 if is_missed(leaf) else 0)


def is_missed(leaf: Leaf) -> bool:
    """Whether the deal has an issue without this value."""
    if leaf.input.needed:
        return leaf.path not in ("other_income@i15.amount", "expenses@x18.amount")  # stated instead
    return leaf.path in MISSED


MISSED = {
    "purchase.closing_date", "spaces@s1.area", "spaces@s6.area", "spaces@s1.market_rent.amount",
    "spaces@s6.market_rent.amount", "leases@e2.rent.amount", "leases@e5.rent.amount",
    "leases@e7.rent.amount", "leases@e2.start", "leases@e2.end", "leases@e5.start", "leases@e5.end",
    "steps@p3.change", "steps@p4.amount", "works@w19.date", "works@w20.year", "leave.exit_yield",
    "leave.stabilised_vacancy", "leave.price_per", "leave.rent_multiple", "leave.amount",
}  # fmt: skip
"""Inputs that may be absent but not in this deal, by what stands beside them."""


def spoilt_inputs() -> Iterator[Any]:
    for leaf in INPUTS:
        for name, spoilt in (
            ("below", beyond(leaf, upwards=False)),
            ("above", beyond(leaf, upwards=True)),
            ("wrong kind", wrong_kind(leaf)),
            ("not a number", not_a_number(leaf)),
            ("nothing", nothing(leaf)),
        ):
            if spoilt is not None:
                yield pytest.param(leaf, spoilt, id=f"{place(leaf)} {name}")


SPOILT = list(spoilt_inputs())


def put(raw: Raw, path: str, value: Any) -> Raw:
    """The plain data with one value in place."""
    changed: Any = json.loads(json.dumps(raw))
    *above, last = locate(FULLEST, path)
    here = changed
    for step in above:
        if here[step] is None:
            here[step] = {}
        here = here[step]
    here[str(last) if isinstance(here, dict) else last] = value
    whole: Raw = changed
    return whole


def missing(tree: Any, at: tuple[str, ...] = ()) -> Iterator[str]:
    """Every place of a record that has no number, as reasons name it."""
    if isinstance(tree, dict):
        for key, below in tree.items():
            yield from missing(below, (*at, key))
    elif isinstance(tree, list):
        for number, below in enumerate(tree, start=1):
            if at == ("loans",):
                yield from missing(below, (*at, below["id"]))
            elif at == ("stack",):
                yield from (f"stack.{key}.{number}" for key, one in below.items() if one is None)
            else:
                yield from missing(below, (*at, str(number)))
    elif tree is None:
        yield ".".join(at)
    elif isinstance(tree, float):
        assert math.isfinite(tree), at


def unexplained(record: Raw) -> list[str]:
    """Figures without a number and without a reason, at them or at what holds them."""
    reasons = record["reasons"]
    assert all(text.strip() for text in reasons.values())
    figures = {key: held for key, held in record.items() if key not in ("reasons", "issues")}
    return [
        path
        for path in missing(figures)
        if not any(path == known or path.startswith(f"{known}.") for known in reasons)
    ]


@pytest.fixture
def deal_file(tmp_path: Path) -> Path:
    return tmp_path / "my.deal"


def ran_on(capsys: pytest.CaptureFixture[str], path: Path, raw: Raw) -> Ran:
    """`figures` as JSON, whose figures are then looked at."""
    path.write_text(json.dumps(raw), encoding="utf-8")
    ran = run(capsys, "figures", path, "--json")
    if ran.status == 2:
        assert ran.out == ""
    else:
        assert unexplained(json.loads(ran.out, parse_constant=pytest.fail)) == []
    return ran


def test_the_fullest_deal_itself_is_fine(
    capsys: pytest.CaptureFixture[str], deal_file: Path
) -> None:
    assert ran_on(capsys, deal_file, RAW).status == 0


@pytest.mark.parametrize(("leaf", "spoilt"), SPOILT)
def test_bad_input(
    capsys: pytest.CaptureFixture[str], deal_file: Path, leaf: Leaf, spoilt: Spoilt
) -> None:
    ran = ran_on(capsys, deal_file, put(RAW, place(leaf), spoilt.value))
    assert ran.status == spoilt.status
    if ran.status == 0:
        assert ran.err == ""
        return
    said = [line for line in ran.err.splitlines() if names(line, leaf)]
    if spoilt.shown:
        assert any(shown in said[0] for shown in spoilt.shown)
    elif leaf.path not in CLASHES:
        assert "needed" in said[0] or "enter one" in said[0]
    if is_number(leaf) and leaf.path not in CLASHES:
        assert any(all(bound in said[0] for bound in pair) for pair in ranges(leaf, ran.status))


CLASHES = {"spaces@s6.area", "steps@p3.change", "steps@p4.amount", "works@w19.date"}
"""Inputs whose absence is told where it clashes: at a basis, a step, a year."""


def names(line: str, leaf: Leaf) -> bool:
    """Whether a line of the output is about an input: by its path, its label or its item."""
    clashing = ("expenses@x16.basis", "steps@", "works@w19.year")
    return (
        place(leaf) in line
        or label_of(FULLEST, place(leaf)) in line
        or (leaf.path in CLASHES and line.startswith(clashing))
    )


def ranges(leaf: Leaf, status: int) -> Iterator[tuple[str, str]]:
    """The two ends of a range, as they may read."""
    low, high = leaf.input.low, leaf.input.high
    assert low is not None and high is not None
    if status == 2:
        yield f"{low:.16g}", f"{high:.16g}"
    else:
        low, high = bounds(leaf)
        lows, highs = readings(low), readings(high)
        yield from zip(lows, highs, strict=True)


@pytest.mark.parametrize("one", CROSSINGS, ids=lambda one: f"{one.code} {one.path}")
def test_what_does_not_fit_together(
    capsys: pytest.CaptureFixture[str], deal_file: Path, one: Crossing
) -> None:
    deal = with_entries(FULLEST, one.entries)
    ran = ran_on(capsys, deal_file, deal_to_raw(deal))
    assert ran.status == 1
    assert f"{one.path}: {one.said}" in ran.err.splitlines()
    issues = json.loads(ran.out)["issues"]
    assert {"path": one.path, "message": one.said} in issues


def test_there_are_cases_enough() -> None:
    across = {one.code for one in CROSSINGS} - {"missing", "out_of_range", "too_long"}
    assert len(across) >= 15
    assert len(SPOILT) > 4 * len(INPUTS)


@pytest.mark.parametrize("one", CROSSINGS, ids=lambda one: f"{one.code} {one.path}")
def test_a_check_says_the_same(
    capsys: pytest.CaptureFixture[str], deal_file: Path, one: Crossing
) -> None:
    deal = with_entries(FULLEST, one.entries)
    deal_file.write_text(deal_to_text(deal), encoding="utf-8")
    ran = run(capsys, "check", deal_file)
    assert ran.status == 1
    assert f"{one.path}: {one.said}" in ran.err.splitlines()


FAR_REACHING = ("no_spaces", "no_such_day", "too_long", "weights", "closing_date_needed")
"""Codes after which much of a document is missing or odd."""


@pytest.mark.parametrize(
    "one", [one for one in CROSSINGS if one.code in FAR_REACHING], ids=lambda one: one.code
)
def test_a_document_is_made_of_it_all_the_same(
    capsys: pytest.CaptureFixture[str], deal_file: Path, one: Crossing
) -> None:
    deal = with_entries(FULLEST, one.entries)
    deal_file.write_text(deal_to_text(deal), encoding="utf-8")
    out = deal_file.with_name("memo.pdf")
    ran = run(capsys, "document", deal_file, out)
    assert ran.status == 1
    assert f"{one.path}: {one.said}" in ran.err.splitlines()
    assert out.read_bytes().startswith(b"%PDF-")


# A wrong cell never stops the rest


@pytest.mark.parametrize(
    ("entry", "kept"),
    [
        ("leave.exit_yield=0", ("statement.noi", "debt_yield", "dscr.noi", "tiers.in_hand")),
        ("purchase.price=-1", ("value", "statement.noi", "exit.price", "loans.l21.balance")),
        ("loans@l21.rate.1=9", ("value", "irr.unlevered", "statement.noi")),
        ("returns.required.1=-9", ("statement.noi", "exit.income", "cash_on_cash")),
        ("works@w19.date=2026-01-01", ("statement.noi", "exit.income", "sources_uses.uses.total")),
        ("leases@e5.end=2020-01-01", ("sources_uses.uses.total", "loans.l21.service")),
        ("spaces@s6.area=-5", ("statement.rent_in_hand", "statement.rent_expected")),
        ("purchase.closing_date=9999-01-01", ("sources_uses.uses.total", "loans.l21.interest")),
        ("leave.hold=99", ("price", "sources_uses.uses.total", "loans.l21.amount")),
        ("property.year_built=1", ("value", "irr.levered", "measures.payback")),
    ],
)
def test_what_does_not_need_the_bad_value_is_still_given(entry: str, kept: tuple[str, ...]) -> None:
    record = record_of(with_entries(FULLEST, [entry]))
    assert record["issues"]
    lost = set(missing({key: held for key, held in record.items() if key != "reasons"}))
    for path in kept:
        assert not {one for one in lost if one == path or one.startswith(f"{path}.")}


@pytest.mark.parametrize(
    ("entry", "path", "reason"),
    [
        ("leave.exit_yield=0", "value", "Exit yield: 0% is not allowed"),
        ("leave.hold=null", "value", "Hold: a value from 1 to 40 is needed"),
        ("purchase.price=-1", "margin", "Price: −1 is not allowed"),
        ("loans@l21.rate.1=9", "irr.levered", "Interest rate of loan l21 “Bank”, year 1: 900%"),
        ("leases@e5.end=2020-01-01", "statement.rent_in_hand", "End of lease e5 “Bookbinder”"),
        ("spaces@s6.area=-5", "statement.noi", "Area of one unit of space s6 “Flats”: −5"),
        ("expenses=[]", "dscr.noi", ""),
    ],
)
def test_the_reason_names_the_input_that_is_waited_for(entry: str, path: str, reason: str) -> None:
    reasons = record_of(with_entries(FULLEST, [entry]))["reasons"]
    if reason:
        assert reasons[path].startswith(f"waits for an input. {reason}")
    else:
        assert path not in reasons


# Whatever is read can be computed


def anything(leaf: Leaf) -> st.SearchStrategy[Any]:
    """Values that a file may hold there, however wrong."""
    some: st.SearchStrategy[Any] = st.none() if type(None) in kinds(leaf.field) else st.nothing()
    if choices(leaf.field):
        return some | st.sampled_from(choices(leaf.field))
    if leaf.input.unit == "switch":
        return st.booleans()
    if leaf.input.unit == "date":
        return some | st.dates().map(lambda day: day.isoformat())
    if not is_number(leaf):
        return some | st.text(st.characters(exclude_categories=["Cs"]), max_size=20)
    low, high = bounds(leaf)
    edges = [low, high, 0, 1, low - 1, high + 1]
    if int in kinds(leaf.field):
        return some | st.sampled_from([int(edge) for edge in edges]) | st.integers()
    number = st.sampled_from([float(edge) for edge in edges]) | st.floats(
        allow_nan=False, allow_infinity=False
    )
    if leaf.field.is_row:
        return some | st.dictionaries(st.integers(-1, 43).map(str), number, max_size=3)
    return some | number


BASES = [RAW, *(json.loads(path.read_text("utf-8")) for path in sample_deals().glob("*.deal"))]


@settings(deadline=None, max_examples=60)
@given(st.data())
def test_any_deal_that_is_read_is_computed_and_worded(data: st.DataObject) -> None:
    """Several inputs wrong at once, on the fullest deal and on the samples."""
    raw = json.loads(json.dumps(data.draw(st.sampled_from(BASES))))
    deal = deal_from_raw(raw)
    held = list(leaves(deal))
    for leaf in data.draw(st.lists(st.sampled_from(held), min_size=1, max_size=6)):
        here: Any = raw
        *above, last = locate(deal, leaf.path)
        for step in above:
            here = here[step]
        here[last] = data.draw(anything(leaf), label=leaf.path)
    spoilt = deal_from_text(json.dumps(raw))
    record = record_of(spoilt)
    assert unexplained(record) == []
    assert all(one["message"] for one in record["issues"])


@settings(deadline=None)
@given(st.data())
def test_any_draft_is_worded(data: st.DataObject) -> None:
    texts = st.text(st.characters(exclude_categories=["Cs"]), max_size=30)
    paths = texts | st.sampled_from([leaf.path for leaf in INPUTS])
    deal = Deal(drafts=data.draw(st.dictionaries(paths, texts, max_size=4)))
    record = record_of(deal)
    assert len(record["issues"]) >= len(deal.drafts)
    for one in record["issues"]:
        assert not {category(mark) for mark in one["message"]} & {"Cc", "Cs", "Zl", "Zp"}


def test_words_for_an_issue_never_fail() -> None:
    for one in CROSSINGS:
        deal = with_entries(FULLEST, one.entries)
        for issue in check(deal):
            assert word_issue(Deal(), issue)


@settings(deadline=None)
@given(st.lists(st.sampled_from(INPUTS), max_size=3), st.text(max_size=8))
def test_any_entry_is_computed_or_refused(inputs: list[Leaf], typed: str) -> None:
    try:
        deal = with_entries(FULLEST, [f"{leaf.path}={typed}" for leaf in inputs])
    except UnreadableError as error:
        assert str(error)
        return
    assert unexplained(record_of(deal)) == []
