"""The sample deals, and the page that shows how to write a deal by hand."""

import json
import re
from collections.abc import Iterator, Mapping
from dataclasses import is_dataclass
from pathlib import Path
from typing import Any, get_args

import jsonschema
import pytest

from workbench.deal.changes import set_value
from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.deal.inputs import declared, leaves
from workbench.deal.leave import ExitMethod
from workbench.deal.paths import field_of, get, locate
from workbench.files.deal_file import deal_from_raw, deal_from_text, deal_to_raw, deal_to_text
from workbench.files.deal_file import read_deal as read
from workbench.files.strict_json import parse
from workbench.places import resources, sample_deals
from workbench.text.currency import find_currency
from workbench.text.locale import find_locale

Raw = dict[str, Any]

SAMPLES = sorted(sample_deals().glob("*.deal"))
PAGE = (resources() / "deal-by-hand.md").read_text(encoding="utf-8")
SCHEMA = json.loads((resources() / "deal.schema.json").read_text(encoding="utf-8"))
BLOCK = re.compile(r"<!-- (smallest deal|piece) -->\n```json\n(.*?)```", re.DOTALL)
SMALLEST = next(text for mark, text in BLOCK.findall(PAGE) if mark == "smallest deal")
PIECES = [text for mark, text in BLOCK.findall(PAGE) if mark == "piece"]


def validate(raw: Raw) -> None:
    jsonschema.Draft202012Validator(
        SCHEMA, format_checker=jsonschema.FormatChecker(["date"])
    ).validate(raw)


def merge(base: Any, piece: Any) -> Any:
    """A piece put into a file as the page says: key by key, list items by their id."""
    if isinstance(base, Mapping) and isinstance(piece, Mapping):
        return {**base, **{key: merge(base.get(key), held) for key, held in piece.items()}}
    if isinstance(base, list) and isinstance(piece, list):
        held = {item["id"]: item for item in base}
        added = {item["id"]: merge(held.get(item["id"]), item) for item in piece}
        return list({**held, **added}.values())
    return piece


def opened(raw: Raw) -> Deal:
    """The deal of that data, through the text of a file, with nothing wrong in it."""
    validate(raw)
    deal = deal_from_text(json.dumps(raw))
    assert check(deal) == []
    return deal


def everything() -> Deal:
    raw = parse(SMALLEST)
    for text in PIECES:
        raw = merge(raw, parse(text))
    return opened(raw)


def twice_given(text: str) -> list[str]:
    """The numbers of `next_id` that stand behind two different letters."""
    ids = set(re.findall(r'"id": "([a-z]\d+)"', text))
    numbered = [identity[1:] for identity in ids]
    return [number for number in numbered if numbered.count(number) > 1]


def eight() -> dict[str, tuple[float, float]]:
    """The key paths of the page's table with the range it allows."""
    row = re.compile(r"^\|[^|]+\| `([^`]+)` \|[^|]+\| (\S+) to (\S+) \|$", re.MULTILINE)
    return {path: (float(low), float(high)) for path, low, high in row.findall(PAGE)}


# The samples


