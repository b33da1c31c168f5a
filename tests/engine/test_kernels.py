"""Kernels: identities of the loan, batches against one by one, the rate and its reason."""

import numpy as np
import numpy.typing as npt
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.engine.deals import near
from workbench.engine.calendar import MONTHS
from workbench.engine.kernels import KERNELS, NO_AMORTISATION
from workbench.engine.lines.borrow import NEVER
from workbench.engine.loan import payment, schedule

Array = npt.NDArray[np.float64]

LOAN = KERNELS["loan"].run
LONG = NEVER.value


def one(figure: float) -> Array:
    return np.array([figure])


def rate_row(*rates: float) -> Array:
    """Years 1, 2, …; the last rate extends."""
    return np.array([rates[min(year, len(rates) - 1)] for year in range(41)])[:, np.newaxis]


def loan(
    amount: float,
    rate: Array,
    amortisation: float = LONG,
    free: float = 0.0,
    term: float = LONG,
    hold: float = 40.0,
) -> dict[str, Array]:
    made = LOAN(one(amount), rate, one(amortisation), one(free), one(term), one(hold))
    return {key: row[:, 0] for key, row in made.items()}


amounts = st.floats(1.0, 1e9)
rows = st.lists(st.one_of(st.just(0.0), st.floats(1e-6, 0.4)), min_size=1, max_size=8)


def test_declared_outputs_are_those_returned() -> None:
    made = LOAN(one(1.0), rate_row(0.05), one(12.0), one(0.0), one(12.0), one(1.0))
    assert tuple(made) == KERNELS["loan"].outputs
    assert tuple(KERNELS["irr"].run(np.array([[-1.0], [2.0]]))) == KERNELS["irr"].outputs


def test_a_loan_by_hand() -> None:
    # 1,200 at 12 %: month 1 bears interest only; two payments of p = 1200 × 1.0201/2.01.
    made = loan(1200.0, rate_row(0.12), 2.0, 1.0, 3.0, 1.0)
    level = 1200 * 1.0201 / 2.01
    assert made["interest"][:4] == near([12, 12, 0.01 * (1212 - level), 0])
    assert made["principal"][:4] == near([0, level - 12, 1212 - level, 0])
    assert made["balance"][:4] == near([1200, 1212 - level, 0, 0])
    assert made["repayment"].tolist() == [0.0] * MONTHS


def test_a_balloon_before_the_sale_is_repaid_and_one_at_the_sale_is_not() -> None:
    made = loan(1000.0, rate_row(0.06), 360.0, 0.0, 24.0, 5.0)
    balloon = schedule(1000.0, 0.06, 360, term=24).balloon
    assert np.flatnonzero(made["repayment"]).tolist() == [23]
    assert made["repayment"][23] == near(balloon)
    assert made["balance"][22] == near(schedule(1000.0, 0.06, 360, term=23).balloon)
    assert not made["balance"][23:].any() and not made["interest"][24:].any()
    for hold in (2.0, 1.0):
        kept = loan(1000.0, rate_row(0.06), 360.0, 0.0, 24.0, hold)
        assert not kept["repayment"].any()
        assert kept["balance"][23] == near(balloon)


def test_interest_only_for_ever() -> None:
    made = loan(1000.0, rate_row(0.06, 0.09))
    assert not made["principal"].any() and not made["repayment"].any()
    assert (made["balance"] == 1000.0).all()
    assert made["interest"][[0, 11, 12, 491]] == near([5.0, 5.0, 7.5, 7.5])


def test_without_interest_it_repays_evenly() -> None:
    made = loan(600.0, rate_row(0.0), 6.0)
    assert made["principal"][:7] == near([100.0] * 6 + [0.0])


def test_a_new_rate_recasts_the_payment_over_what_remains() -> None:
    made = loan(100_000.0, rate_row(0.05, 0.07), 360.0)
    service = made["interest"] + made["principal"]
    assert service[:12] == near([payment(100_000.0, 0.05, 360)] * 12)
    after = payment(float(made["balance"][11]), 0.07, 348)
    assert service[12:360] == pytest.approx(np.full(348, after), rel=1e-10)


@settings(deadline=None, max_examples=60)
@given(amounts, rows, st.integers(1, 480), st.integers(0, 120))
def test_principal_sums_to_the_loan_and_the_last_payment_clears_it(
    amount: float, rates: list[float], amortisation: int, free: int
) -> None:
    made = loan(amount, rate_row(*rates), amortisation, free)
    end = min(free + amortisation, MONTHS)
    assert made["principal"].sum() + made["balance"][-1] == pytest.approx(amount, rel=1e-12)
    assert not made["principal"][:free].any()
    assert not made["balance"][free + amortisation - 1 :].any()
    assert (made["balance"][: end - 1] > 0).all()


@settings(deadline=None, max_examples=60)
@given(amounts, rows, st.integers(1, 480), st.integers(0, 60), st.integers(1, 400))
def test_it_ends_at_its_balloon(
    amount: float, rates: list[float], amortisation: int, free: int, term: int
) -> None:
    row = rate_row(*rates)
    made = loan(amount, row, amortisation, free, term, hold=41.0)
    expected = schedule(amount, np.repeat(row[:, 0], 12)[:term], amortisation, free, term)
    close = 1e-12 * amount
    assert made["repayment"].sum() == pytest.approx(expected.balloon, rel=1e-9, abs=close)
    assert made["principal"].sum() + made["repayment"].sum() == pytest.approx(amount, rel=1e-12)
    assert made["balance"][: term - 1] == pytest.approx(expected.balance[:-1], rel=1e-9, abs=close)
    assert made["interest"][:term] == pytest.approx(expected.interest, rel=1e-9, abs=close)
    assert made["principal"][:term] == pytest.approx(expected.principal, rel=1e-9, abs=close)
    assert not made["interest"][term:].any() and not made["balance"][term - 1 :].any()


