"""The oracle's rent and income, by hand.

No outside source: each expectation is the arithmetic written beside it.
"""

from typing import Any

from tests.oracle.by_hand import lease, near, near_list, one_space
from tests.oracle.income import income_of
from tests.oracle.oracle import figures
from tests.oracle.rent import rent_roll


def test_a_lease_that_ends_inside_a_month() -> None:
    roll = rent_roll(one_space([lease("2023-05-01", "2024-02-10", 2900.0)], 5800.0))
    assert (roll.in_hand[0], roll.expected[0]) == (near(2900), 0.0)
    # February 2024: 10 of 29 days let at 2900; 19 of 29 empty at a market rent of 5800.
    assert roll.in_hand[1] == near(1000)
    assert roll.expected[1] == roll.empty_time[1] == near(3800)
    assert (roll.in_hand[2], roll.expected[2], roll.empty_time[2]) == (0.0, near(5800), 0.0)
    # Market rent of the let days, for stabilised income: 10/29 × 5800.
    assert roll.market_of_let[1] == near(2000)


def test_before_and_between_leases_a_space_is_empty() -> None:
    first = lease("2024-01-16", "2024-01-31", 310.0)
    second = {**lease("2024-03-01", "2024-03-31", 400.0), "id": "e3"}
    roll = rent_roll(one_space([second, first], 620.0))
    # January: 15 of 31 days empty (300), 16 of 31 let (160). February: empty (620).
    assert (roll.empty_time[0], roll.in_hand[0]) == (near(300), near(160))
    assert (roll.empty_time[1], roll.in_hand[1]) == (near(620), 0.0)
    assert (roll.in_hand[2], roll.empty_time[2]) == (near(400), 0.0)
    assert (roll.expected[3], roll.empty_time[3]) == (near(620), 0.0)
    assert roll.under["e2"][0] == near(16 / 31)


def test_a_lease_that_ended_before_closing_leaves_market_rent() -> None:
    roll = rent_roll(one_space([lease("2020-01-01", "2023-12-31", 1.0)], 500.0))
    assert (roll.expected[0], roll.empty_time[0], roll.in_hand[0]) == (near(500), 0.0, 0.0)


def test_steps_by_days_and_in_the_leases_own_terms() -> None:
    steps = [
        {"id": "p5", "date": "2024-07-01", "amount": 1500.0},
        {"id": "p4", "date": "2024-04-16", "change": 0.1},
        {"id": "p3", "date": "2024-01-01", "change": 9.0},
    ]
    deal = one_space([lease("2023-01-01", "2030-12-31", 0.0, steps=steps)], 0.0)
    deal["spaces"][0] |= {"count": 2, "area": 3.0}
    # 1200 a year for each unit of area: 2 × 3 × 1200 / 12 = 600 a month. The step on the
    # closing date is in the rent entered.
    deal["spaces"][0]["leases"][0]["rent"] = {"amount": 1200.0, "per": "year", "of": "area"}
    rent = rent_roll(deal).in_hand
    # April: 15 days at 600 and 15 at 660; from July 6 × 1500 / 12 = 750.
    assert [rent[m] for m in (0, 3, 4, 6)] == near_list([600, 630, 660, 750])


def test_free_months_are_calendar_months_from_the_start() -> None:
    roll = rent_roll(one_space([lease("2024-01-16", "2024-02-20", 3100.0, free_months=1)], 0.0))
    # Free from 16 January to 15 February: 16/31 × 3100 = 1600, then 15/29 × 3100.
    assert roll.concessions[:2] == near_list([1600, 15 / 29 * 3100])
    assert roll.in_hand[1] == near(20 / 29 * 3100)


def test_free_months_left_count_from_closing_and_end_with_the_lease() -> None:
    roll = rent_roll(one_space([lease("2023-10-16", "2024-02-29", 100.0, free_months=9)], 0.0))
    assert roll.concessions[:3] == near_list([100, 100, 0])
    assert sum(roll.in_hand) == near(200)
    longer = lease("2023-10-16", "2030-12-31", 100.0, free_months=2)
    assert rent_roll(one_space([longer], 0.0)).concessions[:3] == near_list([100, 100, 0])


def test_rents_of_the_same_buildings_do_not_wear_again() -> None:
    deal = one_space([], 100.0)
    deal["earn"] |= {"growth": {"1": 0.5}, "depreciation": {"1": 0.1}}
    # Year 2: 100 × 1.5 × 0.9 as new, 100 × 1.5 for the same buildings.
    assert rent_roll(deal).market[12] == near(135)
    deal["earn"]["series"] = "same_buildings"
    assert rent_roll(deal).market[12] == near(150)


def test_a_break_ends_the_lease_and_its_penalty_falls_in_the_first_whole_month() -> None:
    broken = lease("2023-01-01", "2030-12-31", 310.0, break_date="2024-03-10", break_penalty=77.0)
    roll = rent_roll(one_space([broken], 620.0))
    # March: 10 of 31 days let (100), 21 of 31 empty (420); month 3 follows the break.
    assert (roll.in_hand[2], roll.empty_time[2]) == (near(100), near(420))
    assert [m for m, x in enumerate(roll.penalties) if x] == [3]
    broken["break_date"] = "2023-12-31"
    past = rent_roll(one_space([broken], 620.0))
    assert (sum(past.penalties), past.expected[0], past.empty_time[0]) == (0, near(620), 0)


