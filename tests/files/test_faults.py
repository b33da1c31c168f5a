"""A fault as a line, and what the system says about a file."""

import errno
import os

import pytest

from workbench.files.faults import Fault, UnreadableError, system_fault


def test_a_fault_names_its_place_where_it_has_one() -> None:
    assert str(Fault("leave.hold", "it is odd")) == "leave.hold: it is odd"
    assert str(Fault("", "it is odd")) == "it is odd"


def test_an_error_carries_every_fault() -> None:
    error = UnreadableError(Fault("a", "one"), Fault("", "two"))
    assert [fault.place for fault in error.faults] == ["a", ""]
    assert str(error) == "a: one\ntwo"


@pytest.mark.parametrize(
    ("error", "said"),
    [
        (OSError(errno.ENOENT, os.strerror(errno.ENOENT), "a.deal"), "no such file or directory"),
        (OSError("The folder is missing"), "the folder is missing"),
        (OSError(), "it cannot be used"),
    ],
)
def test_what_the_system_says_is_put_as_a_fault(error: OSError, said: str) -> None:
    assert system_fault(error) == Fault("", said)