@settings(deadline=None, max_examples=60)
@given(amounts, rows, st.integers(1, 480))
def test_each_month_interest_is_on_the_balance_before(
    amount: float, rates: list[float], amortisation: int
) -> None:
    row = rate_row(*rates)
    made = loan(amount, row, amortisation)
    opening = np.concatenate([[amount], made["balance"][:-1]])
    assert made["interest"] == near(opening * np.repeat(row[:, 0], 12) / 12)
    close = 1e-12 * amount
    assert made["balance"] == pytest.approx(opening - made["principal"], rel=1e-9, abs=close)


def test_batches_equal_one_by_one() -> None:
    random, trials = np.random.default_rng(11), 30
    amount = random.uniform(1e5, 1e6, trials)
    rate = np.where(random.random((41, trials)) < 0.1, 0.0, random.uniform(0, 0.15, (41, trials)))
    amortisation = random.integers(1, 480, trials).astype(float)
    amortisation[::7] = LONG
    free = random.integers(0, 60, trials).astype(float)
    term = random.integers(1, 480, trials).astype(float)
    term[::5] = LONG
    hold = random.integers(1, 41, trials).astype(float)
    batch = LOAN(amount, rate, amortisation, free, term, hold)
    for trial in range(trials):
        single = LOAN(
            *(row[..., trial : trial + 1] for row in (amount, rate, amortisation, free, term, hold))
        )
        for key, rows_of_all in batch.items():
            assert rows_of_all.shape == (MONTHS, trials)
            assert rows_of_all[:, trial] == pytest.approx(single[key][:, 0], rel=1e-13)


@pytest.mark.parametrize("driven", range(6))
def test_one_argument_alone_may_have_trials(driven: int) -> None:
    plain = [one(600.0), rate_row(0.06), one(240.0), one(12.0), one(120.0), one(20.0)]
    other = [0.5 * row if place == driven else row for place, row in enumerate(plain)]
    both_rows = np.concatenate([plain[driven], other[driven]], axis=-1)
    batch = LOAN(*plain[:driven], both_rows, *plain[driven + 1 :])
    first, second = LOAN(*plain), LOAN(*other)
    for key in KERNELS["loan"].outputs:
        both = np.broadcast_to(batch[key], (MONTHS, 2))
        assert both[:, :1] == near(first[key]) and both[:, 1:] == near(second[key])


def test_never_lies_beyond_what_repays_anything() -> None:
    assert NEVER.value > NO_AMORTISATION > 12 * 1000


# Rows of a working


def test_rows_of_a_loan_add_up_to_each_year() -> None:
    arguments = [one(600.0), rate_row(0.06, 0.07), one(240.0), one(12.0), one(30.0), one(20.0)]
    made = LOAN(*arguments)
    for year in (1, 2, 3, 4):
        for name in ("interest", "principal", "repayment"):
            parts = KERNELS["loan"].rows(arguments, name, year)
            months = slice(12 * year - 12, 12 * year)
            assert sum(part.value for part in parts) == near(made[name][months].sum())
        parts = KERNELS["loan"].rows(arguments, "balance", year)
        assert sum(part.value for part in parts) == near(made["balance"][12 * year - 1])


# The internal rate


def test_one_rate_for_each_trial() -> None:
    flows = np.zeros((25, 3))
    flows[0] = -100.0
    flows[12] = [110.0, 0.0, 0.0]
    flows[24] = [0.0, 121.0, -5.0]
    rate = KERNELS["irr"].run(flows)["rate"]
    # 110 after a year, 121 after two; nothing but outlays has no rate.
    assert rate[:2] == near([0.1, 0.1])
    assert np.isnan(rate[2])


def test_dates_after_the_last_flow_are_no_matter() -> None:
    flows = np.zeros((493, 1))
    flows[0], flows[12] = -100.0, 110.0
    assert KERNELS["irr"].run(flows)["rate"] == near([0.1])
    assert np.isnan(KERNELS["irr"].run(np.zeros((493, 1)))["rate"]).all()


def test_the_reason_of_a_rate_that_is_not_there() -> None:
    explain = KERNELS["irr"].explain
    assert explain is not None
    flows = np.zeros((25, 3))
    flows[0] = [-100.0, -100.0, 0.0]
    flows[12] = [230.0, 1.0, 0.0]
    flows[24] = [-132.0, 0.0, 0.0]
    assert "worth nothing at 2 rates" in explain([flows], 0)
    assert explain([flows], 1) == ""
    assert explain([flows], 2) == "The flows never change sign."


def test_rows_of_a_rate_add_up_to_nothing() -> None:
    flows = np.zeros((25, 1))
    flows[0], flows[12], flows[24] = -100.0, 60.0, 60.0
    parts = KERNELS["irr"].rows([flows], "rate", None)
    assert [part.at for part in parts] == [0, 12, 24]
    assert sum(part.value for part in parts) == pytest.approx(0.0, abs=1e-12)
    assert KERNELS["irr"].rows([np.zeros((25, 1))], "rate", None) == ()