def test_four_samples_and_a_note_on_each() -> None:
    notes = (sample_deals() / "NOTES.md").read_text(encoding="utf-8")
    assert sorted(re.findall(r"^\*\*`([a-z-]+\.deal)`", notes, re.MULTILINE)) == [
        path.name for path in SAMPLES
    ]
    assert len(SAMPLES) == 4


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_opens_without_issues(path: Path) -> None:
    assert check(read(path)) == []


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_is_written_as_it_was_read(path: Path) -> None:
    assert deal_to_text(read(path)) == path.read_text(encoding="utf-8")


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_follows_the_schema(path: Path) -> None:
    validate(json.loads(path.read_text(encoding="utf-8")))


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_says_what_it_is_and_for_whom(path: Path) -> None:
    deal = read(path)
    assert "invented" in deal.property.notes
    assert "What it is for:" in deal.property.notes
    about = deal.about
    assert all((about.purpose, about.intended_users, about.prepared_by, about.interest))
    assert about.prepared_on is not None


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_statement_lines_name_lines_of_the_deal(path: Path) -> None:
    deal = read(path)
    expenses = {f"expense@{item.id}" for item in deal.expenses}
    lines = {"rent_in_hand", "rent_expected", "other_income", "vacancy_allowance", "reserves"}
    for statement in deal.statements:
        for line in statement.lines:
            assert line.line in lines | expenses
            assert bool(line.adjustment) == bool(line.reason)


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_what_a_case_sets_or_adds_would_open_too(path: Path) -> None:
    deal = read(path)
    for case in deal.cases:
        assert case.set or case.add or case.remove
        changed = deal
        for key, value in case.set.items():
            assert get(changed, key) != value, key
            changed = set_value(changed, key, value)
        raw = deal_to_raw(changed)
        for addition in case.add:
            raw[addition.to].append(dict(addition.item))
        for key in case.remove:
            name, identity = key.split("@")
            raw[name] = [item for item in raw[name] if item["id"] != identity]
        assert check(deal_from_raw({**raw, "cases": []})) == []


def features(deal: Deal) -> Iterator[str]:
    """What a sample shows, for the claim that together they show what a deal can hold."""
    today = deal.purchase.closing_date
    for space in deal.spaces:
        dated = [lease for lease in space.leases if lease.start]
        yield "vacant" if not space.leases else "let"
        yield from ("undated" for lease in space.leases if not lease.start)
        yield from ("step" for lease in dated if lease.steps)
        yield from ("break" for lease in dated if lease.break_date)
        yield from ("free months" for lease in dated if lease.free_months)
        yield from (
            "not started" for lease in dated if lease.start and today and lease.start > today
        )
    yield from ("tied" for item in deal.other_income if item.lease)
    yield from ("marked" for item in deal.other_income if item.in_allowance)
    yield from (statement.kind for statement in deal.statements)
    yield from (f"{item.kind} comparable" for item in deal.comparables)
    yield from (f"expense by {item.basis}" for item in deal.expenses)
    yield from ("stated line" for item in deal.expenses if item.stated)
    yield from ("several loans",) * (len(deal.loans) > 1)
    yield from ("interest only" for loan in deal.loans if loan.amortisation_months is None)
    yield from ("dated works" for item in deal.works if item.date)
    yield from ("blend",) * bool(deal.leave.blend)
    yield f"reserves {deal.spend.reserves_place} in {deal.spend.reserves_use}"
    yield from (
        f"case {verb}"
        for verb in ("set", "add", "remove")
        for case in deal.cases
        if getattr(case, verb)
    )


FEATURES = {
    "vacant", "let", "undated", "step", "break", "free months", "not started", "tied", "marked",
    "past_year", "trailing_twelve_months", "pro_forma", "rent comparable", "sale comparable",
    "expense by year", "expense by unit", "expense by area", "expense by egi", "stated line",
    "several loans", "interest only", "dated works", "blend", "reserves above in account",
    "reserves below in account", "reserves below in spent", "case set", "case add", "case remove",
}  # fmt: skip


def test_the_samples_together_show_what_a_deal_can_hold() -> None:
    assert {found for path in SAMPLES for found in features(read(path))} == FEATURES


def test_the_samples_differ_in_money_area_and_locale() -> None:
    conventions = [read(path).conventions for path in SAMPLES]
    assert len({one.currency for one in conventions}) == len(SAMPLES)
    assert len({one.locale for one in conventions}) == len(SAMPLES)
    assert {one.area_unit for one in conventions} == {"m2", "sqft"}
    assert all(find_currency(one.currency) for one in conventions)
    assert all(find_locale(one.locale) for one in conventions)


