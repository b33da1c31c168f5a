"""Undo and redo as a list of whole deals, each with the name of the change that led to it."""

from dataclasses import dataclass, replace

from workbench.deal.deal import Deal

LONGEST = 500
"""Steps kept; older ones are let go."""


@dataclass(frozen=True)
class Step:
    """A deal and what was done to get there. Steps of one focus follow each other as one."""

    deal: Deal
    label: str
    focus: str | None = None


@dataclass(frozen=True)
class History:
    """The steps so far and which of them is shown."""

    steps: tuple[Step, ...]
    at: int = 0

    @property
    def deal(self) -> Deal:
        return self.steps[self.at].deal

    @property
    def undo_label(self) -> str | None:
        return self.steps[self.at].label if self.at else None

    @property
    def redo_label(self) -> str | None:
        return self.steps[self.at + 1].label if self.at + 1 < len(self.steps) else None

    def then(self, step: Step) -> "History":
        """With one more step; a step of the same focus as the last one takes its place."""
        kept = self.steps[: self.at + 1]
        if step.focus is not None and self.at and kept[-1].focus == step.focus:
            kept = kept[:-1]
        kept = (*kept, step)[-LONGEST:]
        return History(kept, len(kept) - 1)

    def apart(self) -> "History":
        """The same, so that the next step does not merge with the last one."""
        last = replace(self.steps[self.at], focus=None)
        return History((*self.steps[: self.at], last, *self.steps[self.at + 1 :]), self.at)

    def undone(self) -> "History":
        return History(self.steps, self.at - 1).apart() if self.at else self

    def redone(self) -> "History":
        forward = self.at + 1 < len(self.steps)
        return History(self.steps, self.at + 1).apart() if forward else self
