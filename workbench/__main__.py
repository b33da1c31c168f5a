"""The command line: reads the arguments and hands them to one command."""

import argparse
import importlib
import os
import sys
from collections.abc import Sequence
from io import StringIO, TextIOWrapper
from pathlib import Path

from workbench import __version__

COMMANDS = ("figures", "document", "check", "working")


def parser() -> argparse.ArgumentParser:
    """The whole command line; each command declares its own arguments."""
    whole = argparse.ArgumentParser(
        prog="groundcourse",
        usage="groundcourse [DEAL] | groundcourse COMMAND …",
        description="Underwriting of one income property. Without a command the window opens, on "
        "the deal named or on a new one. Arithmetic on your assumptions; not an appraisal and not "
        "investment advice.",
    )
    whole.add_argument("--version", action="version", version=f"groundcourse {__version__}")
    commands = whole.add_subparsers(dest="command", required=True, metavar="COMMAND")
    for name in COMMANDS:
        module = importlib.import_module(f"workbench.commands.{name}")
        one = commands.add_parser(name, help=module.SUMMARY, description=module.SUMMARY)
        module.add_arguments(one)
    return whole


def main(words: Sequence[str] | None = None) -> int:
    """Run one command; the exit status is 0 fine, 1 issues in the deal, 2 cannot be used."""
    os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")
    _prepare_streams()
    given = list(sys.argv[1:] if words is None else words)
    if not given or (len(given) == 1 and given[0] not in COMMANDS and given[0][0:1] != "-"):
        return open_window(*map(Path, given))
    arguments = parser().parse_args(given)
    module = importlib.import_module(f"workbench.commands.{arguments.command}")
    from workbench.commands.terms import say_fault
    from workbench.files.faults import UnreadableError

    try:
        status = module.run(arguments)
        sys.stdout.flush()
        return int(status)
    except UnreadableError as error:
        return say_fault(arguments.deal, error)
    except BrokenPipeError:  # whoever read the output has had enough
        _let_go_of_output()
        return 0
    except KeyboardInterrupt:
        print("stopped", file=sys.stderr)
        return 2
    except OSError as error:
        _let_go_of_output()
        return say_fault(error.filename or "standard output", error)


def open_window(path: Path | None = None) -> int:
    """Open the window, on a deal if one is named; Qt is loaded only here."""
    if path is not None and not path.is_file():
        known = ", ".join(COMMANDS)
        print(f"{path}: there is no such deal file, and no such command ({known})", file=sys.stderr)
        return 2
    display = os.environ.get("DISPLAY") or os.environ.get("WAYLAND_DISPLAY")
    own = sys.platform in ("win32", "darwin") or os.environ.get("QT_QPA_PLATFORM")
    if not (display or own):
        print(
            "there is no display to open a window on; figures, check, document and working do "
            "without one: groundcourse --help",
            file=sys.stderr,
        )
        return 2
    from workbench.ui.start import start

    return start(path)


def _prepare_streams() -> None:
    """No name or text can stop the output: UTF-8 where it is piped, signs for what lacks a code."""
    for name in ("stdout", "stderr"):
        stream: object = getattr(sys, name)
        if stream is None:  # closed by whoever started the program
            setattr(sys, name, StringIO())
        elif isinstance(stream, TextIOWrapper):
            stream.reconfigure(
                encoding=None if stream.isatty() else "utf-8", errors="backslashreplace"
            )


def _let_go_of_output() -> None:
    """Lead the output nowhere, so that Python does not fail on it again on the way out."""
    os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())


if __name__ == "__main__":
    sys.exit(main())
