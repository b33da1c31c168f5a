"""The open deal. `apply` is the only way to alter it; whoever shows it listens to five signals."""

from collections.abc import Callable
from dataclasses import dataclass, replace
from typing import TypeAlias

from PySide6.QtCore import QObject, QTimer, Signal

from workbench.deal.changes import set_value
from workbench.deal.deal import Deal
from workbench.deal.issues import Issue
from workbench.engine.plan import Plan, compile_deal
from workbench.engine.result import Result, evaluate
from workbench.session.history import History, Step

Edit: TypeAlias = Callable[[Deal], Deal]


@dataclass(frozen=True)
class Change:
    """An edit with its name, as undo will call it. Changes of one focus merge into one step."""

    label: str
    edit: Edit
    focus: str | None = None


@dataclass(frozen=True)
class Effect:
    """What a change did to the value: shown at the foot of the window."""

    label: str
    before: float | None
    after: float | None


class Session(QObject):
    """One open deal with its history and its figures.

    The deal changes at once; the figures follow in the same turn of the event loop, once for any
    number of changes made in it.
    """

    deal_changed = Signal(object)
    """The deal is another one: carries the revision, a whole number that only grows."""
    result_changed = Signal(object)
    """Figures have followed: carries the Result."""
    effect_seen = Signal(object)
    """What the last change did to the value: carries an Effect."""

    def __init__(self, deal: Deal, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._history = History((Step(deal, ""),))
        self._revision = 0
        self._clean: Deal | None = deal
        self._plan: Plan = compile_deal(deal)
        self._result: Result = evaluate(self._plan)
        self._pending: str | None = None
        self._timer = QTimer(self)
        self._timer.setSingleShot(True)
        self._timer.setInterval(0)
        self._timer.timeout.connect(self.catch_up)

    @property
    def deal(self) -> Deal:
        return self._history.deal

    @property
    def revision(self) -> int:
        return self._revision

    @property
    def result(self) -> Result:
        """The figures as last computed; `catch_up` brings them level with the deal."""
        return self._result

    def issues_at(self, path: str) -> list[Issue]:
        """What is wrong at one input, as of the figures last computed."""
        return [issue for issue in self._plan.issues if issue.path == path]

    @property
    def modified(self) -> bool:
        """Whether the deal differs from the one last saved or opened."""
        return self._clean is not self.deal and self._clean != self.deal

    @property
    def undo_label(self) -> str | None:
        return self._history.undo_label

    @property
    def redo_label(self) -> str | None:
        return self._history.redo_label

    def apply(self, change: Change) -> None:
        """Alter the deal. A change that alters nothing leaves no step."""
        deal = change.edit(self.deal)
        if deal == self.deal:
            return
        self._move(self._history.then(Step(deal, change.label, change.focus)), change.label)

    def set(self, path: str, value: object, label: str, focus: str | None = None) -> None:
        """Set one input; its draft, if there was one, is gone."""

        def edit(deal: Deal) -> Deal:
            return set_value(without_draft(deal, path), path, value)

        self.apply(Change(label, edit, focus))

    def keep_draft(self, path: str, text: str, label: str, focus: str | None = None) -> None:
        """Keep an entry that did not parse; figures stay on the last good value."""

        def edit(deal: Deal) -> Deal:
            return replace(deal, drafts={**deal.drafts, path: text})

        self.apply(Change(label, edit, focus))

    def end_focus(self) -> None:
        """The field has lost the focus: what comes next is a step of its own."""
        self._history = self._history.apart()

    def undo(self) -> None:
        label = self.undo_label
        if label is not None:
            self._move(self._history.undone(), f"undo {label}")

    def redo(self) -> None:
        label = self.redo_label
        if label is not None:
            self._move(self._history.redone(), f"redo {label}")

    def start(self, deal: Deal, clean: bool = True) -> None:
        """Take another deal, without history; `clean` says that it is as on disk."""
        self._clean = deal if clean else None
        self._move(History((Step(deal, ""),)), "")

    def mark_clean(self) -> None:
        """The deal as it stands has been saved."""
        self._clean = self.deal
        self.deal_changed.emit(self._revision)

    def catch_up(self) -> None:
        """Compute the figures of the deal as it stands, if they are behind."""
        self._timer.stop()
        if self._plan.deal is self.deal:
            return
        label, self._pending = self._pending, None
        before = self._result.figure("value")
        self._plan = compile_deal(self.deal, self._plan)
        self._result = evaluate(self._plan)
        self.result_changed.emit(self._result)
        if label:
            self.effect_seen.emit(Effect(label, before, self._result.figure("value")))

    def _move(self, history: History, label: str) -> None:
        self._history = history
        self._revision += 1
        self._pending = label
        self.deal_changed.emit(self._revision)
        self._timer.start()


def without_draft(deal: Deal, path: str) -> Deal:
    """The deal without the draft of one input."""
    if path not in deal.drafts:
        return deal
    return replace(deal, drafts={key: text for key, text in deal.drafts.items() if key != path})
