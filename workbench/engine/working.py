"""Show the working: a figure taken apart into the operands it was computed from.

A working is an expression over numbered operands. Each operand is a line, an input or a fact of the
deal at one place in time, or a set of cells that are added, multiplied or searched; with the values
given, the expression comes to the figure again. Words and rounding are left to whoever prints it.
"""

from dataclasses import dataclass

from workbench.engine import formula as f
from workbench.engine.interpreter import Values
from workbench.engine.kernels import KERNELS
from workbench.engine.lines import Declared, Output
from workbench.engine.operands import Cell, Operand, Ref, Span, Token
from workbench.engine.result import Result
from workbench.engine.writer import Writer


@dataclass(frozen=True)
class Working:
    """A figure and how it came about.

    `tokens` is the expression: signs, brackets and the words least and greatest as text, plain
    numbers, and references to `operands`. A figure found by solving has no expression: its
    operand's cells, present values at that figure, add up to nothing.
    """

    key: str
    span: Span
    at: int | None
    value: float | None
    declared: Declared
    tokens: tuple[Token, ...]
    operands: tuple[Operand, ...]
    solved: bool = False


def working(result: Result, key: str, year: int | None = None) -> Working:
    """The working of a line: of one year's figure, or of a single figure.

    Parameters
    ----------
    result : Result
        Of one trial; of a batch the first trial is shown.
    key : str
        A line of the plan.
    year : int, optional
        Deal year from 1, for lines by month (their sum over the year, a balance at its end) and by
        year.

    Returns
    -------
    Working

    Raises
    ------
    KeyError
        There is no such line.
    ValueError
        A year is missing, superfluous or not one of 1…41.
    """
    timed = result.declared[key].per in ("month", "year")
    if timed != (year is not None):
        raise ValueError("a line by month or year needs a year, others have none")
    per = result.declared[key].per
    return working_at(result, key, "year" if timed else per, year)


def working_at(result: Result, key: str, span: Span, at: int | None) -> Working:
    """The working of a line at any place in time: what an operand of another working names.

    `at` is a year or month from 1, a date from 0, or None for a single figure. Errors are those
    of `working`.
    """
    declared = result.declared[key]
    position = _position(result, key, span, at)
    array = result.values[key]
    if span == "year":
        value = result.figure(key, at)
    elif at is None:
        value = result.figure(key) if span == "once" else None
    else:
        value = float(array[position, 0])
    if isinstance(declared.body, Output):
        return _kernel_working(result, declared, declared.body, span, at, value)
    writer = Writer(result)
    tokens = _tokens(writer, declared, declared.body, span, position)
    return Working(key, span, at, value, declared, tokens, tuple(writer.operands))


def _position(result: Result, key: str, span: Span, at: int | None) -> int:
    """The place along the line's own row, from 0; for a year of months the year."""
    length = {"once": 1, "year": 41}.get(span, len(result.values[key]))
    first = 0 if span == "date" else 1
    if at is None:
        return 0
    if not first <= at < length + first:
        raise ValueError(f"{key}: {span} {at} is not one of {first}…{length + first - 1}")
    return at - first


def _tokens(
    writer: Writer, declared: Declared, body: f.Formula, span: Span, position: int
) -> tuple[Token, ...]:
    if span == "year" and declared.per == "month":
        if declared.standing:
            return writer.cell(body, 12 * position + 11)
        return writer.in_year(body, position)
    return writer.cell(body, position)


def _kernel_working(
    result: Result,
    declared: Declared,
    body: Output,
    span: Span,
    at: int | None,
    value: float | None,
) -> Working:
    """The kernel's own rows in place of an expression."""
    kernel = KERNELS[body.kernel]
    values = Values(result)
    arguments = [values.of(one) for one in body.arguments]
    month = at if span == "month" else None
    year = at if month is None else (month - 1) // 12 + 1
    rows = kernel.rows(arguments, body.name, year)
    if month is not None:
        standing = declared.standing
        rows = tuple(row for row in rows if row.at == month or (standing and row.at < month))
    cells = tuple(Cell(declared.key, row.at, row.value, row.parts) for row in rows)
    total = float(sum(cell.value for cell in cells))
    span_of_cells: Span = "date" if kernel.solves else "month"
    operand = Operand("cells", declared.key, span_of_cells, None, total, "sum", cells)
    return Working(
        declared.key, span, at, value, declared, (Ref(1),), (operand,), solved=kernel.solves
    )
