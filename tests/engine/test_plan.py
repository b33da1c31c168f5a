"""Compiling a deal: inputs as rows, faulty ones, and what an edit takes over."""

from dataclasses import replace
from random import Random
from typing import Any

import numpy as np
import pytest

from tests.engine.deals import (
    changed,
    day,
    deal,
    fullest,
    unknown_facts,
    unknown_inputs,
    with_loan,
)
from tests.oracle.test_random_deals import drawn
from workbench.deal.deal import Deal
from workbench.deal.inputs import leaves
from workbench.engine.plan import HARMLESS, Plan, compile_deal, expand
from workbench.engine.roll import KINDS
from workbench.files.deal_file import deal_from_raw
from workbench.text.messages import ISSUES

# Year rows


@pytest.mark.parametrize(
    ("row", "bad", "years"),
    [
        ({1: 0.5}, (), {1: 0.5, 2: 0.5, 41: 0.5}),
        ({1: 0.5, 3: 0.7}, (), {1: 0.5, 2: 0.5, 3: 0.7, 41: 0.7}),
        # However they are typed; the last one extends for ever.
        ({41: 0.9, 3: 0.7, 1: 0.5}, (), {2: 0.5, 40: 0.7, 41: 0.9}),
        ({2: 0.7}, (), {1: None, 2: 0.7, 41: 0.7}),
        ({}, (), {1: None, 41: None}),
        # A faulty year is unknown until the next one typed.
        ({1: 0.5, 3: 99.0, 6: 0.7}, (3,), {2: 0.5, 3: None, 5: None, 6: 0.7}),
        # Years that are none are left out.
        ({1: 0.5, 42: 0.9, 0: 0.1}, (42, 0), {1: 0.5, 41: 0.5}),
    ],
)
def test_a_year_row_written_out(
    row: dict[int, float], bad: tuple[int, ...], years: dict[int, float | None]
) -> None:
    out = expand(row, set(bad))
    assert out.shape == (41, 1)
    cells = {year: out[year - 1, 0] for year in years}
    found = {year: None if np.isnan(cell) else cell for year, cell in cells.items()}
    assert found == years


# Inputs


def test_inputs_are_rows_or_single_figures() -> None:
    plan = compile_deal(with_loan(fullest()))
    for path in ("earn.vacancy", "loans@l1.rate", "returns.required", "other_income@i1.growth"):
        assert plan.inputs[path].shape == (41, 1)
    for path in ("leave.hold", "purchase.price", "expenses@x1.amount", "loans@l1.fee"):
        assert plan.inputs[path].shape == (1,)
    assert plan.inputs["leave.hold"].tolist() == [5.0]
    assert set(plan.inputs) == set(plan.program.givens)
    assert not plan.blocked
    assert unknown_inputs(plan) == unknown_facts(plan) == set()


@pytest.mark.parametrize(
    ("path", "value", "issue", "blocked"),
    [
        ("purchase.price", None, "purchase.price", "purchase.price"),
        ("purchase.price", -1.0, "purchase.price", "purchase.price"),
        ("leave.hold", 0, "leave.hold", "leave.hold"),
        ("leave.exit_yield", None, "leave.exit_yield", "leave.exit_yield"),
        ("earn.vacancy.3", 1.5, "earn.vacancy.3", "earn.vacancy"),
        ("earn.vacancy.1", None, "earn.vacancy.1", "earn.vacancy"),
        ("expenses@x1.amount", None, "expenses@x1.amount", "expenses@x1.amount"),
        ("loans@l1.rate.1", 7.0, "loans@l1.rate.1", "loans@l1.rate"),
    ],
)
def test_a_faulty_input_is_not_a_number(path: str, value: Any, issue: str, blocked: str) -> None:
    plan = compile_deal(changed(with_loan(fullest()), {path: value}))
    assert unknown_inputs(plan) == set(plan.blocked) == {blocked}
    assert plan.blocked[blocked].path == issue
    assert plan.blocked[blocked] in plan.issues
    assert unknown_facts(plan) == set()


