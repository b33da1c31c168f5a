"""What stands under the wall: which brick means what, and what has to be said about it."""

from workbench.charts.legend import Entry, legend
from workbench.charts.lettering import LEADING
from workbench.charts.masonry import Bond, lay
from workbench.charts.shapes import Shape, Text
from workbench.charts.wall_stack import Stack, Tier, WallFigures
from workbench.charts.wrapping import wrap

TIER_NAMES: dict[Tier, str] = {"in_hand": "rent in hand", "expected": "rent expected"}


def bond_of(tier: Tier, size: float, wall: float) -> Bond:
    """Long dark bricks for rent in hand, short pale ones for rent expected, stones for the exit.

    A narrow wall has shorter bricks, so that there is still a bond to be seen, and a very wide one
    longer ones.
    """
    lengths: dict[Tier, float] = {"in_hand": 2.9, "expected": 1.25, "exit": 6.2}
    unit = min(size, wall / 9)
    return Bond(tier, lengths[tier] * max(unit, wall / 60), unit / 11)


def notes_of(figures: WallFigures, stack: Stack) -> tuple[str, ...]:
    """Sentences without which the picture could be misread."""
    notes: list[str] = []
    if not figures.has_leases:
        notes.append("No leases entered: no rent is in hand.")
    elif not any(c.in_hand for c in figures.courses) and any(c.expected for c in figures.courses):
        notes.append("No dated lease runs: no rent is in hand.")
    if figures.exit is None:
        reason = figures.exit_reason.strip().rstrip(".")
        notes.append(f"No exit price. {reason}." if reason else "No exit price.")
    if figures.value is not None and figures.value <= 0:
        notes.append("The value is not above zero, so there are no shares.")
    if stack.trench:
        below = figures.money(-stack.depth)
        whence = _whence(stack)
        notes.append(f"Hatched: {below} below zero ({whence}). The wall starts at its bottom.")
    elif not stack.courses:
        notes.append("Every amount is zero." if figures.courses else "Nothing to stack yet.")
    return tuple(notes)


def _whence(stack: Stack) -> str:
    """The years of the trench, as `years 1–3, 7 and the exit`."""
    years = sorted({course.year for course in stack.trench if not course.is_exit})
    spans: list[list[int]] = []
    for year in years:
        if spans and year == spans[-1][-1] + 1:
            spans[-1][1:] = [year]
        else:
            spans.append([year])
    named = ", ".join("–".join(str(year) for year in span) for span in spans)
    parts = [f"year{'s' if len(years) > 1 else ''} {named}"] if years else []
    if any(course.is_exit for course in stack.trench):
        parts.append("the exit")
    return " and ".join(parts)


def foot(
    figures: WallFigures, stack: Stack, size: float, wide: float
) -> tuple[tuple[Shape, ...], float]:
    """The shapes of the foot, from its own top, and its height."""
    small = size * 0.92
    shapes, down = _legend(stack, size, wide)
    lines = [line for note in notes_of(figures, stack) for line in wrap(note, small, wide - 8)]
    for line in lines:
        down += small * LEADING
        shapes.append(Text(4, down, line, small, colour="muted"))
    return tuple(shapes), down + small * 0.6 if shapes else 0.0


def _legend(stack: Stack, size: float, wide: float) -> tuple[list[Shape], float]:
    """A swatch and a name for each tier that occurs."""
    seen = {piece.tier for course in stack.courses for piece in course.pieces}
    return legend([tier_entry(tier, size, wide) for tier in TIER_NAMES if tier in seen], size, wide)


def tier_entry(tier: Tier, size: float, wide: float) -> Entry:
    """A tier of rent with a sample of its masonry."""
    bond = bond_of(tier, size, wide)
    return Entry(TIER_NAMES[tier], lambda box: lay(box, 1, bond, box.x))
