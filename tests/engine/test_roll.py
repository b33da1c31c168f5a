"""The compiled rent roll: each expectation is the arithmetic written beside it."""

from collections.abc import Sequence
from dataclasses import replace
from datetime import date

import numpy as np
import pytest

from tests.engine.deals import CLOSING, day, lease, near, space
from tests.oracle.test_random_deals import drawn
from workbench.deal.earn import Lease, Rent, Space, Step
from workbench.engine.calendar import MONTHS, month_starts
from workbench.engine.roll import (
    KINDS,
    Kind,
    Piece,
    lease_positions,
    monthly,
    piece_in_year,
    pieces,
    scatter,
    share_of_months,
    table_of,
)
from workbench.files.deal_file import deal_from_raw


def by_month(*spaces: Space, closing: date | None = CLOSING) -> dict[Kind, list[float]]:
    sums = scatter(table_of(pieces(spaces, closing)))
    return {kind: sums[kind][:, 0].tolist() for kind in KINDS}


def moved(row: Sequence[float]) -> dict[int, float]:
    """The months in which a row holds anything."""
    return {month: value for month, value in enumerate(row) if value != 0.0}


# Terms of a rent


@pytest.mark.parametrize(
    ("rent", "month"),
    [
        (Rent(30.0, "month", "unit"), 4 * 30.0),
        (Rent(30.0, "year", "unit"), 4 * 30.0 / 12),
        (Rent(30.0, "month", "area"), 4 * 50.0 * 30.0),
        (Rent(30.0, "year", "area"), 4 * 50.0 * 30.0 / 12),
    ],
)
def test_a_rent_in_its_own_terms(rent: Rent, month: float) -> None:
    assert monthly(space(0.0, count=4, area=50.0), rent) == near(month)


def test_a_rent_that_lacks_something() -> None:
    assert np.isnan(monthly(space(0.0), Rent()))
    assert np.isnan(monthly(space(0.0, count=None), Rent(30.0)))
    assert np.isnan(monthly(space(0.0), Rent(30.0, "year", "area")))


# Leases


def test_a_space_without_leases_is_at_market_from_closing() -> None:
    roll = by_month(space(620.0, count=2))
    assert moved(roll["market"]) == dict.fromkeys(range(MONTHS), 1240.0)
    assert all(not moved(roll[kind]) for kind in KINDS if kind != "market")


def test_a_lease_that_starts_in_mid_month() -> None:
    roll = by_month(space(620.0, lease("2027-01-17", "2027-03-31", 310.0)))
    # January has 31 days: 16 stand empty at a market rent of 620, 15 are let at 310.
    assert moved(roll["gap"]) == {0: near(16 / 31 * 620)}
    assert moved(roll["contract"]) == {0: near(15 / 31 * 310), 1: near(310), 2: near(310)}
    # What those days would let for: stabilised income and leases off the market read this.
    assert moved(roll["let"]) == {0: near(15 / 31 * 620), 1: near(620), 2: near(620)}
    assert moved(roll["market"]) == dict.fromkeys(range(3, MONTHS), near(620))


def test_a_lease_that_ends_in_mid_month_leaves_the_rest_empty() -> None:
    roll = by_month(space(620.0, lease("2026-01-01", "2027-02-07", 280.0)))
    # February: 7 of 28 days let, 21 empty; at market from March.
    assert moved(roll["contract"]) == {0: near(280), 1: near(70)}
    assert moved(roll["gap"]) == {1: near(465)}
    assert roll["market"][1:3] == [0.0, near(620)]


def test_a_gap_between_leases() -> None:
    first = lease("2026-01-01", "2027-01-31", 100.0)
    second = lease("2027-03-01", "2027-04-30", 200.0, "e2")
    # The order of typing is no matter.
    roll = by_month(space(620.0, second, first))
    assert moved(roll["contract"]) == {0: near(100), 2: near(200), 3: near(200)}
    assert moved(roll["gap"]) == {1: near(620)}
    assert roll["market"][3:5] == [0.0, near(620)]


def test_leases_back_to_back_leave_no_gap() -> None:
    first = lease("2026-01-01", "2027-01-15", 310.0)
    second = lease("2027-01-16", "2027-02-28", 620.0, "e2")
    roll = by_month(space(500.0, first, second))
    # January: 15 of 31 days at 310, 16 at 620.
    assert moved(roll["contract"]) == {0: near(150 + 320), 1: near(620)}
    assert not moved(roll["gap"])


