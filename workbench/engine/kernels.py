"""Kernels: the steps that are not formulas, in plain numpy, months or dates first, trials last."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import TypeAlias

import numpy as np

from workbench.engine.calendar import MONTHS
from workbench.engine.irr import irr, irr_batch
from workbench.engine.loan import repaid_share
from workbench.engine.roll import Floats

Outputs: TypeAlias = Mapping[str, Floats]

NO_AMORTISATION = 1e8
"""Payments left from which on nothing is repaid at all."""


@dataclass(frozen=True)
class Row:
    """One of the parts that add up to a kernel's figure: when it falls, and what made it."""

    at: int
    value: float
    parts: tuple[tuple[str, float], ...]


Rows: TypeAlias = Callable[[list[Floats], str, int | None], tuple[Row, ...]]


@dataclass(frozen=True)
class Kernel:
    """A step that is not a formula.

    `run` takes the arrays of its arguments. `rows` takes them with an output's name and a year, and
    returns what adds up to that year's figure; for a kernel that `solves` it returns present values
    at the solution, which add up to nothing. `explain` says why a solution is missing in a trial.
    """

    outputs: tuple[str, ...]
    run: Callable[..., Outputs]
    rows: Rows
    solves: bool = False
    explain: Callable[[list[Floats], int], str] | None = None


def _loan(
    amount: Floats, rate: Floats, amortisation: Floats, free: Floats, term: Floats, hold: Floats
) -> Outputs:
    """Level payments, recast with the rate, over rows of 492 months."""
    payment = np.arange(1.0, MONTHS + 1)[:, np.newaxis]
    monthly = np.repeat(rate, 12, axis=0) / 12
    left = amortisation + free + 1 - payment
    idle = (left > amortisation) | (left > NO_AMORTISATION)
    share = np.where(idle, 0.0, repaid_share(monthly, left))
    ends = (term < 12 * hold) & (payment >= term)
    start = amount + 0 * (amortisation + free + term + hold)
    balance = start * np.cumprod(1 - share, axis=0)
    first = np.broadcast_to(start, (1, *balance.shape[1:]))
    held = np.where(ends, 0.0, balance)
    opening = np.concatenate([first, held[:-1]])
    return {
        "balance": held,
        "interest": opening * monthly,
        "principal": opening * share,
        "repayment": np.where(ends & (opening != 0), balance, 0.0),
    }


def _loan_rows(arguments: list[Floats], name: str, year: int | None) -> tuple[Row, ...]:
    """Payment by payment; a balance is what the year began with, less what was repaid."""
    made = {key: row[:, 0] for key, row in _loan(*arguments).items()}
    amount, rate = float(arguments[0][0]), arguments[1][:, 0]
    first = 12 * ((year or 1) - 1)
    opening = np.concatenate([[amount], made["balance"]])
    months = range(first, first + 12)
    if name == "balance":
        repaid = made["principal"] + made["repayment"]
        start = Row(first, float(opening[first]), ())
        return (start, *(Row(month + 1, -float(repaid[month]), ()) for month in months))
    return tuple(
        Row(
            month + 1,
            float(made[name][month]),
            (
                ("balance before", float(opening[month])),
                ("rate a year", float(rate[month // 12])),
                ("interest", float(made["interest"][month])),
                ("principal", float(made["principal"][month])),
                ("repayment at maturity", float(made["repayment"][month])),
            ),
        )
        for month in months
    )


def _irr(flows: Floats) -> Outputs:
    """The one rate of each trial; not a number where there is none, or more than one."""
    used = _used(flows)
    return {"rate": irr_batch(used.T, _years(len(used))).rate}


def _explain_irr(arguments: list[Floats], trial: int) -> str:
    flows = arguments[0][:, trial]
    return irr(flows, _years(len(flows))).reason


def _irr_rows(arguments: list[Floats], name: str, year: int | None) -> tuple[Row, ...]:
    """Each date's flow, its factor at the rate, and its present value; together nothing."""
    flows = arguments[0][:, 0]
    rate = float(_irr(arguments[0])[name][0])
    dates = np.flatnonzero(flows).tolist() if np.isfinite(rate) else []
    factors = {date: float((1 + rate) ** (-date / 12)) for date in dates}
    return tuple(
        Row(date, float(flows[date]) * factor, (("flow", float(flows[date])), ("factor", factor)))
        for date, factor in factors.items()
    )


def _used(flows: Floats) -> Floats:
    """The dates up to the last one on which anything flows in any trial."""
    moved = np.flatnonzero((flows != 0).any(axis=1))
    return flows[: int(moved[-1]) + 1] if len(moved) else flows[:2]


def _years(count: int) -> Floats:
    return np.arange(count, dtype=np.float64) / 12


KERNELS: Mapping[str, Kernel] = {
    "loan": Kernel(("balance", "interest", "principal", "repayment"), _loan, _loan_rows),
    "irr": Kernel(("rate",), _irr, _irr_rows, solves=True, explain=_explain_irr),
}
