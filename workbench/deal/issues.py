"""An issue is a place in the deal, what is wrong there, and the range that would be right."""

from collections.abc import Mapping
from dataclasses import dataclass, field
from typing import Any


@dataclass(frozen=True)
class Issue:
    """`path` names the input, `code` the kind of fault; `text` puts it into words.

    `value`, `low` and `high` are in the input's own unit. `other` holds what else the sentence
    names, such as the path of a second input.
    """

    path: str
    code: str
    value: Any = None
    low: float | None = None
    high: float | None = None
    other: Mapping[str, Any] = field(default_factory=dict)