def test_the_first_faulty_year_is_named_and_later_typed_years_stand() -> None:
    plan = compile_deal(changed(fullest(), {"earn.vacancy": {1: 0.1, 4: -1.0, 2: 3.0, 9: 0.2}}))
    row = plan.inputs["earn.vacancy"][:, 0]
    assert np.flatnonzero(np.isnan(row)).tolist() == [1, 2, 3, 4, 5, 6, 7]
    assert row[0] == 0.1 and row[8] == 0.2
    assert plan.blocked["earn.vacancy"].path == "earn.vacancy.2"


def test_an_input_that_is_not_read_blocks_nothing() -> None:
    plan = compile_deal(changed(fullest(), {"leave.rent_multiple": -4.0}))
    assert [issue.path for issue in plan.issues] == ["leave.rent_multiple"]
    assert "leave.rent_multiple" not in plan.inputs and not plan.blocked


def test_a_year_beyond_the_last_leaves_all_figures() -> None:
    plan = compile_deal(changed(fullest(), {"earn.vacancy": {1: 0.1, 55: 0.2}}))
    assert [issue.code for issue in plan.issues] == ["no_such_year"]
    assert unknown_inputs(plan) == set()
    assert (plan.inputs["earn.vacancy"] == 0.1).all()


def test_a_switch_is_no_number_of_the_plan() -> None:
    assert "earn.count_empty_time_once" not in compile_deal(fullest()).inputs


# Issues that leave the figures


@pytest.mark.parametrize(
    ("path", "value", "code"),
    [
        ("property.name", "x" * 5001, "too_long"),
        ("next_id", 1, "id_ahead"),
        ("drafts", {"earn.vacancy.3": "5,,0"}, "draft"),
        ("conventions.currency", "Dollar", "bad_currency"),
        ("steps@p1.date", day("2031-01-01"), "outside_lease"),
        ("loans@l1.interest_only_months", 80, "longer_than_term"),
        ("loans@l1.term_months", 500, "longer_than_amortisation"),
    ],
)
def test_harmless_issues_block_nothing(path: str, value: Any, code: str) -> None:
    base = changed(with_loan(fullest(), term_months=60), {path: value})
    plan = compile_deal(base)
    assert code in {issue.code for issue in plan.issues} <= HARMLESS
    assert not plan.blocked
    assert unknown_inputs(plan) == unknown_facts(plan) == set()


def test_harmless_codes_are_codes() -> None:
    assert set(ISSUES) >= HARMLESS


def test_a_harmless_issue_does_not_hide_another_of_its_path() -> None:
    # The term is too long for the amortisation, and no term at all.
    plan = compile_deal(changed(with_loan(fullest()), {"loans@l1.term_months": 601}))
    assert {issue.code for issue in plan.issues} == {"out_of_range", "longer_than_amortisation"}
    assert set(plan.blocked) == {"loans@l1.term_months"}


def test_valid_random_deals_block_nothing() -> None:
    for raw in drawn(8500, 15):
        plan = compile_deal(deal_from_raw(raw))
        assert not plan.blocked
        assert unknown_inputs(plan) == set()
        # Without the area of each space there is no area; then nothing reads it.
        assert unknown_facts(plan) <= {"area"}


def test_an_empty_deal_compiles() -> None:
    plan = compile_deal(Deal())
    assert {"purchase.price", "leave.hold", "earn.vacancy", "returns.required"} <= set(plan.blocked)
    assert plan.deal == Deal()


# After an edit


def assert_same(plan: Plan, fresh: Plan) -> None:
    """Two plans of one deal hold the same, whatever the one was built on."""
    assert plan.deal == fresh.deal
    assert plan.shape == fresh.shape and plan.program is fresh.program
    assert plan.issues == fresh.issues
    assert plan.blocked == fresh.blocked
    for mine, theirs in ((plan.inputs, fresh.inputs), (plan.facts, fresh.facts)):
        assert mine.keys() == theirs.keys()
        for name, values in theirs.items():
            assert np.array_equal(mine[name], values, equal_nan=True), name


