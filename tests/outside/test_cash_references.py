"""Cash and loan figures from published sources, with where each comes from.

Provenance: *seen*, the source's text was read; *derived*, a closed form. Tolerances are those of
the printed figures.
"""

import math

import numpy as np
import numpy.typing as npt
import pytest

from workbench.engine.cash import irr, mirr, npv
from workbench.engine.loan import apr, payment, schedule

SPREADSHEET = "LibreOffice Help, Financial Functions Part One/Two/Three (seen)"
REGULATION_Z = "12 CFR 1026 (Regulation Z), Official Interpretations (seen)"
APPENDIX_J = "12 CFR 1026 Appendix J (figures seen as quoted in a public test suite of it)"
APPENDIX_K = "12 CFR 1026 Appendix K (seen)"
CENT = 0.005


def rate_of(flows: npt.ArrayLike, times: npt.ArrayLike | None = None) -> float:
    answer = irr(flows, times)
    assert answer.rate is not None
    return answer.rate


# Spreadsheet functions. Source: SPREADSHEET.


def test_b01_net_present_value() -> None:
    # NPV(0.0875,10,20,30), first flow after one year
    assert npv(0.0875, [10, 20, 30], [1, 2, 3]) == pytest.approx(49.43, abs=CENT)
    assert npv(0.0875, [10, 20, 30], [1, 2, 3]) == pytest.approx(49.4321210382, abs=1e-10)


def test_b02_internal_rate() -> None:
    # IRR({-10000,3500,7600,1000})
    assert rate_of([-10000, 3500, 7600, 1000]) == pytest.approx(0.1133, abs=5e-5)
    assert rate_of([-10000, 3500, 7600, 1000]) == pytest.approx(0.113321028236, abs=1e-12)


def test_b03_modified_internal_rate() -> None:
    # MIRR({-5,10,15,8},0.5,0.1)
    assert mirr([-5, 10, 15, 8], 0.5, 0.1) == pytest.approx(0.9416, abs=5e-5)
    assert mirr([-5, 10, 15, 8], 0.5, 0.1) == pytest.approx(0.941647376707, abs=1e-12)


def test_b04_payment() -> None:
    # PMT(0.0199/12,36,25000) = −715.96
    assert payment(25000, 0.0199, 36) == pytest.approx(715.96, abs=CENT)
    assert payment(25000, 0.0199, 36) == pytest.approx(715.955334437, abs=1e-9)


def test_b06_principal_between_two_months() -> None:
    # CUMPRINC(0.055/12,36,15000,10,18,0) = −3669.74
    repaid = schedule(15000, 0.055, 36).principal[9:18].sum()
    assert repaid == pytest.approx(3669.74, abs=CENT)
    assert repaid == pytest.approx(3669.7355157, abs=1e-7)


def test_b08_present_value_of_payments_and_a_last_sum() -> None:
    # PV(0.08/12,48,500,20000) = −35019.37; here at the annual effective rate
    flows, effective = np.full(48, 500.0), (1 + 0.08 / 12) ** 12 - 1
    flows[-1] += 20000
    value = npv(effective, flows, np.arange(1, 49) / 12)
    assert value == pytest.approx(35019.37, abs=CENT)
    assert value == pytest.approx(35019.3680846, abs=1e-7)


def test_b10_effective_rate() -> None:
    # EFFECT(0.0975,4): what a loan of 1 with quarterly interest returns in a year
    coupon = 0.0975 / 4
    flows = [-1, coupon, coupon, coupon, 1 + coupon]
    rate = rate_of(flows, [0, 0.25, 0.5, 0.75, 1])
    assert rate == pytest.approx(0.1011, abs=5e-5)
    assert rate == pytest.approx(0.101123125464, abs=1e-12)


def test_b11_nominal_rate() -> None:
    # NOMINAL(0.135,12): 1.135 due after twelve unit-periods
    assert apr(1.0, [1.135], [12]) == pytest.approx(0.1273, abs=5e-5)
    assert apr(1.0, [1.135], [12]) == pytest.approx(0.127303166959, abs=1e-12)


def test_b16_rate_of_growth() -> None:
    # (10000/7500)^(1/4) − 1
    assert rate_of([-7500, 10000], [0, 4]) == pytest.approx(0.0746, abs=5e-5)
    assert mirr([-7500, 10000], 0.0, 0.0, [0, 4]) == pytest.approx(0.0745699318235, abs=1e-12)


# Variable-rate and step-rate loans. Source: REGULATION_Z.


