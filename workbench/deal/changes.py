"""Changes: the only ways a deal becomes another deal."""

from typing import Any, cast

from workbench.deal.deal import Deal
from workbench.deal.paths import locate, put


def set_value(deal: Deal, path: str, value: Any) -> Deal:
    """The deal with one input changed; None in a year row lets that year follow again.

    Raises UnknownPathError where the deal has no such input.
    """
    return cast(Deal, put(deal, locate(deal, path), value))
