"""What stands under the wall: which brick means what, and what has to be said about it."""

from workbench.charts.lettering import LEADING, width
from workbench.charts.masonry import Bond, Box, lay
from workbench.charts.shapes import Shape, Text
from workbench.charts.wall_stack import Stack, Tier, WallFigures
from workbench.charts.wrapping import wrap

_SWATCH = 3.2
"""Width of a swatch as a multiple of the letter size."""
_TIER_NAMES: dict[Tier, str] = {"in_hand": "rent in hand", "expected": "rent expected"}


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
    """A swatch and a name for each tier that occurs, on one line or one under the other."""
    seen = {piece.tier for course in stack.courses for piece in course.pieces}
    tiers = [tier for tier in _TIER_NAMES if tier in seen]
    small = size * 0.92
    lengths = [size * (_SWATCH + 0.6) + width(_TIER_NAMES[tier], small) for tier in tiers]
    one_line = sum(lengths) + 1.5 * size * len(lengths) <= wide
    shapes: list[Shape] = []
    right, down = 4.0, 0.0
    for tier, length in zip(tiers, lengths, strict=True):
        if down == 0.0 or not one_line:
            right, down = 4.0, down + size * 1.5
        swatch = Box(right, down - size * 0.75, size * _SWATCH, size * 0.8)
        shapes += lay(swatch, 1, bond_of(tier, size, wide), right)
        name = _TIER_NAMES[tier]
        shapes.append(Text(right + size * (_SWATCH + 0.6), down, name, small, colour="muted"))
        right += length + 1.5 * size
    return shapes, down + size * 0.3 if shapes else 0.0
