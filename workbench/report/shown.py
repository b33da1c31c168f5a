"""A figure's working set out for reading: names, numbers, operands, and what lies below them."""

from collections.abc import Callable, Iterator
from dataclasses import dataclass

from workbench.deal.deal import Deal
from workbench.deal.paths import UnknownPathError, field_of, get
from workbench.engine.figures import figures_of
from workbench.engine.formula import Fact, Given, Line
from workbench.engine.operands import Cell, Operand, Ref, Span, Token
from workbench.engine.result import Result
from workbench.engine.working import Working, working, working_at
from workbench.report.spelling import Speller, when
from workbench.text.labels import item_name, label_of
from workbench.text.locale import DEFAULT, Locale, find_locale
from workbench.text.messages import word_reason
from workbench.text.numbers import MINUS, MISSING, number, rate, trimmed


@dataclass(frozen=True)
class Asked:
    """What a person asked for: a line at a time, or an input."""

    key: str
    year: int | None
    is_input: bool = False


def find(result: Result, name: str, year: int | None) -> Asked | None:
    """What a name means: a place in the record, a line's key, or an input's key path."""
    deal = result.plan.deal
    places = {".".join(figure.place): figure for figure in figures_of(deal)}
    if name in places and places[name].how != "nothing":
        figure = places[name]
        return Asked(figure.key, year, figure.how == "given")
    if name in result.declared:
        return Asked(name, year)
    try:
        declared = field_of(deal, name).input
    except (UnknownPathError, KeyError):
        return None
    return None if declared is None else Asked(name, None, is_input=True)


class Shower:
    """Shows workings of one result in the words and the locale of its deal."""

    def __init__(self, result: Result) -> None:
        self.result = result
        self.deal: Deal = result.plan.deal
        self.speller = Speller(self.deal, result.declared)
        self.locale: Locale = find_locale(self.deal.conventions.locale) or DEFAULT

    def tree(self, key: str, year: int | None) -> Iterator[tuple[int, Working]]:
        """The working asked for and then, each once, those of the lines it was computed from."""
        seen: set[tuple[str, Span, int | None]] = set()

        def visit(shown: Working, depth: int) -> Iterator[tuple[int, Working]]:
            seen.add((shown.key, shown.span, shown.at))
            yield depth, shown
            for operand in shown.operands:
                place = (operand.key, operand.span, operand.at)
                if operand.kind == "line" and place not in seen:
                    yield from visit(working_at(self.result, *place), depth + 1)

        yield from visit(self.working(key, year), 0)

    def working(self, key: str, year: int | None) -> Working:
        """The working of a line, of a year where it has years."""
        return working(self.result, key, year)

    def title(self, shown: Working) -> str:
        time = when(shown.span, shown.at)
        name = self.speller.leaf("line", shown.key)
        return f"{name}, {time}" if time else name

    def value(self, shown: Working) -> str:
        return self.amount(shown.value, shown.declared.unit)

    def amount(self, value: float | None, unit: str) -> str:
        """A figure with the digits that its unit calls for in a working."""
        if value is None:
            return MISSING
        if unit == "fraction":
            return rate(value, self.locale, 1, 6)
        if unit == "multiple":
            return f"{trimmed(value, self.locale, 2, 4)}×"
        if unit in ("index", "years", "months", "area", "count", "year"):
            return trimmed(value, self.locale, 0, 6)
        return number(value, self.locale, 2)

    def names(self, shown: Working) -> str:
        """The formula with names."""
        return self._expression(shown, lambda operand: self.speller.operand(operand))

    def numbers(self, shown: Working) -> str:
        """The formula with numbers; a negative one after a sign stands in brackets."""

        def amount(operand: Operand) -> str:
            text = self.amount(operand.value, self.unit(operand))
            return f"({text})" if text.startswith(MINUS) and len(shown.tokens) > 1 else text

        return self._expression(shown, amount)

    def _expression(self, shown: Working, name: Callable[[Operand], str]) -> str:
        return "".join(self._token(shown, token, name) for token in shown.tokens)

    def _token(self, shown: Working, token: Token, name: Callable[[Operand], str]) -> str:
        if isinstance(token, Ref):
            return name(shown.operands[token.number - 1])
        return token if isinstance(token, str) else trimmed(token, self.locale, 0, 6)

    def unit(self, operand: Operand) -> str:
        """The unit of an operand, from its own declaration."""
        if operand.how == "first":
            return "years"
        if operand.kind == "cells" and not (operand.of is None or operand.key):
            return "index" if operand.how == "product" else "money"
        if operand.kind == "input":
            declared = field_of(self.deal, operand.key).input
            return declared.unit if declared is not None else "count"
        if any(cell.parts for cell in operand.cells):
            return "money"
        if operand.key in self.result.declared:
            return self.result.declared[operand.key].unit
        return "money" if operand.kind == "fact" and operand.key not in _COUNTED else "index"

    def cell(self, operand: Operand, cell: Cell) -> str:
        """One line below an operand: when or of what, how much, and what made it."""
        if cell.at is None:
            lists = "spaces" if cell.key.startswith("s") else "leases"
            place = item_name(self.deal, f"{lists}@{cell.key}")
        else:
            place = when(operand.span, cell.at)
        unit = "money" if operand.how == "first" else self.unit(operand)
        parts = "; ".join(
            f"{name} {self.amount(value, _PARTS.get(name, 'money'))}" for name, value in cell.parts
        )
        text = f"{place}: {self.amount(cell.value, unit)}"
        return f"{text} ({parts})" if parts else text

    def sources(self, operand: Operand) -> list[str]:
        """The keys and paths that the cells of an operand were computed from."""
        if operand.of is None:
            return [operand.key] if operand.key else []
        leaves = (self._key(leaf) for leaf in operand.of.leaves())
        return list(dict.fromkeys(leaves))

    @staticmethod
    def _key(leaf: Line | Given | Fact) -> str:
        match leaf:
            case Line(key=key):
                return key
            case Given(path=path):
                return path
            case Fact(name=name):
                return name

    def why(self, shown: Working) -> str:
        """Why there is no figure."""
        year = shown.at if shown.span == "year" else None
        reason = self.result.reason(shown.key, year)
        return word_reason(self.deal, reason.code, reason.words, reason.issue)

    def input_text(self, path: str) -> tuple[str, str]:
        """An input's label and value."""
        declared = field_of(self.deal, path).input
        value = get(self.deal, path)
        unit = declared.unit if declared is not None else "text"
        if isinstance(value, int | float) and not isinstance(value, bool):
            return label_of(self.deal, path), self.amount(float(value), unit)
        return label_of(self.deal, path), MISSING if value is None else str(value)


_COUNTED = frozenset({"units", "area", "month_of_year", "month_number", "date_years"})
_PARTS = {"rate a year": "fraction", "factor": "index"}