def edited(base: Deal, random: Random) -> Deal:
    """One random edit: a number moved, spoiled or cleared, spaces or other items rearranged."""
    kind = random.choice(["number"] * 4 + ["clear", "spaces", "drop", "closing", "works"])
    if kind == "spaces":
        return replace(base, spaces=tuple(random.sample(base.spaces, len(base.spaces))))
    if kind == "drop":
        name = random.choice(["spaces", "expenses", "other_income", "loans"])
        return replace(base, **{name: getattr(base, name)[1:]})
    if kind == "closing":
        closing = random.choice([None, day("2026-05-31"), day("2031-01-15"), day("0999-01-01")])
        return changed(base, {"purchase.closing_date": closing})
    if kind == "works":
        return replace(base, works=base.works[1:] if base.works else fullest().works)
    found = [leaf for leaf in leaves(base) if leaf.value is not None]
    if kind == "clear":
        dates = [leaf.path for leaf in found if leaf.input.unit == "date"]
        return changed(base, {random.choice(dates): None}) if dates else base
    leaf = random.choice([leaf for leaf in found if leaf.field.kind is float or leaf.field.is_row])
    factor = random.choice([0.5, 0.9, -3.0])
    if leaf.field.is_row:
        return changed(
            base, {f"{leaf.path}.{year}": factor * leaf.value[year] for year in leaf.value}
        )
    return changed(base, {leaf.path: factor * leaf.value - 0.5})


@pytest.mark.parametrize("seed", range(5))
def test_edit_by_edit_or_afresh_a_plan_is_the_same(seed: int) -> None:
    random = Random(seed)
    for raw in drawn(8550 + seed, 3):
        base = deal_from_raw(raw)
        plan, repaired = compile_deal(base), base
        for _ in range(6):
            base = edited(base, random) if random.random() < 0.8 else repaired
            plan = compile_deal(base, plan)
            assert_same(plan, compile_deal(base))


def test_a_plan_may_be_built_on_that_of_any_other_deal() -> None:
    plan = compile_deal(Deal())
    for base in (fullest(), deal(), with_loan(fullest()), Deal(), fullest()):
        plan = compile_deal(base, plan)
        assert_same(plan, compile_deal(base))


def test_an_edit_elsewhere_takes_the_rent_roll_over() -> None:
    first = compile_deal(fullest())
    for changes in ({"leave.hold": 9}, {"earn.vacancy.1": 0.2}, {"leave.exit_yield": -1.0}):
        later = compile_deal(changed(first.deal, changes), first)
        assert all(later.facts[name] is first.facts[name] for name in (*KINDS, "units", "area"))
        assert later.parts.places is first.parts.places


def test_an_edit_of_a_space_takes_the_others_over() -> None:
    first = compile_deal(fullest())
    other = changed(fullest(), {"spaces@s1.market_rent.amount": 1.0}).spaces[0]
    later = compile_deal(replace(first.deal, spaces=(other, first.deal.spaces[1])), first)
    assert later.parts.facts.roll is not None and first.parts.facts.roll is not None
    assert later.parts.facts.roll[1] is first.parts.facts.roll[1]
    assert later.facts["market_total"][0] == 1 + 3 * 30


def test_the_same_spaces_in_another_tuple_are_the_same_roll() -> None:
    first = compile_deal(fullest())
    later = compile_deal(replace(first.deal, spaces=(*first.deal.spaces,)), first)
    assert later.facts["contract"] is first.facts["contract"]
    assert_same(later, first)


def test_another_closing_date_is_another_roll() -> None:
    first = compile_deal(fullest())
    moved = changed(first.deal, {"purchase.closing_date": day("2027-12-01")})
    later = compile_deal(moved, first)
    assert_same(later, compile_deal(moved))
    # The step of 1 January 2028 now falls in the second month.
    assert later.facts["contract"][:2, 0] == pytest.approx([100, 110])


def test_an_area_that_is_needed_and_no_longer() -> None:
    by_area = changed(fullest(), {"spaces@s2.area": None})
    blocked = compile_deal(by_area)
    assert set(blocked.blocked) == {"area"}
    by_year = changed(by_area, {"expenses@x1.basis": "year"})
    free = compile_deal(by_year, blocked)
    assert not free.blocked
    assert_same(free, compile_deal(by_year))
    assert_same(compile_deal(by_area, free), blocked)
