"""Writes formulas out as expressions over numbered operands, cell by cell or year by year."""

from collections.abc import Callable, Mapping

import numpy as np

from workbench.engine import formula as f
from workbench.engine.interpreter import Values
from workbench.engine.lines.line import Per
from workbench.engine.operands import Cell, How, Kind, Operand, Ref, Span, Token
from workbench.engine.result import Result
from workbench.engine.roll import KINDS, piece_in_year, pieces
from workbench.engine.rows import row_of

_STRENGTH = {"+": 1, "−": 1, "×": 2, "÷": 2, "^": 3}
_GATHERED: Mapping[str, How] = {
    "running_sum": "sum",
    "running_product": "product",
    "running_least": "least",
    "later_sum": "sum",
}


class Writer:
    """Writes expressions, numbering each operand where it is first met."""

    def __init__(self, result: Result) -> None:
        self.result = result
        self.values = Values(result)
        self.operands: list[Operand] = []
        self.rows: dict[str, Per] = {key: one.per for key, one in result.declared.items()}

    def cell(self, node: f.Formula, at: int) -> tuple[Token, ...]:
        """The expression of one cell of a formula; `at` counts its row from 0."""
        match node:
            case f.Number(value=value):
                return (value,)
            case f.Line() | f.Given() | f.Fact():
                return (self._leaf(node, at),)
            case f.Pair():
                return self._pair(node, lambda part: self.cell(part, at))
            case f.Where(condition=condition, yes=yes, no=no):
                return self.cell(yes if self._met(condition, at) else no, at)
            case f.Look():
                return self._look(node, at)
            case f.Before(of=of, first=first) | f.OnDates(of=of, first=first):
                return self.cell(first, 0) if at == 0 else self.cell(of, at - 1)
            case f.AtYear(of=of, year=year):
                return self.cell(of, int(self.values.of(year).flat[0]) - 1)
            case f.OnDate(of=of, month=month):
                return self.cell(of, 0) if self.values.of(month).flat[0] == at else (0.0,)
            case f.FirstDate(of=of):
                reached = np.flatnonzero(self.values.of(of)[:, 0] >= 0)
                last = int(reached[0]) if len(reached) else len(self.values.of(of)) - 1
                return (self.gather(of, range(last + 1), "first"),)
        raise TypeError(f"{type(node).__name__} has no cell")

    def in_year(self, node: f.Formula, year: int) -> tuple[Token, ...]:
        """The expression of twelve months' sum: taken inside wherever the sum allows it."""
        if self._steady(node):
            return self._scaled(12.0, self.cell(node, 12 * year))
        match node:
            case f.Line() | f.Fact():
                return (self._year_leaf(node, year),)
            case f.Pair(sign="+" | "−"):
                return self._pair(node, lambda part: self.in_year(part, year))
            case f.Pair(sign="×", left=left) if self._steady(left):
                return self._split(node, left, year)
            case f.Pair(sign="×" | "÷", right=right) if self._steady(right):
                return self._split(node, right, year)
        return (self.gather(node, range(12 * year, 12 * year + 12), "sum"),)

    def _split(self, node: f.Pair, steady: f.Formula, year: int) -> tuple[Token, ...]:
        return self._pair(
            node,
            lambda part: self.cell(part, 12 * year) if part is steady else self.in_year(part, year),
        )

    def _steady(self, node: f.Formula) -> bool:
        """Whether a formula is the same in each month of a year."""
        match node:
            case f.Look(along=along):
                return along == "of_year"
            case f.Pair(left=left, right=right):
                return self._steady(left) and self._steady(right)
        return row_of(node, self.rows) == "once"

    @staticmethod
    def _scaled(times: float, tokens: tuple[Token, ...]) -> tuple[Token, ...]:
        return (times, " × ", "(", *tokens, ")") if len(tokens) > 1 else (times, " × ", *tokens)

    def _pair(
        self, node: f.Pair, write: Callable[[f.Formula], tuple[Token, ...]]
    ) -> tuple[Token, ...]:
        left, right = write(node.left), write(node.right)
        if node.sign in ("least", "greatest"):
            return (f"{node.sign}(", *left, "; ", *right, ")")
        if node.left == f.Number(0.0) and node.sign == "−":
            return ("−", *_bracketed(right, 2))
        strength = _STRENGTH[node.sign]
        after = strength + (node.sign in "−÷^")
        before_it = strength + (node.sign == "^")
        return (*_bracketed(left, before_it), f" {node.sign} ", *_bracketed(right, after))

    def _met(self, condition: f.Compare, at: int) -> bool:
        cells = self.values.of(condition)
        return bool(cells.flat[at] if cells.size > 1 else cells.flat[0])

    def _look(self, node: f.Look, at: int) -> tuple[Token, ...]:
        match node.along:
            case "following":
                return self.cell(node.of, at + 1)
            case "year_sum":
                return self.in_year(node.of, at)
            case "year_end":
                return self.cell(node.of, 12 * at + 11)
            case "of_year":
                return self.cell(node.of, at // 12)
            case "month_starts":
                return self.cell(node.of, at) if at < len(self.values.of(node.of)) else (0.0,)
            case "over_dates":
                moved = np.flatnonzero(self.values.of(node.of)[:, 0])
                return (self.gather(node.of, moved.tolist(), "sum"),)
            case "later_sum":
                cells = range(at + 1, len(self.values.of(node.of)))
                return (self.gather(node.of, cells, "sum"),)
            case _:
                return (self.gather(node.of, range(at + 1), _GATHERED[node.along]),)

    def gather(self, node: f.Formula, cells: list[int] | range, how: How) -> Ref:
        """One operand for many cells of a formula."""
        row = row_of(node, self.rows)
        array = self.values.of(node)
        first = 0 if row == "date" else 1
        key = node.key if isinstance(node, f.Line) else ""
        shown = tuple(Cell(key, at + first, float(array[at, 0])) for at in cells)
        value = _gathered([cell.value for cell in shown], how)
        span: Span = row
        return self._operand(Operand("cells", key, span, None, value, how, shown, node))

    def _leaf(self, node: f.Line | f.Given | f.Fact, at: int) -> Ref:
        row = row_of(node, self.rows)
        array = self.values.of(node)
        value = float(array.flat[0] if row == "once" else array[at, 0])
        when = None if row == "once" else at + (row != "date")
        return self._operand(Operand(*_named(node), row, when, value))

    def _year_leaf(self, node: f.Line | f.Given | f.Fact, year: int) -> Ref:
        """Twelve months of a line or a fact; a fact of the rent roll says which leases."""
        value = float(self.values.of(node)[12 * year : 12 * year + 12, 0].sum())
        kind, key = _named(node)
        if isinstance(node, f.Fact) and key in KINDS:
            deal = self.result.plan.deal
            amounts: dict[str, float] = {}
            for piece in pieces(deal.spaces, deal.purchase.closing_date):
                if piece.kind == key:
                    amount = piece_in_year(piece, year + 1)
                    amounts[piece.of] = amounts.get(piece.of, 0.0) + amount
            cells = tuple(Cell(of, None, amount) for of, amount in amounts.items() if amount)
            return self._operand(Operand("fact", key, "year", year + 1, value, "sum", cells))
        return self._operand(Operand(kind, key, "year", year + 1, value))

    def _operand(self, operand: Operand) -> Ref:
        if operand not in self.operands:
            self.operands.append(operand)
        return Ref(self.operands.index(operand) + 1)


def _bracketed(tokens: tuple[Token, ...], strength: int) -> tuple[Token, ...]:
    """Brackets round an expression whose weakest sign binds less than it must."""
    depth, weakest = 0, 9
    for token in tokens:
        if isinstance(token, str):
            if depth == 0 and token.strip() in _STRENGTH:
                weakest = min(weakest, _STRENGTH[token.strip()])
            depth += token.count("(") - token.count(")")
    return ("(", *tokens, ")") if weakest < strength else tokens


def _gathered(values: list[float], how: How) -> float:
    """Many cells as one; *first* gives the years to the first cell that is not negative."""
    array = np.array(values)
    match how:
        case "sum":
            return float(array.sum())
        case "product":
            return float(array.prod())
        case "least":
            return float(array.min(initial=np.inf))
    reached = np.flatnonzero(array >= 0)
    return float(reached[0]) / 12 if len(reached) else float("nan")


def _named(node: f.Line | f.Given | f.Fact) -> tuple[Kind, str]:
    match node:
        case f.Line(key=key):
            return "line", key
        case f.Given(path=path):
            return "input", path
    return "fact", node.name
