"""The value wall: rent year by year as courses of masonry, the exit on top, the price across.

Height is in proportion to present value and is measured from the ground. Within a course rent in
hand lies to the left and rent expected to the right, its width split in proportion. What is below
zero goes into a hatched trench under the ground and the wall starts at the bottom of it, so that
its top is always the value.
"""

from workbench.charts.masonry import Box, lay
from workbench.charts.shapes import Line, Picture, Rect, Region, Shape, moved
from workbench.charts.wall_foot import bond_of, foot, notes_of
from workbench.charts.wall_frame import OVERHANG, Frame, frame_of
from workbench.charts.wall_labels import labels, price_line
from workbench.charts.wall_stack import Course, Stack, WallCourse, WallFigures, stack_of

__all__ = ["WallCourse", "WallFigures", "draw_wall"]

_LOWEST_ROW = 8.0
"""Least height of a row where letters are 11 high; a course below it is one row."""
_MOST_ROWS = 80
_LOWEST_BED = 3.0
_STONE_ROWS = 3.2
"""Height of the exit's stones in rows of bricks."""


def draw_wall(figures: WallFigures, width: float, height: float, size: float = 11.0) -> Picture:
    """The wall in a picture of that width and height, with letters of that size.

    Where there is no room the foot, then the amounts of the courses, then all labels are left
    out; `words` of the picture always says the whole.
    """
    stack = stack_of(figures)
    under, tall = foot(figures, stack, size, width)
    if tall > 0.4 * height or width < 9 * size:
        under, tall = (), 0.0
    frame = frame_of(figures, stack, size, (width, height - tall))
    shapes = (
        *_trench(frame, stack),
        Line(*frame.across(frame.ground), "ink", 1.6),
        *_masonry(frame, stack, height),
        *price_line(frame, figures),
        *labels(frame, figures, stack),
        *(moved(shape, 0, height - tall) for shape in under),
    )
    return Picture(width, height, shapes, _regions(frame, stack), _words(figures, stack))


def _box(frame: Frame, course: Course) -> Box:
    """A course's place; the capstone stands out on either side."""
    out = OVERHANG if course.is_exit and frame.labelled else 0.0
    top, bottom = frame.y(course.high), frame.y(course.low)
    return Box(frame.left - out, top, frame.right - frame.left + 2 * out, bottom - top)


def _parts(frame: Frame, course: Course) -> list[tuple[str, Box]]:
    """The pieces of a course side by side."""
    whole = _box(frame, course)
    sum_of = sum(piece.amount for piece in course.pieces)
    parts: list[tuple[str, Box]] = []
    x = whole.x
    for piece in course.pieces:
        wide = whole.width * (piece.amount / sum_of)
        parts.append((piece.key, Box(x, whole.y, wide, whole.height)))
        x += wide
    return parts


def _masonry(frame: Frame, stack: Stack, height: float) -> list[Shape]:
    """Bricks of every course; the joint under a course is wider than those within it."""
    shapes: list[Shape] = []
    lowest = max(_LOWEST_ROW * frame.size / 11, height / _MOST_ROWS)
    laid = 0
    for course in stack.courses:
        whole = _box(frame, course)
        rows = max(1, int(whole.height / (lowest * (_STONE_ROWS if course.is_exit else 1))))
        for place, (piece, (_, box)) in enumerate(
            zip(course.pieces, _parts(frame, course), strict=True)
        ):
            bond = bond_of(piece.tier, frame.size, whole.width)
            shapes += lay(box, rows, bond, frame.left + laid % 2 * bond.length / 2)
            if place:
                shapes.append(Line(box.x, box.y, box.x, box.bottom, "paper", bond.joint))
        if laid and whole.height >= _LOWEST_BED:
            below = whole.bottom
            shapes.append(Line(whole.x, below, whole.right, below, "paper", 1.9 * bond.joint))
        laid += rows
    return shapes


def _trench(frame: Frame, stack: Stack) -> list[Shape]:
    """The hatched ground behind the wall, one rectangle to each piece below zero."""
    return [
        Rect(box.x, box.y, box.width, box.height, hatch="hatch", stroke="hatch", stroke_width=0.6)
        for _, box in _trench_boxes(frame, stack)
    ]


def _trench_boxes(frame: Frame, stack: Stack) -> list[tuple[str, Box]]:
    left, wide = frame.left - frame.out, frame.right - frame.left + 2 * frame.out
    return [
        (
            course.pieces[0].key,
            Box(left, frame.y(course.high), wide, frame.y(course.low) - frame.y(course.high)),
        )
        for course in stack.trench
    ]


def _regions(frame: Frame, stack: Stack) -> tuple[Region, ...]:
    boxes = _trench_boxes(frame, stack)
    for course in stack.courses:
        boxes += _parts(frame, course)
    return tuple(Region(key, box.x, box.y, box.width, box.height) for key, box in boxes)


def _words(figures: WallFigures, stack: Stack) -> str:
    """The picture in sentences, for those who cannot see it or see it small."""
    said = ["Value wall."]
    if figures.value is not None:
        said.append(f"Value {figures.money(figures.value)}.")
    if figures.price is not None:
        said.append(f"Price {figures.money(figures.price)}.")
    in_hand = sum(course.in_hand for course in figures.courses)
    expected = sum(course.expected for course in figures.courses)
    said.append(f"Rent in hand {figures.money(in_hand)}, rent expected {figures.money(expected)}.")
    if figures.exit is not None:
        share = "" if figures.exit_share is None else f", {figures.share(figures.exit_share)}"
        said.append(f"Exit {figures.money(figures.exit)}{share}.")
    return " ".join([*said, *notes_of(figures, stack)])
