"""Evaluating a plan over a trial axis, and reading what came out."""

import math
from collections.abc import Collection, Iterator, Mapping
from dataclasses import dataclass, field

import numpy as np
import numpy.typing as npt

from workbench.deal.inputs import YEARS
from workbench.deal.issues import Issue
from workbench.engine import formula as f
from workbench.engine.kernels import KERNELS
from workbench.engine.lines import Declared, Output
from workbench.engine.plan import Plan
from workbench.engine.printer import condition_key, formulas_below, formulas_of, program
from workbench.engine.roll import Floats

CHUNK = 256
"""Trials computed at a time, so that the arrays at work stay in the processor's cache."""


@dataclass(frozen=True)
class Reason:
    """Why a figure cannot be given: the code, the line where it arose, the issue if one did it."""

    code: str
    line: str
    words: str = ""
    issue: Issue | None = None


def evaluate(
    plan: Plan,
    drivers: Mapping[str, npt.ArrayLike] | None = None,
    wanted: Collection[str] | None = None,
) -> "Result":
    """All lines of a plan, for one trial or for many at once.

    Parameters
    ----------
    plan : Plan
    drivers : mapping of key path to array_like, optional
        Inputs in place of the deal's own, shape (trials, 1) for a single figure or a whole row,
        (trials, years) for a year row, of which the last year extends for ever. Only inputs that
        the plan's lines read can be driven; what changes the rent roll or the shape of the deal
        needs a plan of its own.
    wanted : collection of line keys, optional
        Compute only these and what they need, and keep only these.

    Returns
    -------
    Result

    Raises
    ------
    KeyError
        A driver's path is not an input of this plan.
    ValueError
        Drivers of different numbers of trials, not of two axes or empty, or with years for a
        single figure.

    Examples
    --------
    >>> from workbench.deal.deal import Deal
    >>> from workbench.engine.plan import compile_deal
    >>> evaluate(compile_deal(Deal())).figure("value") is None
    True
    """
    made = plan.program if wanted is None else program(plan.shape, frozenset(wanted))
    driven = {path: _driver(plan, path, values) for path, values in (drivers or {}).items()}
    counts = {values.shape[-1] for values in driven.values()}
    trials = max(counts, default=1)
    if counts - {1, trials}:
        raise ValueError("drivers must have the same number of trials, or one")
    parts = []
    for start in range(0, trials, CHUNK):
        chunk = {path: _slice(values, start) for path, values in driven.items()}
        with np.errstate(all="ignore"):
            parts.append(made.run({**plan.inputs, **chunk}, plan.facts))
    values = _joined(parts, trials)
    whole = wanted is None
    return Result(plan, trials, made.lines, values, {**plan.inputs, **driven}, driven, whole)


def _driver(plan: Plan, path: str, values: npt.ArrayLike) -> Floats:
    """A driver as the program wants it: years first for a row, one axis for a single figure."""
    table = np.asarray(values, dtype=np.float64)
    if table.ndim != 2 or not table.size:
        raise ValueError(f"{path}: a driver has the axes trials and years")
    if path not in plan.inputs:
        raise KeyError(path)
    if plan.inputs[path].ndim == 1:
        if table.shape[1] != 1:
            raise ValueError(f"{path}: a single figure has no years")
        return table[:, 0]
    years = np.minimum(np.arange(YEARS), table.shape[1] - 1)
    return np.ascontiguousarray(table.T[years])


def _slice(values: Floats, start: int) -> Floats:
    return values if values.shape[-1] == 1 else values[..., start : start + CHUNK]


def _joined(parts: list[dict[str, Floats]], trials: int) -> dict[str, Floats]:
    if len(parts) == 1:
        return parts[0]
    sizes = [min(CHUNK, trials - start) for start in range(0, trials, CHUNK)]
    return {
        key: parts[0][key]
        if parts[0][key].shape[-1] == 1 and sizes[0] != 1
        else np.concatenate([part[key] for part in parts], axis=-1)
        for key in parts[0]
    }


