"""The figures of a deal as the command `figures --json` gives them, read by path."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from workbench.charts.wall_stack import WallCourse


@dataclass(frozen=True)
class Readings:
    """Access to the figures; what is absent reads as None, and a reason is looked for upwards."""

    figures: Mapping[str, Any]

    def number(self, path: str) -> float | None:
        """The figure at a dotted path."""
        found: Any = self.figures
        for part in path.split("."):
            found = found.get(part) if isinstance(found, Mapping) else None
        is_number = isinstance(found, int | float) and not isinstance(found, bool)
        return float(found) if is_number else None

    def row(self, path: str) -> tuple[float | None, ...]:
        """The figures of a list by year."""
        *sections, name = path.split(".")
        found: Any = self.figures
        for part in sections:
            found = found.get(part) or {}
        return tuple(found.get(name) or ())

    def reason(self, *paths: str) -> str:
        """Why the figure at one of the paths, or at what holds it, is missing."""
        reasons = self.reasons()
        for path in paths:
            while path:
                if path in reasons:
                    return reasons[path]
                path = path.rpartition(".")[0]
        return ""

    def reasons(self) -> Mapping[str, str]:
        return self.figures.get("reasons") or {}

    def issues(self) -> Sequence[Mapping[str, str]]:
        return self.figures.get("issues") or ()

    @property
    def hold(self) -> int | None:
        years = self.number("hold_years")
        return None if years is None else int(years)

    def courses(self) -> tuple[WallCourse, ...] | None:
        """The stack's years for the wall; None where a year cannot be given."""
        courses: list[WallCourse] = []
        for row in self.figures.get("stack") or ():
            in_hand, expected = row.get("in_hand"), row.get("expected")
            if in_hand is None or expected is None:
                return None
            courses.append(WallCourse(int(row["year"]), float(in_hand), float(expected)))
        return tuple(courses)

    def loan_amounts(self) -> Mapping[str, float | None]:
        """What each loan comes to, by its id."""
        return {loan["id"]: loan.get("amount") for loan in self.figures.get("loans") or ()}

    def lowest(self, path: str) -> tuple[float, int] | None:
        """The lowest figure of a row and its year."""
        given = [(v, year) for year, v in enumerate(self.row(path), start=1) if v is not None]
        return min(given, default=None)