def test_expired_leases() -> None:
    old = lease("2020-01-01", "2026-12-31", 999.0)
    roll = by_month(space(620.0, old))
    assert moved(roll["market"]) == dict.fromkeys(range(MONTHS), near(620))
    assert not moved(roll["contract"]) and not moved(roll["gap"])
    # With another to come, the time until it starts is empty.
    roll = by_month(space(620.0, old, lease("2027-03-01", "2027-03-31", 100.0, "e2")))
    assert moved(roll["gap"]) == {0: near(620), 1: near(620)}
    assert moved(roll["contract"]) == {2: near(100)}


def test_a_lease_beyond_the_horizon_never_comes_to_market() -> None:
    broken = lease("2020-01-01", "2099-12-31", 100.0, break_date="2067-12-15", break_penalty=9.0)
    roll = by_month(space(620.0, replace(broken, break_date=None)))
    assert moved(roll["contract"]) == dict.fromkeys(range(MONTHS), near(100))
    assert not moved(roll["market"]) and not moved(roll["gap"])
    # A break in the last month: 16 days empty, and the penalty would fall after the last month.
    roll = by_month(space(620.0, broken))
    assert moved(roll["gap"]) == {491: near(16 / 31 * 620)}
    assert not moved(roll["market"]) and not moved(roll["penalty"])


def test_steps_by_amount_and_by_change() -> None:
    steps = (
        Step("p3", day("2027-07-01"), amount=150.0),
        Step("p2", day("2027-04-16"), change=0.1),
        Step("p1", CLOSING, change=9.0),
        Step("p4", None, change=9.0),
        Step("p5", day("2027-09-01")),
    )
    roll = by_month(space(0.0, lease("2026-01-01", "2099-12-31", 100.0, steps=steps)))
    # The step on closing is in the rent. April: 15 days at 100, 15 at 110; from July 150 a
    # month; a step that says nothing changes nothing.
    rents = {2: 100.0, 3: 105.0, 4: 110.0, 6: 150.0, 8: 150.0, 491: 150.0}
    assert {month: roll["contract"][month] for month in rents} == near(rents)


def test_a_step_is_in_the_terms_of_the_lease() -> None:
    step = Step("p1", day("2027-02-01"), amount=24.0)
    by_area = Lease("e1", "", day("2026-01-01"), day("2027-12-31"), Rent(12.0, "year", "area"))
    roll = by_month(space(0.0, replace(by_area, steps=(step,)), count=2, area=5.0))
    # 2 units of 5: 12 a year is 10 a month in all, 24 a year is 20.
    assert roll["contract"][:2] == [near(10), near(20)]


def test_a_step_past_the_end_changes_nothing() -> None:
    step = Step("p1", day("2027-03-15"), amount=777.0)
    roll = by_month(space(0.0, lease("2026-01-01", "2027-02-28", 100.0, steps=(step,))))
    assert moved(roll["contract"]) == {0: near(100), 1: near(100)}


def test_free_months_from_the_start() -> None:
    roll = by_month(space(0.0, lease("2027-01-17", "2030-12-31", 310.0, free_months=1)))
    # Free from 17 January to 16 February: 15 of 31 days, then 16 of 28.
    assert moved(roll["free"]) == {0: near(150), 1: near(16 / 28 * 310)}
    assert roll["contract"][:2] == [near(150), near(310)]


def test_free_months_left_count_from_closing() -> None:
    roll = by_month(space(0.0, lease("2025-01-17", "2030-12-31", 310.0, free_months=2)))
    assert moved(roll["free"]) == {0: near(310), 1: near(310)}


def test_free_months_carry_the_step_and_end_with_the_lease() -> None:
    step = Step("p1", day("2027-02-01"), amount=400.0)
    roll = by_month(
        space(0.0, lease("2025-01-01", "2027-03-31", 310.0, free_months=120, steps=(step,)))
    )
    assert moved(roll["free"]) == {0: near(310), 1: near(400), 2: near(400)}


def test_a_break_with_its_penalty() -> None:
    broken = lease("2026-01-01", "2031-12-31", 310.0, break_date="2027-03-10", break_penalty=77.0)
    roll = by_month(space(620.0, broken))
    # March: 10 of 31 days let, 21 empty; penalty and market rent in April.
    assert moved(roll["contract"]) == {0: near(310), 1: near(310), 2: near(100)}
    assert moved(roll["gap"]) == {2: near(420)}
    assert moved(roll["penalty"]) == {3: near(77)}
    assert roll["market"][2:4] == [0.0, near(620)]


def test_a_break_on_the_last_day_of_a_month() -> None:
    broken = lease("2026-01-01", "2031-12-31", 310.0, break_date="2027-03-31", break_penalty=77.0)
    roll = by_month(space(620.0, broken))
    assert not moved(roll["gap"])
    assert moved(roll["penalty"]) == {3: near(77)}


