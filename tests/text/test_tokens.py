"""Entries split into numbers and signs."""

from decimal import Decimal

import pytest

from workbench.text.locale import LOCALES
from workbench.text.tokens import RefusedError, split_entry

US = LOCALES["en-US"]


def test_suffixes_and_powers_are_in_the_numbers() -> None:
    assert split_entry("1.2m*(3-4%)", US) == (
        Decimal("1200000"), "*", "(", Decimal("3"), "-", Decimal("4"), "%", ")",
    )  # fmt: skip


def test_a_stranger_is_named() -> None:
    with pytest.raises(RefusedError, match="“#” is not part of a number"):
        split_entry("12#", US)
