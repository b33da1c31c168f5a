"""Lines of debt: each loan's balance, interest and principal, and what they leave."""

from collections.abc import Iterator

from workbench.engine.formula import HOLD, Formula, Given, Line, Number, total
from workbench.engine.lines.line import Declared, Output, Per
from workbench.engine.shape import Shape

NEVER = Number(1e9)
"""A term or an amortisation beyond every horizon."""

_OUTPUTS: tuple[tuple[str, str, str], ...] = (
    ("balance", "Balance", "what is owed at the month's end, after any repayment at maturity"),
    ("interest", "Interest", "a twelfth of the year's rate on the balance before"),
    (
        "principal",
        "Principal",
        "the level payment over the remaining amortisation at the year's rate, less interest; nil "
        "in interest-only months",
    ),
    (
        "repayment",
        "Repayment at maturity",
        "what is left at a maturity before the end of the hold; a later one is met by the sale",
    ),
)


def borrow_lines(shape: Shape) -> Iterator[Declared]:
    for loan in shape.loans:
        yield from _loan(*loan)
    ids = [identity for identity, *_ in shape.loans]
    yield _sum(
        "debt_service",
        "Debt service",
        "scheduled interest and principal of all loans",
        -total([Line(f"service@{one}") for one in ids]),
    )
    yield _sum(
        "loan_repayment",
        "Loans repaid at maturity",
        "what falls due at a maturity within the hold; outside debt service",
        -total([Line(f"repayment@{one}") for one in ids]),
    )
    yield _sum(
        "loan_balance",
        "Loan balance",
        "balance of all loans at the month's end",
        total([Line(f"balance@{one}") for one in ids]),
        standing=True,
    )
    yield _sum(
        "loan_amount",
        "Loans",
        "all loans at closing",
        total([Given(f"loans@{one}.amount") for one in ids]),
        "once",
    )
    yield _sum(
        "cash_flow_after_debt",
        "Cash flow after debt",
        "net cash flow before debt less debt service and loans repaid at maturity",
        Line("net_cash_flow") + Line("debt_service") + Line("loan_repayment"),
    )


def _sum(
    key: str, label: str, words: str, body: Formula, per: Per = "month", standing: bool = False
) -> Declared:
    return Declared(key, label, "money", per, words, body, standing=standing)


def _loan(identity: str, amortises: bool, has_term: bool) -> Iterator[Declared]:
    path = f"loans@{identity}"
    amortisation = Given(f"{path}.amortisation_months") if amortises else NEVER
    interest_only = Given(f"{path}.interest_only_months")
    term: Formula = NEVER
    if has_term:
        term = Given(f"{path}.term_months")
    elif amortises:
        term = interest_only + amortisation
    arguments = (
        Given(f"{path}.amount"),
        Given(f"{path}.rate"),
        amortisation,
        interest_only,
        term,
        HOLD,
    )
    for name, label, words in _OUTPUTS:
        body = Output("loan", name, arguments)
        standing = name == "balance"
        yield Declared(
            f"{name}@{identity}", label, "money", "month", words, body, standing=standing
        )
    yield _sum(
        f"service@{identity}",
        "Debt service",
        "scheduled interest and principal",
        Line(f"interest@{identity}") + Line(f"principal@{identity}"),
    )
