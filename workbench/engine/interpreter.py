"""Any formula's array, node by node: for showing the working and for what no line holds."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field

import numpy as np

from workbench.engine import formula as f
from workbench.engine.looks import LOOKS, at_year, before, first_date, on_date, on_dates
from workbench.engine.result import Result
from workbench.engine.roll import Floats


@dataclass
class Values:
    """Arrays of any formula, from the lines, inputs and facts of a result; first trial only."""

    result: Result
    known: dict[f.Formula, Floats] = field(default_factory=dict)

    def of(self, node: f.Formula) -> Floats:
        if node not in self.known:
            with np.errstate(all="ignore"):
                self.known[node] = self._compute(node)
        return self.known[node]

    def _compute(self, node: f.Formula) -> Floats:
        match node:
            case f.Number(value=value):
                return np.array([value])
            case f.Line(key=key):
                return self.result.values[key][..., :1]
            case f.Given(path=path):
                return self.result.plan.inputs[path][..., :1]
            case f.Fact(name=name):
                return self.result.plan.facts[name]
            case f.Look(along=along, of=of):
                return LOOKS[along](self.of(of))
            case f.Pair(sign=sign, left=left, right=right):
                return PAIRS[sign](self.of(left), self.of(right))
            case f.Compare(sign=comparison, left=left, right=right):
                return COMPARISONS[comparison](self.of(left), self.of(right))
            case f.Where(condition=condition, yes=yes, no=no):
                return np.where(self.of(condition), self.of(yes), self.of(no))
            case _:
                return _CALLS[type(node)](*map(self.of, node.parts()))


PAIRS: Mapping[str, Callable[[Floats, Floats], Floats]] = {
    "+": np.add,
    "−": np.subtract,
    "×": np.multiply,
    "÷": np.divide,
    "^": np.power,
    "least": np.minimum,
    "greatest": np.maximum,
}
COMPARISONS: Mapping[str, Callable[[Floats, Floats], Floats]] = {
    "<": np.less,
    "≤": np.less_equal,
    "=": np.equal,
    ">": np.greater,
}
_CALLS: Mapping[type[f.Formula], Callable[..., Floats]] = {
    f.Before: before,
    f.AtYear: at_year,
    f.OnDates: on_dates,
    f.OnDate: on_date,
    f.FirstDate: first_date,
}
