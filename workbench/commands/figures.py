"""`groundcourse figures`: every figure of a deal, as text or as JSON."""

import argparse
import json
import sys

from workbench.commands.listing import listing
from workbench.commands.terms import add_deal, open_deal, say_issues
from workbench.report.record import record_of

SUMMARY = "print every figure of a deal"


def add_arguments(parser: argparse.ArgumentParser) -> None:
    add_deal(parser)
    parser.add_argument("--json", action="store_true", help="full precision, fixed keys")


def run(arguments: argparse.Namespace) -> int:
    deal = open_deal(arguments)
    figures = record_of(deal)
    if arguments.json:
        json.dump(figures, sys.stdout, indent=2, ensure_ascii=False, allow_nan=False)
        sys.stdout.write("\n")
    else:
        sys.stdout.write(listing(deal, figures))
    return say_issues(deal)
