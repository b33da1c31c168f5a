"""What the roll shows: the text and the state of each cell, made when it is first asked for."""

from collections.abc import Mapping
from functools import cached_property

from workbench.deal.deal import Deal
from workbench.deal.issues import Issue
from workbench.engine.result import Result
from workbench.text.entry import NotTaken
from workbench.text.messages import word_issue
from workbench.ui.grid.cell import FOLLOWS, Cell
from workbench.ui.roll.columns import COLUMNS, heading
from workbench.ui.roll.rows import RollRow, name_of_row, rows_of
from workbench.ui.roll.values import edited, read_cell, shown


class RollSheet:
    """The cells of the rent roll of one deal and its issues."""

    def __init__(self, deal: Deal, result: Result, rows: list[RollRow] | None = None) -> None:
        self.deal = deal
        self.result = result
        self.rows: list[RollRow] = rows_of(deal) if rows is None else rows
        self.headings = tuple(heading(column, deal) for column in COLUMNS)
        self._cells: dict[tuple[int, int], Cell] = {}

    def renewed(self, deal: Deal, result: Result) -> "RollSheet":
        """The sheet of a later deal. Where the roll is the same, nothing is made again."""
        same = deal.spaces is self.deal.spaces
        new = RollSheet(deal, result, self.rows if same else None)
        if same and new.headings == self.headings and deal.drafts == self.deal.drafts:
            alike = deal.conventions == self.deal.conventions and new.issues == self.issues
            new._cells = self._cells if alike else {}
        return new

    def forget(self) -> None:
        """Make every cell again."""
        self._cells = {}

    def shows_the_same(self, other: "RollSheet") -> bool:
        """Whether two sheets have every cell in common."""
        return self._cells is other._cells

    @cached_property
    def issues(self) -> Mapping[str, Issue]:
        """The first issue of each path, drafts aside."""
        found: dict[str, Issue] = {}
        for issue in self.result.plan.issues:
            if issue.code != "draft":
                found.setdefault(issue.path, issue)
        return found

    def cell(self, row: int, column: int) -> Cell:
        """A cell, made once."""
        place = row, column
        if place not in self._cells:
            self._cells[place] = self._made(self.rows[row], column)
        return self._cells[place]

    def _made(self, row: RollRow, place: int) -> Cell:
        column = COLUMNS[place]
        path = row.path(column)
        left = not column.is_number
        draft = self.deal.drafts.get(path) if path else None
        if draft is not None:
            return Cell(draft, "typed", "draft", left)
        text = shown(column, row.value(column), self.deal)
        if not column.of_lease and not row.first:
            return Cell(FOLLOWS + text if text else "", "following", "", left)
        return Cell(text, "entry", "issue" if path in self.issues else "", left)

    def edited(self, row: int, column: int) -> str:
        """What an editor starts with and what is copied: the draft, or the value."""
        path = self.rows[row].path(COLUMNS[column])
        draft = self.deal.drafts.get(path) if path else None
        if draft is not None:
            return draft
        return edited(COLUMNS[column], self.rows[row].value(COLUMNS[column]), self.deal)

    def reason(self, row: int, column: int) -> str:
        """What is wrong in a cell; empty where nothing is."""
        known, kind = self.rows[row], COLUMNS[column]
        path = known.path(kind)
        draft = self.deal.drafts.get(path) if path else None
        if draft is not None:
            read = read_cell(kind, draft, known.value(kind), self.deal)
            why = f" {read.reason}" if isinstance(read, NotTaken) else ""
            return f"“{draft}” is not taken in.{why}"
        issue = self.issues.get(path)
        return "" if issue is None else f"{word_issue(self.result.plan.deal, issue)}."

    def spoken(self, row: int, column: int) -> str:
        """A cell as a screen reader says it."""
        text = self.cell(row, column).text.removeprefix(FOLLOWS)
        where = "new row" if self.rows[row].space is None else name_of_row(self.rows, row)
        why = self.reason(row, column)
        words = f"{COLUMNS[column].title} of {where}: {text or 'empty'}"
        return f"{words}. {why}" if why else words
