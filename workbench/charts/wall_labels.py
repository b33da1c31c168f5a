"""The words on the value wall: capstone, price line, and labels in the gutters."""

from dataclasses import replace

from workbench.charts.gutter import Label, Span, lettered, spread
from workbench.charts.lettering import LEADING, width
from workbench.charts.shapes import Line, Rect, Shape
from workbench.charts.wall_frame import OVERHANG, Frame, exit_lines, mark_labels
from workbench.charts.wall_stack import Course, Stack, WallFigures

_MANY_YEARS = 15
_SPARE_LINES = 1
"""By how many lines the labels of the courses may spread beyond the courses themselves."""


def price_line(frame: Frame, figures: WallFigures) -> list[Shape]:
    """The price, across the wall, measured from the ground."""
    if figures.price is None:
        return []
    dashes = (frame.size * 0.55, frame.size * 0.3)
    return [Line(*frame.across(frame.y(figures.price)), "price", 1.6, dashes)]


def labels(frame: Frame, figures: WallFigures, stack: Stack) -> list[Shape]:
    """Everything written on and beside the wall."""
    if not frame.labelled:
        return []
    marks = [replace(mark, at=frame.y(mark.at)) for mark in mark_labels(figures, stack)]
    shapes = _capstone(frame, figures, stack)
    room = frame.width - frame.gutter
    marks = [m for m in marks if m.wide(frame.size) <= room and not (shapes and m.key == "exit")]
    room = frame.span.length - sum(mark.tall(frame.size) for mark in marks)
    courses = _labelled_courses(frame, stack, room)
    beside = [*marks, *_amounts(frame, figures, courses)] if frame.with_amounts else marks
    return [*shapes, *_right(frame, beside), *_left(frame, courses)]


def _capstone(frame: Frame, figures: WallFigures, stack: Stack) -> list[Shape]:
    """The exit's share and amount on the stone itself, clear of the price line, if they fit."""
    if not stack.courses or not stack.courses[-1].is_exit:
        return []
    cap = stack.courses[-1]
    top, bottom = frame.y(cap.high) + 2, frame.y(cap.low) - 2
    size = frame.size
    lines = exit_lines(figures)
    wide = max(width(line, size, "bold") for line in lines) + size
    tall = 2 * LEADING * size + 2
    if tall > bottom - top or wide > frame.right - frame.left:
        return []
    price = None if figures.price is None else frame.y(figures.price)
    middle = _clear_of(price, Span(top, bottom), tall)
    label = Label("exit", middle, lines, "on_exit", "bold")
    centre = (frame.left + frame.right) / 2
    panel = Rect(centre - wide / 2, middle - tall / 2, wide, tall, "exit")
    return [panel, *lettered(label, centre, middle, size, "middle")]


def _clear_of(line: float | None, room: Span, tall: float) -> float:
    """The middle of the room, or the nearest place in it that a line does not cross."""
    middle = (room.top + room.bottom) / 2
    reach = tall / 2 + 3
    if line is None or abs(middle - line) >= reach:
        return middle
    places = (line - reach, line + reach)
    inside = [p for p in places if room.top + tall / 2 <= p <= room.bottom - tall / 2]
    return min(inside, key=lambda place: abs(place - middle), default=middle)


def _labelled_courses(frame: Frame, stack: Stack, room: float) -> list[Course]:
    """All courses, each fifth above fifteen years, or fewer where they would not fit."""
    courses = [course for course in stack.courses if not course.is_exit]
    if not courses:
        return []
    line = LEADING * frame.size
    near = (courses[-1].high - courses[0].low) * frame.scale + _SPARE_LINES * line
    many = max(course.year for course in courses) > _MANY_YEARS
    steps = (5, 10, 20, 40) if many else (1, 2, 5, 10, 15)
    choices = ([course for course in courses if course.year % step == 0] for step in steps)
    return next((some for some in choices if len(some) * line <= min(room, near)), [])


def _amounts(frame: Frame, figures: WallFigures, courses: list[Course]) -> list[Label]:
    return [
        Label(
            f"year.{course.year}",
            frame.y((course.low + course.high) / 2),
            (figures.money(course.high - course.low),),
            "muted",
        )
        for course in courses
    ]


def _right(frame: Frame, beside: list[Label]) -> list[Shape]:
    """Labels in the right gutter, each led to its height of the wall."""
    ordered = sorted(beside, key=lambda label: label.at)
    wanted = [(label.at, label.tall(frame.size)) for label in ordered]
    shapes: list[Shape] = []
    for label, middle in zip(ordered, spread(wanted, frame.span), strict=True):
        shapes += lettered(label, frame.gutter, middle, frame.size, "start")
        start = frame.right + (OVERHANG if label.at < frame.ground else frame.out) + 2
        if label.key == "price":
            start = frame.across(label.at)[2]
        colour = label.colour if len(label.lines) > 1 else "rule"
        shapes.append(Line(start, label.at, frame.gutter - 3, middle, colour, 0.75))
    return shapes


def _left(frame: Frame, courses: list[Course]) -> list[Shape]:
    """Year numbers in the left gutter."""
    ordered = sorted(courses, key=lambda course: -course.year)
    line = LEADING * frame.size
    wanted = [(frame.y((course.low + course.high) / 2), line) for course in ordered]
    shapes: list[Shape] = []
    for course, middle in zip(ordered, spread(wanted, frame.span), strict=True):
        label = Label("", middle, (str(course.year),), "muted")
        shapes += lettered(label, frame.left - frame.out - 5, middle, frame.size, "end")
    return shapes