def test_c01_teaser_rate() -> None:
    # Comment 17(c)(1)-10.v.A: 9 % for a year, 12 % for 29; totals from payments in cents
    paid = schedule(100_000, [0.09] * 12 + [0.12] * 348, 360).payment
    assert paid[[0, 12]] == pytest.approx([804.62, 1025.31], abs=CENT)
    assert apr(100_000, paid) == pytest.approx(0.1163, abs=5e-5)
    cents = paid.round(2)
    assert cents.sum() == pytest.approx(366_463.32, abs=CENT)
    assert cents.sum() - 100_000 == pytest.approx(266_463.32, abs=CENT)


def test_c02_teaser_rate_with_a_cap() -> None:
    # Comment 17(c)(1)-10.v.B: the same with a cap of two points a year
    paid = schedule(100_000, [0.09] * 12 + [0.11] * 12 + [0.12] * 336, 360).payment
    assert paid[[0, 12, 24]] == pytest.approx([804.62, 950.09, 1024.34], abs=CENT)
    assert apr(100_000, paid) == pytest.approx(0.1153, abs=5e-5)
    cents = paid.round(2)
    assert cents.sum() == pytest.approx(365_234.76, abs=CENT)
    assert cents.sum() - 100_000 == pytest.approx(265_234.76, abs=CENT)


def test_c04_rate_of_printed_step_payments() -> None:
    # Comment 22(a)(1)-4; the printed payments do not follow ordinary recasting, only the APR serves
    paid = [210.71] * 24 + [220.25] * 24 + [222.59] * 12
    assert apr(10_000, paid) == pytest.approx(0.1075, abs=5e-5)


def test_c05_interest_only_adjustable_and_stepped() -> None:
    # Comment 34(a)(4)(iii)(B)-1, examples i to vi, printed in dollars (733 is truncated: 733.76)
    assert payment(100_000, 0.08, 360) == pytest.approx(733, abs=1)
    for years, after in ((5, 772), (7, 793)):
        months = 12 * years
        paid = schedule(100_000, 0.08, 360 - months, interest_only=months).payment
        assert paid[[0, months]] == pytest.approx([667, after], abs=1)
    for start, years, printed in ((0.07, 5, [665, 727]), (0.07125, 7, [674, 725])):
        months = 12 * years
        paid = schedule(100_000, [start] * months + [0.08] * (360 - months), 360).payment
        assert paid[[0, months]] == pytest.approx(printed, abs=1)
    # 5 % for two years, 6 % for three, 7 % from then on
    paid = schedule(100_000, [0.05] * 24 + [0.06] * 36 + [0.07] * 300, 360).payment
    assert paid[[0, 24, 60]] == pytest.approx([537, 597, 654], abs=1)


def test_c06_worst_case_path() -> None:
    # 12 CFR 1026 Appendix H, Sample H-14 (seen): caps of 2 points a year, 5 over the life
    annual = [0.1241] * 12 + [0.1441] * 12 + [0.1641] * 12 + [0.1741] * 324
    paid = schedule(10_000, annual, 360).payment
    assert paid[0] == pytest.approx(106.03, abs=CENT)
    assert paid.max() == pytest.approx(145.34, abs=CENT)
    exact = [106.027897, 121.594089, 137.393582, 145.344125]
    assert paid[[0, 12, 24, 36]] == pytest.approx(exact, abs=1e-6)


@pytest.mark.parametrize(("months", "printed"), [(3, 14.94), (21, 18.18), (60, 17.27)])
def test_c07_add_on_rate(months: int, printed: float) -> None:
    # Comment 22(c)-1: 10 % a year added on, repaid evenly
    level = (1 + 0.10 * months / 12) / months
    rate = apr(1.0, [level] * months)
    assert rate is not None
    assert 100 * rate == pytest.approx(printed, abs=CENT)


# Actuarial rates. Source: APPENDIX_J.


@pytest.mark.parametrize(
    ("advance", "paid", "first", "per_year", "printed"),
    [
        pytest.param(5000, [230] * 24, 1, 12, 9.69, id="C08 (c)(1)(i)"),
        pytest.param(6000, [200] * 36, 1 + 19 / 30, 12, 11.82, id="C08 (c)(1)(ii)"),
        pytest.param(10_000, [385] * 40, 1 + 39 / 90, 4, 8.97, id="C08 (c)(1)(iv)"),
        pytest.param(5000, [250] + [230] * 23, 1, 12, 10.08, id="C08 (c)(2)(i)"),
        pytest.param(5000, [230] * 23 + [280], 1, 12, 10.50, id="C08 (c)(3)(i)"),
        pytest.param(5000, [250] + [230] * 22 + [280], 1, 12, 10.90, id="C08 (c)(4)(i)"),
        pytest.param(1000, [1080], 1, 365 / 255, 11.45, id="C08 (c)(5)(i), 255 days"),
        pytest.param(1000, [33.61] * 36, 1, 12, 12.83, id="C09 (b)(9)(i), seen"),
    ],
)
def test_c08_c09_actuarial_rate(
    advance: float, paid: list[float], first: float, per_year: float, printed: float
) -> None:
    rate = apr(advance, paid, first + np.arange(len(paid)), per_year)
    assert rate is not None
    assert 100 * rate == pytest.approx(printed, abs=CENT)


