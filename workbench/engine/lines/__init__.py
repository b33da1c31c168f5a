"""Every line the engine computes, declared once, for a shape of deal."""

from workbench.engine.lines.borrow import borrow_lines
from workbench.engine.lines.earn import earn_lines
from workbench.engine.lines.flows import flow_lines
from workbench.engine.lines.leave import leave_lines
from workbench.engine.lines.line import Declared, Output
from workbench.engine.lines.measures import measure_lines
from workbench.engine.lines.spend import spend_lines
from workbench.engine.lines.value import value_lines
from workbench.engine.shape import Shape

__all__ = ["Declared", "Output", "declare"]


def declare(shape: Shape) -> tuple[Declared, ...]:
    """All lines of a shape, in the order a reader would meet them."""
    sections = (
        earn_lines,
        spend_lines,
        borrow_lines,
        leave_lines,
        value_lines,
        flow_lines,
        measure_lines,
    )
    return tuple(line for section in sections for line in section(shape))
