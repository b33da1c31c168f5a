"""Ranges as spreadsheets put them on the clipboard: lines of cells parted by tabs."""

from collections.abc import Sequence
from decimal import Decimal
from typing import TypeAlias

from workbench.text.locale import Locale

Block: TypeAlias = tuple[tuple[str, ...], ...]


def read_block(text: str) -> Block:
    """The cells of a range. A cell with a tab, a line break or a quote in it stands in quotes."""
    lines: list[tuple[str, ...]] = []
    cells: list[str] = []
    place = 0
    while place < len(text):
        cell, place = _cell(text, place)
        cells.append(cell)
        if place < len(text) and text[place] == "\t":
            place += 1
            if place < len(text):
                continue
            cells.append("")
        elif text[place : place + 2] == "\r\n":
            place += 2
        else:
            place += 1
        lines.append(tuple(cells))
        cells = []
    return tuple(lines)


def _cell(text: str, place: int) -> tuple[str, int]:
    """One cell and the place of the sign after it."""
    quoted = _quoted(text, place) if text[place] == '"' else None
    if quoted is not None:
        return quoted
    end = place
    while end < len(text) and text[end] not in "\t\r\n":
        end += 1
    return text[place:end], end


def _quoted(text: str, place: int) -> tuple[str, int] | None:
    """A cell in quotes; None where the quote is only a sign at the start of a plain cell."""
    cell, start = "", place + 1
    while (end := text.find('"', start)) >= 0:
        cell += text[start:end]
        if text[end + 1 : end + 2] != '"':
            is_whole = end + 1 == len(text) or text[end + 1] in "\t\r\n"
            return (cell, end + 1) if is_whole else None
        cell, start = cell + '"', end + 2
    return None


def write_block(lines: Sequence[Sequence[str]]) -> str:
    """A range as text, for any spreadsheet."""
    return "\n".join("\t".join(_written(cell) for cell in line) for line in lines)


def _written(cell: str) -> str:
    if any(sign in cell for sign in '\t\r\n"'):
        return '"' + cell.replace('"', '""') + '"'
    return cell


def plain(value: float | None, locale: Locale, percent: bool = False) -> str:
    """A number with every digit and no grouping, as a spreadsheet of that locale reads it."""
    if value is None:
        return ""
    number = Decimal(repr(float(value)))
    text = f"{number.scaleb(2) if percent else number:f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".")
    return text.replace(".", locale.decimal) + ("%" if percent else "")
