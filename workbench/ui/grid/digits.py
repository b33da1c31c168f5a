"""The cells of a year grid with every digit: for the editor and for the clipboard."""

from workbench.ui.grid.clipboard import plain
from workbench.ui.grid.rows import InputRow
from workbench.ui.grid.sheet import Sheet


def edited(sheet: Sheet, row: int, year: int) -> str:
    """What an editor starts with: the draft, or the value without its per cent sign."""
    shown = sheet.rows[row]
    if not isinstance(shown, InputRow):
        return ""
    draft = sheet.deal.drafts.get(f"{shown.path}.{year}")
    if draft is not None:
        return draft
    return plain(sheet.value(shown, year), sheet.locale, sheet.percent(shown)).rstrip("%")


def copied(sheet: Sheet, row: int, year: int) -> str:
    """A cell for the clipboard: no grouping, so that a spreadsheet reads it; a draft as typed."""
    shown = sheet.rows[row]
    if isinstance(shown, InputRow):
        draft = sheet.deal.drafts.get(f"{shown.path}.{year}")
        if draft is not None:
            return draft
    return plain(sheet.value(shown, year), sheet.locale, sheet.percent(shown))
