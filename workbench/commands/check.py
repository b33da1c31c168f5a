"""`groundcourse check`: what is wrong in a deal, if anything."""

import argparse

from workbench.commands.terms import FINE, add_deal, open_deal, say_issues, shown_name

SUMMARY = "say what is wrong in a deal, if anything"


def add_arguments(parser: argparse.ArgumentParser) -> None:
    add_deal(parser)


def run(arguments: argparse.Namespace) -> int:
    status = say_issues(open_deal(arguments))
    if status == FINE:
        print(f"{shown_name(arguments.deal)}: no issues found")
    return status
