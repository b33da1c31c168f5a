"""Text broken into lines that fit a width, with runs of different weight kept."""

import re
from collections.abc import Iterator
from dataclasses import dataclass, replace
from typing import TypeAlias

from workbench.charts.lettering import ELLIPSIS, Weight, shorten, width


@dataclass(frozen=True)
class Run:
    """A stretch of text in one weight."""

    text: str
    weight: Weight = "regular"


TextLine: TypeAlias = tuple[Run, ...]


@dataclass(frozen=True)
class _Word:
    """What may not be broken: parts without a space between them, and the space before."""

    parts: tuple[Run, ...]
    gap: tuple[Run, ...]


def wrap_runs(runs: tuple[Run, ...], size: float, room: float) -> tuple[TextLine, ...]:
    """Lines no wider than the room; breaks at spaces, or inside a word that alone is too long."""
    lines: list[TextLine] = []
    line: tuple[Run, ...] = ()
    filled = 0.0
    for word in _words(runs):
        added = 0.0 if word is None else length((*word.gap, *word.parts), size)
        if word is None or (line and filled + added > room):
            lines.append(_joined(line))
            line, filled = (), 0.0
        if word is None:
            continue
        if line:
            line, filled = (*line, *word.gap, *word.parts), filled + added
            continue
        *whole, line = _pieces(word.parts, size, room)
        lines += whole
        filled = length(line, size)
    return (*lines, _joined(line))


def wrap(text: str, size: float, room: float, weight: Weight = "regular") -> tuple[str, ...]:
    """Lines of one weight."""
    lines = wrap_runs((Run(text, weight),), size, room)
    return tuple("".join(run.text for run in line) for line in lines)


def wrap_short(
    text: str, size: float, room: float, most: int, weight: Weight = "regular"
) -> tuple[str, ...]:
    """So many lines at most; the last one kept says that there is more."""
    lines = wrap(text, size, room, weight)
    if len(lines) <= most:
        return lines
    last = f"{lines[most - 1]} {lines[most]}"
    if width(last, size, weight) <= room:
        last += ELLIPSIS
    return (*lines[: most - 1], shorten(last, size, room, weight))


def length(line: TextLine, size: float) -> float:
    """The length of a line of runs."""
    return sum(width(run.text, size, run.weight) for run in line)


def _words(runs: tuple[Run, ...]) -> Iterator[_Word | None]:
    """The words of the runs in order; None where a new line is asked for."""
    parts: tuple[Run, ...] = ()
    gap: tuple[Run, ...] = ()
    for run in runs:
        for piece in re.findall(r"[^ \n]+| +|\n", run.text):
            if piece[0] not in " \n":
                parts = (*parts, replace(run, text=piece))
                continue
            if parts:
                yield _Word(parts, gap)
            parts, gap = (), (replace(run, text=" "),)
            if piece == "\n":
                yield None
    if parts:
        yield _Word(parts, gap)


def _pieces(parts: tuple[Run, ...], size: float, room: float) -> list[TextLine]:
    """The word in one piece, or cut between letters where it is wider than the room."""
    if length(parts, size) <= room:
        return [parts]
    pieces: list[TextLine] = []
    piece: tuple[Run, ...] = ()
    filled = 0.0
    for letter in (replace(part, text=letter) for part in parts for letter in part.text):
        wide = width(letter.text, size, letter.weight)
        if piece and filled + wide > room:
            pieces.append(_joined(piece))
            piece, filled = (), 0.0
        piece, filled = (*piece, letter), filled + wide
    return [*pieces, _joined(piece)]


def _joined(line: tuple[Run, ...]) -> TextLine:
    """Neighbouring runs of one weight as one run."""
    joined: list[Run] = []
    for run in line:
        if joined and joined[-1].weight == run.weight:
            joined[-1] = replace(run, text=joined[-1].text + run.text)
        else:
            joined.append(run)
    return tuple(joined)
