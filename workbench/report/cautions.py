"""The cautions that stand on every document, and the lines on who made it for whom and why."""

from workbench.charts.wrapping import Run
from workbench.deal.property import About
from workbench.report.document import Paragraph
from workbench.text.locale import Locale
from workbench.text.numbers import day

FOOT = (
    "Arithmetic on the user’s assumptions at the user’s required return: not market value, and "
    "not an appraisal, evaluation or valuation, whoever prepared it. Not advice, not an offer, "
    "not a loan commitment. Projections are not facts. Cautions in full on the last page."
)
"""For the foot of every page."""

IN_ONE = (
    "Arithmetic on the user’s assumptions at the user’s required return: not market value, and "
    "not an appraisal, evaluation or valuation, whoever prepared it. Not investment, tax, legal, "
    "accounting or lending advice, not an offer, not a loan commitment. Projections are not facts "
    "and will differ from what happens. Check the figures with documents, local codes and rules, "
    "and licensed professionals. The condition of the buildings, title, the environment, zoning "
    "and the regulation of rents are not examined."
)
"""All of it in one paragraph, for figures that stand on no page."""

NOT_STATED = "not stated"

_FULL = (
    (
        "What the figures are.",
        "Every figure here is arithmetic on assumptions that the user chose, at the return that "
        "the user requires. The value says what the property would be worth to someone who holds "
        "those assumptions and requires that return. It is not market value.",
    ),
    (
        "What this document is not.",
        "It is not an appraisal, an evaluation or a valuation, whoever prepared it. It is not "
        "investment, tax, legal, accounting or lending advice, it offers nothing for sale, and "
        "it commits nobody to lend.",
    ),
    (
        "Projections.",
        "What is said about coming years is not fact. What happens will differ from it, and may "
        "differ by much.",
    ),
    (
        "Before relying on it.",
        "Check the figures with leases, statements and other documents, with local codes and "
        "rules, and with licensed professionals.",
    ),
    (
        "Not examined.",
        "The condition of the buildings, title, the environment, zoning and the regulation of "
        "rents are not examined.",
    ),
)


def full_cautions() -> tuple[Paragraph, ...]:
    """The cautions in full, for the last page."""
    return tuple(Paragraph((Run(title, "bold"), Run(f" {text}")), "small") for title, text in _FULL)


def parties(about: About, locale: Locale) -> tuple[tuple[str, str], ...]:
    """Purpose, intended users, preparer, interest and date, each said even where it is missing."""
    stated = (
        ("Purpose", about.purpose),
        ("Intended users", about.intended_users),
        ("Prepared by", about.prepared_by),
        ("Preparer’s interest", about.interest),
        ("Prepared on", day(about.prepared_on, locale) if about.prepared_on else ""),
    )
    return tuple((label, text.strip() or NOT_STATED) for label, text in stated)