def test_undated_units_reach_the_market_by_twelfths() -> None:
    undated = {"id": "e2", "rent": {"amount": 1200.0, "per": "month"}}
    deal = one_space([undated], 2400.0)
    deal["earn"]["growth"] = {"1": 0.5}
    roll = rent_roll(deal)
    # Month 3: 3/12 × 2400 + 9/12 × 1200; month 12 all at 2400 × 1.5.
    assert [roll.expected[m] for m in (0, 3, 12)] == near_list([1200, 1500, 3600])
    assert sum(roll.in_hand) == sum(roll.empty_time) == 0


def half_let() -> dict[str, Any]:
    """Rent 100 from March on; January and February empty at a market rent of 60."""
    tied = {"id": "i3", "amount": 240.0, "in_allowance": True, "lease": "e2"}
    deal = one_space([lease("2024-03-01", "2030-12-31", 100.0)], 60.0, other_income=[tied])
    deal["earn"] = {"vacancy": {"1": 0.2}, "credit_loss": {"1": 0.01}}
    return deal


def test_allowance_counting_empty_time_once() -> None:
    deal = half_let()
    income = income_of(deal, rent_roll(deal))
    # Base 2 × 60 + 10 × 100 + 240 = 1360; 0.2 × 1360 − 120 = 152, spread like the base:
    # January 80/1360, March 120/1360.
    assert income.allowance[0] == near(152 * 80 / 1360)
    assert income.allowance[2] == near(152 * 120 / 1360)
    # Credit loss of January: 1 % of 80 − 60 = 20; of March 1 % of 120.
    assert (income.credit_loss[0], income.credit_loss[2]) == (near(0.2), near(1.2))
    # Tied income is expected before the lease and in hand under it.
    assert (income.other_in_hand[0], income.other_in_hand[2]) == (0, near(20))
    assert income.egi_in_hand[0] == 0
    march = 120 - 1.2 - 152 * 120 / 1360
    assert (income.egi_in_hand[2], income.egi[2]) == (near(march), near(march))


def test_allowance_never_negative_and_with_the_switch_off() -> None:
    deal = half_let()
    deal["earn"]["vacancy"] = {"1": 0.05}
    # 0.05 × 1360 = 68 is less than the empty time of 120.
    assert sum(income_of(deal, rent_roll(deal)).allowance[:12]) == 0
    deal["earn"]["count_empty_time_once"] = False
    income = income_of(deal, rent_roll(deal))
    # January: 5 % of 80 − 60; March: 5 % of 120.
    assert (income.allowance[0], income.allowance[2]) == (near(1), near(6))


def test_stated_lines_replace_the_computed_ones() -> None:
    deal = half_let()
    deal["stated"] = {"rent": {"1": 960.0}, "concessions": {"1": 12.0}, "credit_loss": {"1": 24.0}}
    income = income_of(deal, rent_roll(deal))
    # 80 a month: nothing in hand in January, the lease's rent up to 80 in March.
    assert (income.in_hand[0], income.expected[0]) == (0, near(80))
    assert (income.in_hand[2], income.expected[2]) == (near(80), 0)
    assert (income.empty_time[0], income.concessions[0], income.credit_loss[0]) == (0, 1, 2)
    # Stated concessions are expected: March in hand 80 + 20 less all of allowance and loss,
    # 0.2 × (960 + 240) / 12 = 20 and 2.
    assert income.egi_in_hand[2] == near(78)
    assert income.egi[2] == near(77)


def test_concessions_come_off_the_lease_unless_they_are_stated() -> None:
    deal = one_space([lease("2024-01-01", "2030-12-31", 100.0, free_months=3)], 60.0)
    deal["earn"] = {"vacancy": {"1": 0.1}, "credit_loss": {"1": 0.02}}
    income = income_of(deal, rent_roll(deal))
    # Base 1200, allowance 120 or 10 a month. January is free: 100 − 100 − 10, no credit loss.
    # April: 100 − 10 − 2. All of it in hand.
    assert income.credit_loss[0] == near(0)
    assert [income.egi_in_hand[0], income.egi_in_hand[3]] == near_list([-10, 88])
    deal["stated"] = {"concessions": {"1": 60.0}}
    income = income_of(deal, rent_roll(deal))
    # 5 a month, expected: 2 % of 95, charged to what is in hand.
    assert [income.egi_in_hand[0], income.egi[0]] == near_list([88.1, 83.1])


def test_costs_follow_effective_gross_income() -> None:
    deal = half_let()
    deal["expenses"] = [{"id": "x4", "amount": 120.0}]
    deal["conventions"] = {"timing": "year_end"}
    deal["spaces"].append({"id": "s5", "count": 1, "market_rent": {"amount": 720.0}})
    deal["earn"] = {"vacancy": {"1": 0.0}}
    deal["purchase"]["price"] = 100.0
    made = figures(deal)
    # January, February: EGI 60 + 20, none in hand. From March 100 + 20 of 180 in hand, so
    # that 2/3 of 10 a month falls on it: 10 × (120 − 20/3); all at the end of year 1.
    held = 10 * (120 - 20 / 3) / 1.1
    assert made["tiers"]["in_hand"] == near(held)
    assert made["ground_share"] == near(held / 100)
    whole = (2 * 80 + 10 * 180 - 120) / 1.1
    assert made["stack"] == [{"year": 1, "in_hand": near(held), "expected": near(whole - held)}]
