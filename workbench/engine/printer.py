"""The numpy printer: formulas become one generated function, made once per shape of deal.

Inside it the rows come first and the trials last: months (492, trials or 1), years (41, …), dates
(493, …) and single figures (trials or 1,).
"""

import re
from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass, field
from functools import lru_cache
from typing import TypeAlias

import numpy as np

from workbench.deal.inputs import YEARS
from workbench.engine import formula as f
from workbench.engine.calendar import MONTHS
from workbench.engine.kernels import KERNELS
from workbench.engine.lines import Declared, Output, declare
from workbench.engine.lines.line import Per
from workbench.engine.looks import LOOKS, at_year, before, first_date, on_date, on_dates, wide
from workbench.engine.roll import Floats
from workbench.engine.rows import RowError, row_of
from workbench.engine.shape import Shape

Run: TypeAlias = Callable[[Mapping[str, Floats], Mapping[str, Floats]], dict[str, Floats]]

ROWS: Mapping[Per, int] = {"month": MONTHS, "year": YEARS, "date": MONTHS + 1, "once": 0}

_SIGNS = {"+": "+", "−": "-", "×": "*", "÷": "/", "^": "**"}
_CALLS = {"least": "minimum", "greatest": "maximum"}
_COMPARISONS = {"<": "<", "≤": "<=", "=": "==", ">": ">"}


@dataclass(frozen=True)
class Program:
    """The lines that the function returns, and the function that computes them.

    `givens` are the paths of all inputs that it reads. A program of wanted lines keeps only those,
    and lets go of everything in between as soon as it has been used.
    """

    lines: Mapping[str, Declared]
    givens: tuple[str, ...]
    source: str
    run: Run


@lru_cache(maxsize=256)
def program(shape: Shape, wanted: frozenset[str] | None = None) -> Program:
    """The program for a shape; with `wanted`, only those lines and what they need."""
    declared = {line.key: line for line in declare(shape)}
    order = in_order(declared, wanted)
    leaves = [leaf for line in order for leaf in formulas_below(line)]
    givens = dict.fromkeys(leaf.path for leaf in leaves if isinstance(leaf, f.Given))
    facts = dict.fromkeys(leaf.name for leaf in leaves if isinstance(leaf, f.Fact))
    kept = [line for line in order if wanted is None or line.key in wanted]
    source = _Writer(conditions=wanted is None).function(order, kept, givens, facts)
    return Program({line.key: line for line in kept}, tuple(givens), source, _load(source))


def formulas_of(line: Declared) -> list[f.Formula]:
    """Every formula of a declaration: body or kernel arguments, then the conditions."""
    body = list(line.body.arguments) if isinstance(line.body, Output) else [line.body]
    return [*body, *(condition for condition, _ in line.unless)]


def formulas_below(line: Declared) -> Iterable[f.Line | f.Given | f.Fact]:
    """All lines, inputs and facts that a line is computed from."""
    return (leaf for one in formulas_of(line) for leaf in one.leaves())


def in_order(declared: Mapping[str, Declared], wanted: frozenset[str] | None) -> list[Declared]:
    """The lines so that each comes after those it needs. Raises ValueError for a circle."""
    done: dict[str, Declared] = {}
    open_keys: list[str] = []

    def visit(key: str) -> None:
        if key in done:
            return
        if key in open_keys:
            raise ValueError(f"lines in a circle: {' → '.join([*open_keys, key])}")
        open_keys.append(key)
        for leaf in formulas_below(declared[key]):
            if isinstance(leaf, f.Line):
                visit(leaf.key)
        open_keys.pop()
        done[key] = declared[key]

    for key in declared if wanted is None else sorted(wanted):
        visit(key)
    return list(done.values())


def condition_key(key: str, position: int) -> str:
    """Under what key the result holds whether the n-th condition of a line is met."""
    return f"{key}?{position}"


