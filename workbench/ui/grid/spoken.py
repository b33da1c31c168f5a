"""The cells of a year grid in words: for a screen reader, and why a cell is marked."""

from collections.abc import Mapping

from workbench.text.entry import NotTaken, parse_number
from workbench.text.messages import word_issue, word_reason
from workbench.ui.grid.cell import FOLLOWS
from workbench.ui.grid.rows import InputRow, LineRow
from workbench.ui.grid.sheet import Sheet

_STATES: Mapping[str, str] = {
    "typed": "typed",
    "following": "follows the year before",
    "unset": "not typed",
}


def spoken(sheet: Sheet, row: int, year: int) -> str:
    """A cell as a screen reader says it, with its marks."""
    cell = sheet.cell(row, year)
    if cell.kind == "band":
        return sheet.labels[row]
    text = cell.text.removeprefix(FOLLOWS)
    if isinstance(sheet.rows[row], InputRow) and text and cell.mark != "draft":
        text += " %" if sheet.percent(sheet.rows[row]) else ""
    words = [f"{sheet.labels[row]}, year {year}: {text or 'empty'}"]
    if cell.mark != "draft" and cell.kind in _STATES:
        words.append(_STATES[cell.kind])
    why = reason(sheet, row, year) if cell.mark or cell.kind == "missing" else ""
    return ", ".join(words) + (f". {why}" if why else "")


def reason(sheet: Sheet, row: int, year: int) -> str:
    """What is wrong in a cell, or why its figure is missing; empty where nothing is."""
    shown = sheet.rows[row]
    if isinstance(shown, InputRow):
        return _input_reason(sheet, shown, f"{shown.path}.{year}")
    if not isinstance(shown, LineRow) or sheet.value(shown, year) is not None:
        return ""
    if shown.key not in sheet.lines:
        return "This deal has no such line."
    found = sheet.result.reason(shown.key, year)
    words = word_reason(sheet.result.plan.deal, found.code, found.words, found.issue)
    return f"Not given: {words}."


def _input_reason(sheet: Sheet, row: InputRow, path: str) -> str:
    draft = sheet.deal.drafts.get(path)
    if draft is not None:
        read = parse_number(draft, sheet.locale, sheet.percent(row))
        why = f" {read.reason}" if isinstance(read, NotTaken) else ""
        return f"“{draft}” is not taken in.{why}"
    issue = sheet.issues.get(path)
    return "" if issue is None else f"{word_issue(sheet.result.plan.deal, issue)}."
