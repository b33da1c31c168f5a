"""JSON text to plain data, refusing what the standard leaves open and what no deal can hold."""

import json
from collections.abc import Iterator
from dataclasses import dataclass
from math import isfinite
from typing import Any

from workbench.files.faults import Fault, UnreadableError
from workbench.files.located import Location, allowed_at, place_of
from workbench.text.excerpt import excerpt

DEEPEST = 60
"""Levels of braces and brackets; a deal has about ten."""

_DIGITS = 300
"""The most digits of a whole number; a float reaches about as far."""


def parse(text: str) -> Any:
    """Plain data. Raises UnreadableError with the place of each fault."""
    raw = read_json(text)
    faults = tuple(unfit(raw))
    if faults:
        raise UnreadableError(*faults)
    return raw


def read_json(text: str) -> Any:
    """Plain data, with marks that `unfit` finds. Raises UnreadableError where it is not JSON."""
    if not text.strip():
        raise UnreadableError(Fault("", "this is not a deal: it is empty"))
    try:
        return json.loads(
            text,
            object_pairs_hook=_once,
            parse_constant=_not_held,
            parse_int=_whole,
            parse_float=_decimal,
        )
    except json.JSONDecodeError as error:
        place = f"line {error.lineno}, column {error.colno}"
        message = f"{error.msg[0].lower()}{error.msg[1:]}"
        raise UnreadableError(Fault(place, f"this is not JSON: {message}")) from None
    except RecursionError:
        raise UnreadableError(Fault("", "this is not a deal: it is nested too deep")) from None


def unfit(raw: Any) -> Iterator[Fault]:
    """What no deal can hold, each at its key path."""
    for location, sentence in _unfit(raw, ()):
        yield Fault(place_of(raw, location), sentence)


@dataclass(frozen=True)
class _Mark:
    """Stands in the data in place of something that no deal can hold."""

    sentence: str


def _once(pairs: list[tuple[str, Any]]) -> dict[str, Any] | _Mark:
    held: dict[str, Any] = {}
    for key, value in pairs:
        if key in held:
            return _Mark(f"the key “{excerpt(key)}” stands twice here; keep one of them")
        held[key] = value
    return held


def _not_held(number: str) -> _Mark:
    return _Mark(f"{excerpt(number)} is not a number that a deal can hold")


def _whole(digits: str) -> int | _Mark:
    return int(digits) if len(digits) <= _DIGITS else _not_held(digits)


def _decimal(text: str) -> float | _Mark:
    number = float(text)
    return number if isfinite(number) else _not_held(text)


def _unfit(raw: Any, location: Location) -> Iterator[tuple[Location, str]]:
    if isinstance(raw, _Mark):
        yield location, f"{raw.sentence}{allowed_at(location)}"
    elif isinstance(raw, str) and _is_broken(raw):
        yield location, "this text holds half a character, which no file can hold"
    elif isinstance(raw, dict | list) and len(location) >= DEEPEST:
        yield location[:3], "this is nested too deep"
    elif isinstance(raw, dict):
        for key, held in raw.items():
            if _is_broken(key):
                yield location, "a key here holds half a character, which no file can hold"
            yield from _unfit(held, (*location, key))
    elif isinstance(raw, list):
        for position, held in enumerate(raw):
            yield from _unfit(held, (*location, position))


def _is_broken(text: str) -> bool:
    """Whether the text holds a lone surrogate, as an escape like `\\ud800` can bring in."""
    return any("\ud800" <= one <= "\udfff" for one in text)
