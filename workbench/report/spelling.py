"""Formulas and operands in words: what each is called, and when."""

from collections.abc import Mapping

from workbench.deal.deal import Deal
from workbench.engine import formula as f
from workbench.engine.lines import Declared
from workbench.engine.operands import Operand, Span
from workbench.text.labels import item_name, label_of

FACTS: Mapping[str, str] = {
    "contract": "rent under dated leases",
    "free": "rent of free months under dated leases",
    "undated": "rent of units without dates",
    "market": "market rent today of space at market",
    "gap": "market rent today of space that stands empty",
    "let": "market rent today of space under dated leases",
    "penalty": "penalties of tenants who break",
    "market_total": "market rent today of all space, a month",
    "units": "units of all spaces",
    "area": "area of all spaces",
    "works": "dated works in money of their date",
    "works_today": "dated works in today's money",
    "month_of_year": "month of the year",
    "month_number": "month since closing",
    "date_years": "years since closing",
}
"""What is compiled from the rent roll, the works and the calendar, in words."""

_LOOKS: Mapping[str, str] = {
    "running_sum": "sum so far of {}",
    "running_product": "product so far of {}",
    "running_least": "least so far of {}",
    "later_sum": "sum after it of {}",
    "following": "{} of the next year",
    "year_sum": "{}",
    "year_end": "{} at the year's end",
    "of_year": "{} of the year",
    "month_starts": "{} at the month's start",
    "over_dates": "sum over all dates of {}",
}

_LISTS = {"expense": "expenses", "balance": "loans", "interest": "loans", "principal": "loans"}
_LISTS |= {"repayment": "loans", "service": "loans", "other_income": "other_income"}


def line_label(deal: Deal, declared: Declared) -> str:
    """A line's label; a line of one item carries the item's name."""
    head, at, identity = declared.key.partition("@")
    if not at:
        return declared.label
    name = item_name(deal, f"{_LISTS[head]}@{identity}")
    if name.startswith(declared.label.lower()):
        return name[0].upper() + name[1:]
    return f"{declared.label} of {name}"


def fact_label(deal: Deal, name: str) -> str:
    """What a compiled fact is called."""
    if name.startswith("tied@"):
        tied = item_name(deal, f"other_income@{name.removeprefix('tied@')}")
        return f"share of the days under the lease of {tied}"
    return FACTS[name]


def when(span: Span, at: int | None) -> str:
    """The place in time of an operand."""
    if at is None or span == "once":
        return ""
    if span == "date":
        return "at closing" if at == 0 else f"{at} month{'s' * (at > 1)} after closing"
    return f"{span} {at}"


class Speller:
    """Names operands and formulas of one deal."""

    def __init__(self, deal: Deal, declared: Mapping[str, Declared]) -> None:
        self.deal = deal
        self.declared = declared

    def operand(self, operand: Operand) -> str:
        """An operand's name with its place in time."""
        if operand.kind == "cells" and operand.of is not None:
            return self._gathered(operand, self.formula(operand.of))
        if operand.kind == "cells":
            return self.leaf("line", operand.key)
        name = self.leaf(operand.kind, operand.key)
        time = when(operand.span, operand.at)
        return f"{name}, {time}" if time else name

    def leaf(self, kind: str, key: str) -> str:
        if kind == "line":
            return line_label(self.deal, self.declared[key])
        return label_of(self.deal, key) if kind == "input" else fact_label(self.deal, key)

    def _gathered(self, operand: Operand, name: str) -> str:
        how = {"sum": "sum", "product": "product", "least": "least", "first": "first not below 0"}
        places = [cell.at for cell in operand.cells if cell.at is not None]
        if not places:
            return f"{how[operand.how]} of {name} over no {operand.span}s"
        span = f"{operand.span}s {places[0]}…{places[-1]}"
        if len(places) == 1:
            span = when(operand.span, places[0])
        return f"{how[operand.how]} of {name} over {span}"

    def formula(self, node: f.Formula, within: int = 0) -> str:
        """A formula with names, no time attached."""
        match node:
            case f.Number(value=value):
                return f"{value:.16g}".replace("-", "−")
            case f.Line(key=key):
                return self.leaf("line", key)
            case f.Given(path=path):
                return self.leaf("input", path)
            case f.Fact(name=name):
                return self.leaf("fact", name)
            case f.Pair():
                return self._pair(node, within)
            case f.Compare(sign=sign, left=left, right=right):
                return f"{self.formula(left)} {sign} {self.formula(right)}"
            case f.Where(condition=condition, yes=yes, no=no):
                words = (self.formula(part) for part in (yes, condition, no))
                return "({} where {}, else {})".format(*words)
            case f.Look(along=along, of=of):
                return _LOOKS[along].format(self.formula(of, 2))
        return self._placed(node)

    def _pair(self, node: f.Pair, within: int) -> str:
        if node.sign in ("least", "greatest"):
            return f"{node.sign}({self.formula(node.left)}; {self.formula(node.right)})"
        if node.left == f.Number(0.0) and node.sign == "−":
            return f"−{self.formula(node.right, 2)}"
        strength = {"+": 1, "−": 1, "×": 2, "÷": 2, "^": 3}[node.sign]
        left = self.formula(node.left, strength)
        right = self.formula(node.right, strength + (node.sign in "−÷^"))
        text = f"{left} {node.sign} {right}"
        return f"({text})" if strength < within else text

    def _placed(self, node: f.Formula) -> str:
        match node:
            case f.Before(of=of, first=first):
                return f"{self.formula(of, 2)} before (first: {self.formula(first)})"
            case f.OnDates(of=of):
                return f"{self.formula(of, 2)} at the month's end"
            case f.AtYear(of=of, year=year):
                return f"{self.formula(of, 2)} in year {self.formula(year)}"
            case f.OnDate(of=of, month=month):
                if month == f.Number(0.0):
                    return f"{self.formula(of, 2)} at closing"
                return f"{self.formula(of, 2)} at month {self.formula(month)}"
            case f.FirstDate(of=of):
                return f"first date not below 0 of {self.formula(of, 2)}"
        raise TypeError(f"{type(node).__name__} has no words")