def test_a_break_before_closing_pays_nothing() -> None:
    past = lease("2020-01-01", "2031-12-31", 310.0, break_date="2026-12-31", break_penalty=77.0)
    roll = by_month(space(620.0, past))
    assert not moved(roll["penalty"]) and not moved(roll["contract"])
    # On closing itself the lease has one day left, and the penalty is still to come.
    on_the_day = replace(past, break_date=CLOSING)
    roll = by_month(space(620.0, on_the_day))
    assert moved(roll["contract"]) == {0: near(10)}
    assert moved(roll["penalty"]) == {1: near(77)}


def test_a_break_without_penalty_and_one_after_the_end() -> None:
    assert not moved(by_month(space(1.0, lease("2026-01-01", "2029-12-31", 1.0)))["penalty"])
    late = lease("2026-01-01", "2027-02-28", 310.0, break_date="2029-01-01")
    assert moved(by_month(space(1.0, late))["contract"]) == {0: near(310), 1: near(310)}


def test_undated_units_turn_by_twelfths() -> None:
    undated = Lease("e1", rent=Rent(1200.0, "month"))
    roll = by_month(space(2400.0, undated))
    # In month m, m twelfths are at market: month 3 has 9/12 × 1200 and 3/12 × 2400.
    assert moved(roll["undated"]) == {m: near((12 - m) / 12 * 1200) for m in range(12)}
    assert moved(roll["market"]) == {m: near(min(m, 12) / 12 * 2400) for m in range(1, MONTHS)}
    assert not moved(roll["contract"])


def test_without_a_closing_date_nothing_is_dated() -> None:
    dated = space(2400.0, lease("2026-01-01", "2029-12-31", 1200.0))
    undated = space(2400.0, Lease("e1", rent=Rent(1200.0, "month")))
    assert by_month(dated, closing=None) == by_month(undated, closing=None)


# Sums of pieces


def test_sums_of_no_spaces() -> None:
    assert all(not moved(row) for row in by_month().values())


def test_nothing_is_left_over_where_no_piece_is_alive() -> None:
    # 0.1 + 0.2 − 0.3 is not 0 in binary; the sum of what has ended must be.
    made = [Piece("contract", f"e{n}", 0.0, 2.0 + n / 7, 0.1 * n) for n in range(1, 30)]
    row = scatter(table_of(made))["contract"][:, 0]
    assert row[6] > 0
    assert (row[7:] == 0.0).all()


def test_a_piece_within_one_month() -> None:
    row = scatter(table_of([Piece("gap", "s1", 4.25, 4.75, 100.0)]))["gap"][:, 0].tolist()
    assert moved(row) == {4: near(50)}


@pytest.mark.parametrize("seed", range(3))
def test_pieces_add_up_to_the_scattered_line_of_each_year(seed: int) -> None:
    for raw in drawn(8100 + seed, 8):
        deal = deal_from_raw(raw)
        made = pieces(deal.spaces, deal.purchase.closing_date)
        lines = scatter(table_of(made))
        for kind in KINDS:
            years = lines[kind].reshape(41, 12).sum(axis=1)
            for year in (1, 2, 5, 17, 41):
                total = sum(piece_in_year(piece, year) for piece in made if piece.kind == kind)
                assert years[year - 1] == near(total)


def test_a_piece_in_a_year() -> None:
    piece = Piece("contract", "e1", 10.5, 26.25, 100.0)
    # 1.5 months of year 1, 12 of year 2, 2.25 of year 3.
    years = [piece_in_year(piece, year) for year in (1, 2, 3, 4)]
    assert years == near([150.0, 1200.0, 225.0, 0.0])


# Days under a lease


def test_positions_of_a_lease() -> None:
    starts = month_starts(CLOSING)
    assert lease_positions(lease("2027-01-17", "2027-02-14", 1.0), starts) == (
        near(16 / 31),
        near(1.5),
    )
    assert lease_positions(lease("2020-01-01", "2021-12-31", 1.0), starts) == (0.0, 0.0)
    with pytest.raises(ValueError, match="no dates"):
        lease_positions(Lease("e1"), starts)


def test_a_lease_that_ends_before_it_starts_has_no_length() -> None:
    start, end = lease_positions(lease("2028-01-01", "2027-06-30", 1.0), month_starts(CLOSING))
    assert start == end


def test_share_of_months() -> None:
    share = share_of_months(1.25, 3.5)
    assert share.shape == (MONTHS, 1)
    assert moved(share[:, 0].tolist()) == {1: 0.75, 2: 1.0, 3: 0.5}
    assert moved(share_of_months(2.25, 2.5)[:, 0].tolist()) == {2: 0.25}