@dataclass
class _Writer:
    """Collects the statements of the function; a formula met twice is computed once."""

    conditions: bool
    """Whether the function also returns which conditions are met."""
    statements: list[str] = field(default_factory=list)
    names: dict[f.Formula, str] = field(default_factory=dict)
    kernels: dict[tuple[str, tuple[f.Formula, ...]], str] = field(default_factory=dict)
    rows: dict[str, Per] = field(default_factory=dict)
    met: dict[str, str] = field(default_factory=dict)

    def function(
        self,
        order: list[Declared],
        kept: list[Declared],
        givens: Iterable[str],
        facts: Iterable[str],
    ) -> str:
        for path in givens:
            self.names[f.Given(path)] = self._assign(f"givens[{path!r}]")
        for name in facts:
            self.names[f.Fact(name)] = self._assign(f"facts[{name!r}]")
        for line in order:
            self._line(line)
        results = {line.key: self.names[f.Line(line.key)] for line in kept}
        results |= self.met if self.conditions else {}
        last = "return {" + ", ".join(f"{key!r}: {name}" for key, name in results.items()) + "}"
        body = "\n    ".join(_let_go([*self.statements, last]))
        return f"def run(givens, facts):\n    {body}\n"

    def _line(self, line: Declared) -> None:
        if isinstance(line.body, Output):
            name = f"{self._kernel(line.body)}[{line.body.name!r}]"
        else:
            name = self._body(line.body, line.per)
        for position, (condition, _) in enumerate(line.unless):
            met = self._name(condition)
            self.met[condition_key(line.key, position)] = met
            name = f"where({met}, nan, {name})"
        self.names[f.Line(line.key)] = self._assign(name)
        self.rows[line.key] = line.per

    def _body(self, body: f.Formula, per: Per) -> str:
        """A body as a row of its line: a single figure stands in each cell."""
        row = row_of(body, self.rows)
        if row not in (per, "once"):
            raise RowError(f"a line by {per} has a formula by {row}")
        if row == per and not isinstance(body, f.Number):
            return self._name(body)
        return f"wide({self._name(body)}, {ROWS[per]})"

    def _kernel(self, body: Output) -> str:
        call = (body.kernel, body.arguments)
        if call not in self.kernels:
            arguments = ", ".join(self._name(one) for one in body.arguments)
            self.kernels[call] = self._assign(f"kernels[{body.kernel!r}].run({arguments})")
        return self.kernels[call]

    def _assign(self, text: str) -> str:
        if text.isidentifier():
            return text
        name = f"v{len(self.statements)}"
        self.statements.append(f"{name} = {text}")
        return name

    def _name(self, node: f.Formula) -> str:
        """The variable that holds a formula's value."""
        if isinstance(node, f.Number):
            return repr(node.value)
        if node not in self.names:
            self.names[node] = self._assign(self._text(node))
        return self.names[node]

    def _text(self, node: f.Formula) -> str:
        parts = [self._name(part) for part in node.parts()]
        match node:
            case f.Pair(sign=sign):
                if sign in _CALLS:
                    return f"{_CALLS[sign]}({parts[0]}, {parts[1]})"
                if node.left == f.Number(0.0) and sign == "−":
                    return f"-{parts[1]}"
                return f"{parts[0]} {_SIGNS[sign]} {parts[1]}"
            case f.Compare(sign=comparison):
                return f"{parts[0]} {_COMPARISONS[comparison]} {parts[1]}"
            case f.Where():
                return f"where({parts[0]}, {parts[1]}, {parts[2]})"
            case f.Look(along=along):
                return f"looks[{along!r}]({parts[0]})"
            case _:
                return f"{_NODES[type(node)].__name__}({', '.join(parts)})"


def _let_go(statements: list[str]) -> list[str]:
    """The statements with each variable deleted after its last use, so that memory stays warm."""
    written: list[str] = []
    seen: set[str] = set()
    for text in reversed(statements):
        used = dict.fromkeys(re.findall(r"\bv\d+\b", text))
        done = [name for name in used if name not in seen and not text.startswith("return")]
        seen |= used.keys()
        if done and not text.startswith(f"{done[0]} = "):
            written.append(f"del {', '.join(done)}")
        written.append(text)
    return written[::-1]


_NODES: Mapping[type[f.Formula], Callable[..., Floats]] = {
    f.Before: before,
    f.AtYear: at_year,
    f.OnDates: on_dates,
    f.OnDate: on_date,
    f.FirstDate: first_date,
}


def _load(source: str) -> Run:
    names: dict[str, object] = {
        "where": np.where,
        "wide": wide,
        "nan": np.nan,
        "minimum": np.minimum,
        "maximum": np.maximum,
        "looks": LOOKS,
        "kernels": KERNELS,
        **{call.__name__: call for call in _NODES.values()},
    }
    exec(source, names)
    run = names["run"]
    assert callable(run)
    return run