# Reverse mortgages. Source: APPENDIX_K.


def test_c10_lump_sum_with_a_cap_on_recovery() -> None:
    # (c)(1): 30,000 had, 4,500 of costs, 11.6 %, 10 years; at most 93 % of 100,000 grown by 4 %
    balance = 34_500 / npv(0.116, [1.0], [10])
    recovered = 0.93 * 100_000 / npv(0.04, [1.0], [10])
    assert balance == pytest.approx(103_385.84, abs=CENT)
    assert recovered == pytest.approx(137_662.72, abs=CENT)
    # The printed rate is that of a repayment in cents.
    repaid = round(min(balance, recovered), 2)
    assert rate_of([30_000, -repaid], [0, 10]) == pytest.approx(0.1317069438, abs=1e-9)
    assert rate_of([30_000, -balance], [0, 10]) == pytest.approx(0.13170693870809, abs=1e-12)


@pytest.mark.parametrize(
    ("lump", "monthly", "note", "months", "periodic", "printed"),
    [
        pytest.param(0, 492.51, 0.09, 120, 0.00906114, 10.87, id="(c)(2)"),
        pytest.param(10_000, 725, 0.085, 144, 0.007708844, 9.25, id="(c)(3)"),
    ],
)
def test_c11_monthly_advances(
    lump: float, monthly: float, note: float, months: int, periodic: float, printed: float
) -> None:
    # Advances at the start of each month; 4,500 of costs are owed but not had
    owed, had = np.full(months, float(monthly)), np.full(months, float(monthly))
    owed[0] += lump + 4500
    had[0] += lump
    balance = npv(note / 12, owed) / npv(note / 12, [1.0], [months])
    rate = rate_of([*had, -balance])
    assert rate == pytest.approx(periodic, abs=5e-10)
    assert 1200 * rate == pytest.approx(printed, abs=CENT)


def test_c13_equal_draws() -> None:
    # (b)(8)(i): 350 a month for 24 months, 14,313.08 owed at the end
    assert 1200 * rate_of([350] * 24 + [-14_313.08]) == pytest.approx(48.53, abs=CENT)


# Loan constants and sizing


@pytest.mark.parametrize(
    ("years", "totals"),
    [(15, [1518.94, 1617.89, 1720.17]), (30, [2158.38, 2395.09, 2641.55])],
)
def test_d15_total_repaid_on_a_thousand(years: int, totals: list[float]) -> None:
    # Printed mortgage payment table, 6, 7 and 8 % (seen; its payment column is partly rounded up)
    repaid = [12 * years * payment(1000, rate, 12 * years) for rate in (0.06, 0.07, 0.08)]
    assert repaid == pytest.approx(totals, abs=CENT)


def test_d16_largest_loan_by_annual_payments() -> None:
    # Posted exercise with solution (seen): NOI 150,000, cover 1.5, 6 %, 25 years
    loan = npv(0.06, [150_000 / 1.5] * 25, np.arange(1, 26))
    assert loan == pytest.approx(1_278_335.62, abs=0.01)


def test_d17_cover_against_loan_to_value() -> None:
    # Licensing multiple-choice problem (seen): NOI 165,000, cover 1.25, 7.35 % interest-only
    service = 12 * schedule(1.0, 0.0735, 360, interest_only=12).payment[0]
    by_cover, by_value = 165_000 / 1.25 / service, 0.70 * 3e6
    assert by_cover == pytest.approx(1_795_918.37, abs=CENT)
    assert by_value == pytest.approx(2_100_000)
    assert min(by_cover, by_value) == by_cover


def test_d18_cover_loan_to_value_and_debt_yield() -> None:
    # Textbook problem (inputs seen, answer derived): NOI 125,000, 5.35 %, 25 years, monthly
    by_cover = 125_000 / 1.35 / (12 * payment(1.0, 0.0535, 300))
    assert by_cover == pytest.approx(1_275_038.7781246272, abs=1e-6)
    assert by_cover < 0.75 * 125_000 / 0.06 < 125_000 / 0.07


# Annuities


