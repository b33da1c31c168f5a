"""How a reader writes numbers and dates: a small record of our own, and the table of those shipped.

The marks, groupings and percent spacing follow the Unicode Common Locale Data Repository. One
departure: every amount of four or more digits is grouped, also where a language leaves four
digits plain, because a column that groups only some of its figures is hard to read down.
"""

from dataclasses import dataclass
from typing import Literal

DateOrder = Literal["day", "month", "year"]
"""What a date begins with."""

Paper = Literal["a4", "letter"]

NO_BREAK = "\u00a0"
NARROW = "\u202f"

MONTHS = (
    "January", "February", "March", "April", "May", "June",
    "July", "August", "September", "October", "November", "December",
)  # fmt: skip


@dataclass(frozen=True)
class Locale:
    """The marks of one reader. Words stay English whatever the locale."""

    code: str
    decimal: str
    group: str
    grouping: tuple[int, ...] = (3,)
    """Sizes of the groups from the decimal mark leftwards; the last one repeats."""
    percent_gap: str = ""
    date_begins: DateOrder = "day"
    sign_after: bool = False
    """Whether a currency sign follows the amount, as in `1.200 €`."""
    sign_gap: str = ""
    paper: Paper = "a4"


_SHIPPED = (
    Locale("en-US", ".", ",", date_begins="month", paper="letter"),
    Locale("en-GB", ".", ","),
    Locale("en-IN", ".", ",", grouping=(3, 2)),
    Locale("de-DE", ",", ".", percent_gap=NO_BREAK, sign_after=True, sign_gap=NO_BREAK),
    Locale("fr-FR", ",", NARROW, percent_gap=NO_BREAK, sign_after=True, sign_gap=NO_BREAK),
    Locale("es-ES", ",", ".", percent_gap=NO_BREAK, sign_after=True, sign_gap=NO_BREAK),
    Locale("it-IT", ",", ".", sign_after=True, sign_gap=NO_BREAK),
    Locale("nl-NL", ",", ".", sign_gap=NO_BREAK),
    Locale("el-GR", ",", ".", sign_after=True, sign_gap=NO_BREAK),
    Locale("pl-PL", ",", NO_BREAK, sign_after=True, sign_gap=NO_BREAK),
    Locale(
        "sv-SE", ",", NO_BREAK,
        percent_gap=NO_BREAK, date_begins="year", sign_after=True, sign_gap=NO_BREAK,
    ),
    Locale("pt-BR", ",", ".", sign_gap=NO_BREAK),
    Locale("ja-JP", ".", ",", date_begins="year"),
)  # fmt: skip

LOCALES = {locale.code: locale for locale in _SHIPPED}
DEFAULT = LOCALES["en-US"]


def find_locale(code: str) -> Locale | None:
    """The shipped locale of a code written `de-DE`, `de_DE` or `de-de`; None if not shipped."""
    wanted = code.replace("_", "-").casefold()
    return next((known for known in _SHIPPED if known.code.casefold() == wanted), None)
