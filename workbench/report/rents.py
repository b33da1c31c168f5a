"""Rents as they were entered, and what they come to a year."""

from collections.abc import Iterable, Mapping
from dataclasses import dataclass

from workbench.deal.earn import Rent, Space
from workbench.engine.roll import monthly
from workbench.report.typed import decimals_of
from workbench.report.voice import Voice
from workbench.text import numbers


def rent_text(voice: Voice, rent: Rent) -> str:
    """`19.50 per m² a month`, as entered."""
    if rent.amount is None:
        return numbers.MISSING
    return f"{voice.exact(rent.amount)} {rent_unit(voice, rent)}"


def rent_unit(voice: Voice, rent: Rent) -> str:
    """What an entered rent is of: `per m² a month`."""
    return f"per {'unit' if rent.of == 'unit' else voice.area_unit} a {rent.per}"


def one_unit(rents: Iterable[Rent]) -> Rent | None:
    """One of the rents where all are of the same measure and period, so that a title can say it."""
    given = [rent for rent in rents if rent.amount is not None]
    kinds = {(rent.per, rent.of) for rent in given}
    return given[0] if len(kinds) == 1 else None


def yearly(space: Space, rent: Rent) -> float | None:
    """A rent of all units of a space in money a year; None where something is missing."""
    amount = 12.0 * monthly(space, rent)
    return amount if amount == amount else None


def comparable(rent: Rent, area: float | None, like: Rent) -> float | None:
    """A rent in the measure and period of another; None where an area that it takes is missing."""
    if rent.amount is None or (rent.of != like.of and area is None):
        return None
    amount = rent.amount * _A_YEAR[rent.per] / _A_YEAR[like.per]
    if rent.of == like.of or area is None:
        return amount
    return amount / area if rent.of == "unit" else amount * area


_A_YEAR = {"month": 12.0, "year": 1.0}


@dataclass(frozen=True)
class RentWords:
    """Rents as entered: bare numbers under one title where all are of one measure and period."""

    voice: Voice
    unit: Rent | None
    decimals: Mapping[str, int]

    def title(self, title: str) -> str:
        return title if self.unit is None else f"{title} {rent_unit(self.voice, self.unit)}"

    def text(self, rent: Rent | None) -> str:
        if rent is None:
            return ""
        of = rent_unit(self.voice, rent)
        amount = self.voice.exact(rent.amount, self.decimals.get(of))
        return amount if self.unit or rent.amount is None else f"{amount}\n{of}"


def decimals_by_unit(voice: Voice, rents: Iterable[Rent]) -> dict[str, int]:
    """By measure and period, as many decimals as its rents need to line up."""
    amounts: dict[str, list[float]] = {}
    for rent in rents:
        if rent.amount is not None:
            amounts.setdefault(rent_unit(voice, rent), []).append(rent.amount)
    return {of: decimals_of(voice, "money", some) for of, some in amounts.items()}