@pytest.mark.parametrize(
    ("first", "growth", "rate", "years", "printed"),
    [
        pytest.param(800, 0.07, 0.05, 24, 22_911.13, id="G01 growth above the rate, seen"),
        pytest.param(87_460, 0.063, 0.138, 73, 1_158_092.68, id="G02 seen"),
    ],
)
def test_g01_g02_growing_annuity(
    first: float, growth: float, rate: float, years: int, printed: float
) -> None:
    # Posted exercises with solutions
    flows = first * (1 + growth) ** np.arange(years)
    assert npv(rate, flows, np.arange(1, years + 1)) == pytest.approx(printed, abs=CENT)


def test_g03_increasing_annuity() -> None:
    # SOA Exam FM, sample question 101 (seen): 1,000 and 500 more each, 30 times from year 10, 5 %
    value = npv(0.05, 1000 + 500 * np.arange(30), np.arange(10, 40))
    assert value == pytest.approx(64_257, abs=0.5)


def test_g05_perpetuity_with_growth() -> None:
    # Closed form, textbook result (derived): value 1/(r − g), duration (1 + r)/(r − g)
    when = np.arange(1, 4001)
    flows = 1.02 ** (when - 1)
    value = npv(0.08, flows, when)
    assert value == pytest.approx(16.666666666666668, abs=1e-9)
    assert npv(0.08, when * flows, when) / value == pytest.approx(18.0, abs=1e-9)


PRINTED_RATES = [0.03, 0.04, 0.05, 0.06, 0.07, 0.08, 0.09, 0.10, 0.12]
FACTORS = {  # years: present value of 1, of an annuity of 1, future value of 1
    3: (
        [0.9151, 0.889, 0.8638, 0.8396, 0.8163, 0.7938, 0.7722, 0.7513, 0.7118],
        [2.8286, 2.7751, 2.7232, 2.673, 2.6243, 2.5771, 2.5313, 2.4869, 2.4018],
        [1.0927, 1.1249, 1.1576, 1.191, 1.225, 1.2597, 1.295, 1.331, 1.4049],
    ),
    5: (
        [0.8626, 0.8219, 0.7835, 0.7473, 0.713, 0.6806, 0.6499, 0.6209, 0.5674],
        [4.5797, 4.4518, 4.3295, 4.2124, 4.1002, 3.9927, 3.8897, 3.7908, 3.6048],
        [1.1593, 1.2167, 1.2763, 1.3382, 1.4026, 1.4693, 1.5386, 1.6105, 1.7623],
    ),
    10: (
        [0.7441, 0.6756, 0.6139, 0.5584, 0.5083, 0.4632, 0.4224, 0.3855, 0.322],
        [8.5302, 8.1109, 7.7217, 7.3601, 7.0236, 6.7101, 6.4177, 6.1446, 5.6502],
        [1.3439, 1.4802, 1.6289, 1.7908, 1.9672, 2.1589, 2.3674, 2.5937, 3.1058],
    ),
}


@pytest.mark.parametrize("years", [3, 5, 10])
def test_g07_printed_factors(years: int) -> None:
    # Accounting textbook, Appendix B factor tables, reprinted (seen)
    single, annuity, future = FACTORS[years]
    for k, rate in enumerate(PRINTED_RATES):
        assert npv(rate, [1.0], [years]) == pytest.approx(single[k], abs=5.1e-5)
        value = npv(rate, np.ones(years), np.arange(1, years + 1))
        assert value == pytest.approx(annuity[k], abs=5.1e-5)
        assert 1 / npv(rate, [1.0], [years]) == pytest.approx(future[k], abs=5.1e-5)


@pytest.mark.parametrize("rate", [0.06, 0.08, 0.10])
def test_g08_identities_of_the_six_functions(rate: float) -> None:
    # Algebra (derived): payment ÷ loan = 1 ÷ annuity = i + i/((1 + i)^n − 1)
    for months in range(1, 31):
        monthly = rate / 12
        annuity = npv(monthly, np.ones(months), np.arange(1, months + 1))
        sinking = monthly / math.expm1(months * math.log1p(monthly))
        assert payment(1.0, rate, months) == pytest.approx(1 / annuity, abs=1e-12)
        assert payment(1.0, rate, months) == pytest.approx(monthly + sinking, abs=1e-12)


def test_g09_escalating_cost() -> None:
    # Federal building-design criteria (GSA P100), life-cycle cost formulas (formula seen)
    when = np.arange(1, 26)
    assert npv(0.03, 1.02**when, when) == pytest.approx(22.076618888117338, abs=1e-9)
    assert npv(0.03, 1.03**when, when) == pytest.approx(25.0, abs=1e-9)
