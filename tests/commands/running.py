"""Runs the program within the test, as from a command line."""

from dataclasses import dataclass

import pytest

from workbench.__main__ import main


@dataclass(frozen=True)
class Ran:
    status: int
    out: str
    err: str


def run(capsys: pytest.CaptureFixture[str], *words: object) -> Ran:
    """Exit status and output; argparse leaves by an exit of its own."""
    capsys.readouterr()
    try:
        status = main([str(word) for word in words])
    except SystemExit as left:
        assert isinstance(left.code, int)
        status = left.code
    said = capsys.readouterr()
    assert "Traceback" not in said.err
    return Ran(status, said.out, said.err)
