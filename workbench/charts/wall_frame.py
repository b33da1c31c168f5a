"""Where the value wall stands within its picture."""

from dataclasses import dataclass

from workbench.charts.gutter import Label, Span
from workbench.charts.lettering import LEADING, width
from workbench.charts.wall_stack import Stack, WallFigures

OVERHANG = 4.0
"""How far the capstone stands out on either side."""
_TRENCH_MARGIN = 9.0
_LEADER = 14.0
"""Room between what stands out on the right and the labels there."""
_BARE_MARGIN = 6.0
_LEAST_REACH = 1e-250
"""Below it an amount is nothing: its scale would be beyond what a float can hold."""


@dataclass(frozen=True)
class Frame:
    """The wall's edges and scale; `y` puts an amount above the ground at its height."""

    width: float
    size: float
    left: float
    right: float
    ground: float
    scale: float
    span: Span
    out: float
    """How far anything may stand out from the wall on either side."""
    labelled: bool
    with_amounts: bool

    def y(self, amount: float) -> float:
        return self.ground - amount * self.scale

    def across(self, y: float) -> tuple[float, float, float, float]:
        """The ends of a line across the wall and a little beyond."""
        beyond = self.out + 3 if self.labelled else self.left
        return self.left - beyond, y, self.right + beyond, y

    @property
    def gutter(self) -> float:
        """Where the labels on the right begin."""
        return self.right + self.out + _LEADER


def frame_of(figures: WallFigures, stack: Stack, size: float, room: tuple[float, float]) -> Frame:
    """The frame for a picture so wide and, without its foot, so high."""
    wide, high = room
    out = _TRENCH_MARGIN if stack.trench else OVERHANG
    left = width(str(len(figures.courses)), size) + 7 + out
    few, full = (out + _LEADER + 4 + reach for reach in _gutters(figures, stack, size))
    least = max(0.3 * wide, 4 * size)
    labelled = wide - left - few >= least and high >= 11 * size
    with_amounts = labelled and wide - left - full >= least
    right = full if with_amounts else few
    above = 2 * LEADING * size
    if not labelled:
        left = right = min(_BARE_MARGIN, wide / 6)
        out, above = left / 2, min(3.0, high / 6)
    ground, scale = _measured(figures, stack, high, above)
    span = Span(2.0, high - 2.0)
    return Frame(wide, size, left, wide - right, ground, scale, span, out, labelled, with_amounts)


def _gutters(figures: WallFigures, stack: Stack, size: float) -> tuple[float, float]:
    """Widths of the gutter that holds value and price, and of one that holds every label."""
    marks = mark_labels(figures, stack)
    few = max((mark.wide(size) for mark in marks if mark.key != "exit"), default=0.0)
    amounts = [figures.money(course.high - course.low) for course in stack.courses]
    every = [*(mark.wide(size) for mark in marks), *(width(text, size) for text in amounts)]
    return few, max(every, default=0.0)


def _measured(figures: WallFigures, stack: Stack, high: float, above: float) -> tuple[float, float]:
    """Where the ground lies, and the height of one unit of money."""
    below = above / 2
    reach = max(stack.top, figures.price or 0.0, 0.0) + stack.depth
    scale = (high - above - below) / reach if reach > _LEAST_REACH else 0.0
    return high - below - stack.depth * scale, scale


def mark_labels(figures: WallFigures, stack: Stack) -> tuple[Label, ...]:
    """Value, price and exit in two lines each; their heights are still amounts of money."""
    marks: list[Label] = []
    if figures.value is not None:
        lines = ("value", figures.money(figures.value))
        marks.append(Label("value", stack.top, lines, weight="bold"))
    elif stack.courses:
        lines = ("rents alone", figures.money(stack.top))
        marks.append(Label("rents", stack.top, lines, weight="bold"))
    if figures.price is not None:
        lines = ("price", figures.money(figures.price))
        marks.append(Label("price", figures.price, lines, "price", "bold"))
    for course in (*stack.courses, *stack.trench):
        if course.is_exit:
            marks.append(Label("exit", (course.low + course.high) / 2, exit_lines(figures)))
    return tuple(marks)


def exit_lines(figures: WallFigures) -> tuple[str, str]:
    """What stands on the capstone; a share only where there is one."""
    share = "" if figures.exit_share is None else f" {figures.share(figures.exit_share)}"
    return f"exit{share}", figures.money(figures.exit or 0.0)
