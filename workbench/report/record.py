"""The record of a deal's figures as plain data, the same for `figures --json` and the documents."""

from collections.abc import Callable
from typing import Any

from workbench.deal.deal import Deal
from workbench.engine.figures import Read, read_figures
from workbench.engine.plan import compile_deal
from workbench.engine.result import Reason, Result, evaluate
from workbench.text.messages import word_issue, word_reason


def record_of(deal: Deal) -> dict[str, Any]:
    """Compute a deal and set its figures out."""
    return record(evaluate(compile_deal(deal)))


def record(result: Result) -> dict[str, Any]:
    """All figures by their fixed keys, full precision; None where `reasons` says why."""
    deal = result.plan.deal
    out: dict[str, Any] = {}
    reasons: dict[str, str] = {}
    word = _wording(deal)
    for read in read_figures(result):
        _place(out, read.figure.place, read.value)
        reasons |= _reasons(read, word)
    hold = out["hold_years"]
    out["hold_years"] = None if hold is None else int(hold)
    out["stack"] = _by_year(out["stack"])
    out["loans"] = [
        {"id": loan.id, "bound_by": "typed", **out["loans"][loan.id]} for loan in deal.loans
    ]
    out["reasons"] = reasons
    out["issues"] = [
        {"path": issue.path, "message": word_issue(deal, issue)} for issue in result.plan.issues
    ]
    return out


def _place(out: dict[str, Any], place: tuple[str, ...], value: Any) -> None:
    for key in place[:-1]:
        out = out.setdefault(key, {})
    out[place[-1]] = [_clean(one) for one in value] if isinstance(value, list) else _clean(value)


def _clean(value: float | None) -> float | None:
    """No minus on nothing."""
    return None if value is None else value + 0.0


def _by_year(stack: dict[str, list[float | None]]) -> list[dict[str, Any]]:
    pairs = zip(stack["in_hand"], stack["expected"], strict=True)
    return [
        {"year": year, "in_hand": in_hand, "expected": expected}
        for year, (in_hand, expected) in enumerate(pairs, start=1)
    ]


def _reasons(read: Read, word: Callable[[Reason], str]) -> dict[str, str]:
    """One reason for a whole list where it is the same in each year, else one by year."""
    place = ".".join(read.figure.place)
    worded = {year: word(reason) for year, reason in read.reasons}
    whole = isinstance(read.value, list) and len(worded) == len(read.value)
    if whole and len(set(worded.values())) == 1:
        return {place: next(iter(worded.values()))}
    return {place if year is None else f"{place}.{year}": text for year, text in worded.items()}


def _wording(deal: Deal) -> Callable[[Reason], str]:
    """Words for reasons, found once for each: one bad input is the reason of many figures."""
    known: dict[tuple[str, str, int], str] = {}

    def word(reason: Reason) -> str:
        key = (reason.code, reason.words, id(reason.issue))
        if key not in known:
            known[key] = word_reason(deal, reason.code, reason.words, reason.issue)
        return known[key]

    return word