@dataclass(frozen=True, eq=False)
class Result:
    """What a plan came to. Figures are given as a number or, with a reason, not at all."""

    plan: Plan
    trials: int
    declared: Mapping[str, Declared]
    values: Mapping[str, Floats] = field(repr=False)
    """Rows first, trials last, as the program made them; 1 trial where nothing drives a line."""
    inputs: Mapping[str, Floats] = field(repr=False)
    """What the lines read: the plan's inputs, with the drivers in place of some."""
    driven: Mapping[str, Floats] = field(repr=False)
    whole: bool
    """Whether all lines are kept, and not only those that were wanted."""

    def line(self, key: str) -> Floats:
        """A line's array: (1 or trials, months, years or dates), or (1 or trials, 1)."""
        array = self.values[key]
        return array[:, np.newaxis] if array.ndim == 1 else array.T

    def year(self, key: str) -> Floats:
        """A line by deal year, shape (1 or trials, 41): months summed, balances at year end."""
        array, declared = self.values[key], self.declared[key]
        if declared.per == "month" and declared.standing:
            array = array[11::12]
        elif declared.per == "month":
            array = array.reshape(YEARS, 12, -1).sum(axis=1)
        return array.T

    def figure(self, key: str, year: int | None = None, trial: int = 0) -> float | None:
        """One figure: of a year, or the single one; None where it cannot be given."""
        row = self.line(key) if year is None else self.year(key)
        cell = row[trial if len(row) > 1 else 0, 0 if year is None else year - 1]
        return float(cell) if math.isfinite(cell) else None

    def year_end(self, key: str, year: int, trial: int = 0) -> float | None:
        """A line of months as it stands at the end of a year."""
        row = self.line(key)
        cell = row[trial if len(row) > 1 else 0, 12 * year - 1]
        return float(cell) if math.isfinite(cell) else None

    def given(self, path: str, trial: int = 0) -> float | None:
        """An input as the lines read it; None where it is missing or out of range."""
        cell = float(self._cells(self.inputs[path], None, trial).flat[0])
        return cell if math.isfinite(cell) else None

    def why_not_given(self, path: str) -> Reason:
        """Why an input cannot be used."""
        return Reason("waits_for", path, issue=self.plan.blocked.get(path))

    def reason(self, key: str, year: int | None = None, trial: int = 0) -> Reason:
        """Why a figure cannot be given, looked for from the line down to what it waits for."""
        if not self.whole:
            return self._alone(trial).reason(key, year)
        found = next(self._reasons(key, None if year is None else year - 1, trial, set()), None)
        return found or Reason("too_large", key)

    def _alone(self, trial: int) -> "Result":
        """One trial with all its lines."""
        drivers = {
            path: values[..., trial if values.shape[-1] > 1 else 0].reshape(1, -1)
            for path, values in self.driven.items()
        }
        return evaluate(self.plan, drivers)

    def _reasons(
        self, key: str, year: int | None, trial: int, seen: set[tuple[str, int | None]]
    ) -> Iterator[Reason]:
        if (key, year) in seen:
            return
        seen.add((key, year))
        line = self.declared[key]
        yield from self._own_reason(line, year, trial)
        for leaf in formulas_below(line):
            if not isinstance(leaf, f.Line):
                yield from self._blocked(key, leaf, trial)
        lines = [one for node in formulas_of(line) for one in self._lines_below(node, year, trial)]
        for below, at in sorted(lines, key=lambda one: not self._missing(one[0], one[1], trial)):
            if self._missing(below, None, trial):
                yield from self._reasons(below, at, trial, seen)

    def _lines_below(
        self, node: f.Formula, year: int | None, trial: int
    ) -> Iterator[tuple[str, int | None]]:
        """The lines in a formula, each with the year it is read at; None is all of them."""
        if isinstance(node, f.Line):
            yield node.key, year
        if isinstance(node, f.AtYear):
            year = self._year_of(node.year, trial)
        for part in node.parts():
            yield from self._lines_below(part, year, trial)

    def _year_of(self, node: f.Formula, trial: int) -> int | None:
        """Which year, from 0, a formula looks at; None where it is not one of the row."""
        figure = node.value if isinstance(node, f.Number) else None
        if isinstance(node, f.Given):
            figure = self.given(node.path, trial)
        return int(figure) - 1 if figure is not None and 1 <= figure <= YEARS else None

    def _own_reason(self, line: Declared, year: int | None, trial: int) -> Iterator[Reason]:
        for position, (_, code) in enumerate(line.unless):
            met = self.values[condition_key(line.key, position)]
            if self._cells(met, year, trial).any():
                yield Reason(code, line.key)
        if isinstance(line.body, Output):
            kernel = KERNELS[line.body.kernel]
            lines = [one.key for one in line.body.arguments if isinstance(one, f.Line)]
            if kernel.explain is not None and not any(
                self._missing(key, None, trial) for key in lines
            ):
                arguments = [self.values[key] for key in lines]
                at = min(trial, arguments[0].shape[-1] - 1)
                yield Reason("no_rate", line.key, kernel.explain(arguments, at))

    def _blocked(self, key: str, leaf: f.Given | f.Fact, trial: int) -> Iterator[Reason]:
        name = leaf.path if isinstance(leaf, f.Given) else leaf.name
        read = self.inputs if isinstance(leaf, f.Given) else self.plan.facts
        if name in self.plan.blocked and np.isnan(self._cells(read[name], None, trial)).any():
            yield Reason("waits_for", key, issue=self.plan.blocked[name])

    def _missing(self, key: str, year: int | None, trial: int) -> bool:
        return not np.isfinite(self._cells(self.values[key], year, trial)).all()

    def _cells(self, array: Floats, year: int | None, trial: int) -> Floats:
        """A trial's cells of one year, or all of them where the line has no years."""
        column = array[..., trial if array.shape[-1] > 1 else 0]
        if year is None or column.ndim == 0:
            return column
        months = len(column) // YEARS
        return column[months * year : months * (year + 1)]
