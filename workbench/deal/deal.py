"""A deal: one property, its assumptions and its records."""

from collections.abc import Mapping
from dataclasses import dataclass, field

from workbench.deal.borrow import Loan
from workbench.deal.earn import Earn, OtherIncome, Space, Stated
from workbench.deal.leave import Leave, Returns
from workbench.deal.property import About, Conventions, Pictures, Property
from workbench.deal.purchase import Purchase
from workbench.deal.records import Case, Comparable, Statement
from workbench.deal.spend import Expense, Spend, Works

SCHEMA = 1
"""The newest version of the deal file that this program reads and the one it writes."""


@dataclass(frozen=True)
class Deal:
    schema: int = SCHEMA
    next_id: int = 1
    """The number of the next list item; a number once given is never given again."""
    property: Property = field(default_factory=Property)
    about: About = field(default_factory=About)
    conventions: Conventions = field(default_factory=Conventions)
    purchase: Purchase = field(default_factory=Purchase)
    spaces: tuple[Space, ...] = ()
    earn: Earn = field(default_factory=Earn)
    other_income: tuple[OtherIncome, ...] = ()
    expenses: tuple[Expense, ...] = ()
    spend: Spend = field(default_factory=Spend)
    works: tuple[Works, ...] = ()
    stated: Stated = field(default_factory=Stated)
    loans: tuple[Loan, ...] = ()
    leave: Leave = field(default_factory=Leave)
    returns: Returns = field(default_factory=Returns)
    statements: tuple[Statement, ...] = ()
    comparables: tuple[Comparable, ...] = ()
    cases: tuple[Case, ...] = ()
    drafts: Mapping[str, str] = field(default_factory=dict)
    """Entries that did not parse: key path to the text as typed."""
    pictures: Pictures = field(default_factory=dict)


ID_LETTERS: Mapping[str, str] = {
    "costs": "c",
    "spaces": "s",
    "leases": "e",
    "steps": "p",
    "other_income": "i",
    "expenses": "x",
    "works": "w",
    "loans": "l",
    "blend": "b",
    "statements": "m",
    "lines": "a",
    "comparables": "q",
    "cases": "k",
}
"""The letter of the ids of each list; an id is the letter and a number of `next_id`."""
