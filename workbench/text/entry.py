"""What a person typed where a number is wanted, read into a value or refused with a reason.

Arithmetic is done on decimals, so that `4.5%` becomes exactly the float nearest to 0.045.
"""

from dataclasses import dataclass
from decimal import Decimal, DivisionByZero, InvalidOperation
from math import isinf

from workbench.text.locale import Locale
from workbench.text.tokens import EXACT, RefusedError, split_entry

LONGEST = 100
_ALIKE = str.maketrans({"−": "-", "–": "-", "×": "*", "·": "*", "÷": "/"})


@dataclass(frozen=True)
class Taken:
    """A value that was understood."""

    value: float


@dataclass(frozen=True)
class NotTaken:
    """Why an entry was not understood, as a sentence."""

    reason: str


@dataclass(frozen=True)
class _Tokens:
    """The numbers and signs of an entry, read one after the other."""

    parts: tuple[Decimal | str, ...]

    def at(self, place: int) -> Decimal | str:
        return self.parts[place] if place < len(self.parts) else ""


def parse_number(text: str, locale: Locale, percent: bool = False) -> Taken | NotTaken:
    """Read `4.5`, `4.5%`, `1.2m`, `12*950` or `(500)`; in a percent field a bare 4.5 is 4.5%."""
    if len(text) > LONGEST:
        return NotTaken(f"An entry has at most {LONGEST} characters; this one has {len(text)}.")
    plain = text.translate(_ALIKE).strip()
    if not plain:
        return NotTaken("Nothing was entered.")
    try:
        tokens = _Tokens(split_entry(plain, locale))
        value = _total(tokens, percent)
    except RefusedError as refused:
        return NotTaken(str(refused))
    except (DivisionByZero, InvalidOperation):  # the second is what 0/0 signals
        return NotTaken("The entry divides by zero.")
    number = float(value)
    if isinf(number):
        return NotTaken("The number is too large.")
    return Taken(number + 0.0)  # a typed −0 is 0


def _total(tokens: _Tokens, percent: bool) -> Decimal:
    """The value of the whole entry; a lone number in parentheses is negative, as in accounts."""
    parts = tokens.parts
    body = parts[:-1] if parts[-1:] == ("%",) else parts
    if len(body) == 3 and body[0] == "(" and isinstance(body[1], Decimal) and body[2] == ")":
        tokens = _Tokens(("-", *parts))
    value, place = _sum(tokens, 0)
    if place < len(tokens.parts):
        raise RefusedError(f"“{tokens.at(place)}” is not expected there.")
    if percent and "%" not in parts:
        return value.scaleb(-2, context=EXACT)
    return value


def _sum(tokens: _Tokens, place: int) -> tuple[Decimal, int]:
    value, place = _product(tokens, place)
    while (sign := tokens.at(place)) in ("+", "-"):
        other, place = _product(tokens, place + 1)
        value = EXACT.add(value, other) if sign == "+" else EXACT.subtract(value, other)
    return value, place


def _product(tokens: _Tokens, place: int) -> tuple[Decimal, int]:
    value, place = _signed(tokens, place)
    while (sign := tokens.at(place)) in ("*", "/"):
        other, place = _signed(tokens, place + 1)
        value = EXACT.multiply(value, other) if sign == "*" else EXACT.divide(value, other)
    return value, place


def _signed(tokens: _Tokens, place: int) -> tuple[Decimal, int]:
    minus = False
    while (sign := tokens.at(place)) in ("+", "-"):
        minus ^= sign == "-"
        place += 1
    value, place = _atom(tokens, place)
    while tokens.at(place) == "%":
        value, place = value.scaleb(-2, context=EXACT), place + 1
    return (-value if minus else value), place


def _atom(tokens: _Tokens, place: int) -> tuple[Decimal, int]:
    token = tokens.at(place)
    if isinstance(token, Decimal):
        return token, place + 1
    if token == "(":
        value, place = _sum(tokens, place + 1)
        if tokens.at(place) != ")":
            raise RefusedError("A parenthesis is not closed.")
        return value, place + 1
    if token == "":
        raise RefusedError("The entry ends where a number is expected.")
    raise RefusedError(f"A number is expected before “{token}”.")