@pytest.mark.parametrize("path", SAMPLES, ids=lambda path: path.stem)
def test_a_sample_gives_each_number_to_one_item(path: Path) -> None:
    assert twice_given(path.read_text(encoding="utf-8")) == []


# The page


def test_every_json_block_of_the_page_is_marked() -> None:
    assert PAGE.count("```json") == len(BLOCK.findall(PAGE)) == 1 + len(PIECES)
    assert len(PIECES) > 10


def test_the_smallest_deal_opens_without_issues() -> None:
    opened(parse(SMALLEST))


def test_the_eight_numbers_are_those_without_a_default() -> None:
    deal = opened(parse(SMALLEST))
    needed = {leaf.path + ".1" * leaf.field.is_row for leaf in leaves(deal) if leaf.input.needed}
    needed_by_others = {"spaces@s1.market_rent.amount", "leave.exit_yield"}
    assert len(eight()) == 8
    assert set(eight()) == needed | needed_by_others


@pytest.mark.parametrize("path", eight())
def test_each_of_the_eight_is_missed(path: str) -> None:
    deal = set_value(opened(parse(SMALLEST)), path, None)
    assert [issue.path for issue in check(deal)] == [path]


def test_the_smallest_deal_types_no_ninth_number() -> None:
    typed = {path for path, value in numbers(parse(SMALLEST)) if path not in ("schema", "next_id")}
    assert typed == set(eight())


def numbers(raw: Any, path: str = "") -> Iterator[tuple[str, float]]:
    """Every number of plain data with its key path."""
    if isinstance(raw, list):
        for item in raw:
            yield from numbers(item, f"{path}@{item['id']}")
    elif isinstance(raw, dict):
        for key, held in raw.items():
            yield from numbers(held, f"{path}.{key}" if path else key)
    elif isinstance(raw, int | float):
        yield path, raw


@pytest.mark.parametrize(("path", "allowed"), eight().items())
def test_the_ranges_are_the_declared_ones(path: str, allowed: tuple[float, float]) -> None:
    mark = field_of(opened(parse(SMALLEST)), path).input
    assert mark is not None
    assert (mark.low, mark.high) == allowed


@pytest.mark.parametrize("text", PIECES, ids=lambda text: " ".join(text.split())[:40])
def test_each_piece_fits_the_smallest_deal(text: str) -> None:
    smallest = parse(SMALLEST)
    assert opened(merge(smallest, parse(text))) != opened(smallest)


def test_all_pieces_together_fit_the_smallest_deal() -> None:
    deal = everything()
    ids = [item for text in PIECES for item in re.findall(r'"id": "([a-z]\d+)"', text)]
    assert deal.next_id == 1 + max(int(identity[1:]) for identity in ids)
    assert twice_given(SMALLEST + "".join(PIECES)) == []


def test_the_pieces_fill_every_list_of_a_deal() -> None:
    deal = everything()
    lists = [name for name in declared(Deal) if isinstance(getattr(deal, name), tuple)]
    assert [name for name in lists if not getattr(deal, name)] == []
    sections = [name for name in declared(Deal) if is_dataclass(getattr(deal, name))]
    untouched = [name for name in sections if getattr(deal, name) == getattr(Deal(), name)]
    assert untouched == []


def test_the_page_lists_every_exit_method() -> None:
    listed = re.findall(r"^\| `([a-z_]+)` \| (?:`leave|nothing)", PAGE, re.MULTILINE)
    assert listed == list(get_args(ExitMethod))


def test_every_key_path_on_the_page_leads_to_an_input() -> None:
    deal = everything()
    spans = re.findall(r"`([^`\n]+)`", BLOCK.sub("", PAGE))
    spans += re.findall(r"--set ([^=\s]+)=", PAGE)
    shape = re.compile(r"[a-z_]+(@[a-z]\d+)?(\.[a-z_0-9]+)+")
    paths = [text for text in spans if shape.fullmatch(text) and text != "deal.schema.json"]
    assert len(paths) > 15
    for path in paths:
        locate(deal, path)
