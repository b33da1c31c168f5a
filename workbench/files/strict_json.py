"""JSON text to plain data, refusing what the standard leaves open: duplicate keys and NaN."""

import json
from typing import Any

from workbench.files.faults import Fault, UnreadableError


def parse(text: str) -> Any:
    """Plain data. Raises UnreadableError with the place of the fault."""
    try:
        return json.loads(text, object_pairs_hook=_once, parse_constant=_refuse)
    except json.JSONDecodeError as error:
        place = f"line {error.lineno}, column {error.colno}"
        raise UnreadableError(Fault(place, f"this is not JSON: {error.msg}")) from None
    except RecursionError:
        raise UnreadableError(Fault("", "this is not a deal: it is nested too deep")) from None


def _once(pairs: list[tuple[str, Any]]) -> dict[str, Any]:
    held: dict[str, Any] = {}
    for key, value in pairs:
        if key in held:
            raise UnreadableError(
                Fault(key, f"the key “{key}” stands twice in one place; keep one of them")
            )
        held[key] = value
    return held


def _refuse(constant: str) -> Any:
    raise UnreadableError(Fault("", f"{constant} is not a number that a deal can hold"))
