"""What the commands share: opening a deal with its `--set` changes, and how they end."""

import argparse
import sys
from pathlib import Path

from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.files.deal_file import read_deal
from workbench.files.entries import with_entries
from workbench.files.faults import UnreadableError, system_fault
from workbench.text.excerpt import excerpt
from workbench.text.messages import word_issue

FINE, ISSUES, UNUSABLE = 0, 1, 2
"""Exit status: all is well; the deal has issues; it cannot be read or used."""


def add_deal(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("deal", type=Path, help="the deal file")
    parser.add_argument(
        "--set",
        dest="entries",
        metavar="KEY=VALUE",
        action="append",
        default=[],
        help="change an input before computing, as in earn.vacancy.3=7%%; may be repeated",
    )


def open_deal(arguments: argparse.Namespace) -> Deal:
    """The deal of a command line. Raises UnreadableError."""
    return with_entries(read_deal(arguments.deal), arguments.entries)


def say_issues(deal: Deal) -> int:
    """Every issue on stderr, a line each; the exit status that follows."""
    issues = check(deal)
    for issue in issues:
        print(f"{issue.path}: {word_issue(deal, issue)}", file=sys.stderr)
    return ISSUES if issues else FINE


def say_fault(name: object, error: UnreadableError | OSError) -> int:
    """What went wrong with a file, on stderr."""
    faults = error.faults if isinstance(error, UnreadableError) else (system_fault(error),)
    for fault in faults:
        print(f"{shown_name(name)}: {fault}", file=sys.stderr)
    return UNUSABLE


def shown_name(name: object) -> str:
    """A file's name as a line can hold it."""
    return excerpt(str(name), 200)
