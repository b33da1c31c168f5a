"""The command line as a whole: exit statuses, words for every way it can go wrong."""

import errno
import json
import os
import subprocess
import sys
from collections.abc import Mapping
from pathlib import Path
from typing import IO

import pytest

from tests.commands.running import run
from tests.fullest import FULLEST, fullest_raw, small_raw
from workbench import __main__ as program
from workbench import __version__
from workbench.__main__ import COMMANDS, main
from workbench.places import sample_deals

FLATS = sample_deals() / "quillon-court-flats.deal"

NESTED = '{"a":' * 200 + "1" + "}" * 200
PYTHON = [sys.executable, "-m", "workbench"]


@pytest.fixture
def deal(tmp_path: Path) -> Path:
    path = tmp_path / "my.deal"
    path.write_text(json.dumps(FULLEST), encoding="utf-8")
    return path


def words_of(command: str, deal: Path) -> list[str]:
    """What a command needs beside the deal."""
    more = {"document": [str(deal.with_name("out.pdf"))], "working": ["value"]}
    return [command, str(deal), *more.get(command, [])]


@pytest.mark.parametrize("command", COMMANDS)
def test_a_sound_deal_is_fine(capsys: pytest.CaptureFixture[str], deal: Path, command: str) -> None:
    ran = run(capsys, *words_of(command, deal))
    assert (ran.status, ran.err) == (0, "")


@pytest.mark.parametrize("command", ["figures", "document", "check"])
def test_a_deal_with_an_issue_is_said_to_have_one(
    capsys: pytest.CaptureFixture[str], deal: Path, command: str
) -> None:
    ran = run(capsys, *words_of(command, deal), "--set", "leave.hold=99")
    assert ran.status == 1
    assert ran.err == "leave.hold: Hold: 99 is not allowed; it must be from 1 to 40\n"


@pytest.mark.parametrize(
    ("data", "said"),
    [
        (b"", "this is not a deal: it is empty"),
        (b"\x89PNG\r\n\x1a\n\x00\xff", "this is not a deal: it is not UTF-8 text"),
        (b"PK\x03\x04", "line 1, column 1: this is not JSON: expecting value"),
        (b'{"schema": 1,}', "line 1, column 14: this is not JSON: expecting property name"),
        (b"[1, 2]", "a deal is a JSON object in braces"),
        (b"{}", "schema: the version of the schema is needed here; it must be 1"),
        (b'{"schema": 9}', "schema: this deal was written by a newer program (schema 9"),
        (b'{"schema": NaN}', "schema: NaN is not a number that a deal can hold"),
        (
            b'{"schema": 1, "leave": {"hold": 1e400}}',
            "leave.hold: 1e400 is not a number that a deal can hold; it must be from 1 to 40",
        ),
        (
            b'{"schema": 1, "property": {"name": "\\ud800"}}',
            "property.name: this text holds half a character",
        ),
        (b"[" * 100_000, "this is not a deal: it is nested too deep"),
        (NESTED.encode(), "a.a.a: this is nested too deep"),
        (b'{"schema": 1, "tax": {}}', "tax: a deal has no such key"),
        (b'{"schema": 1, "schema": 1}', "the key “schema” stands twice here"),
        (
            b'{"schema": 1, "next_id": ' + b"9" * 5000 + b"}",
            "next_id: " + "9" * 59 + "… is not a number that a deal can hold",
        ),
    ],
)
@pytest.mark.parametrize("command", COMMANDS)
def test_a_file_that_cannot_be_read_says_why(
    capsys: pytest.CaptureFixture[str], deal: Path, command: str, data: bytes, said: str
) -> None:
    deal.write_bytes(data)
    ran = run(capsys, *words_of(command, deal))
    assert (ran.status, ran.out) == (2, "")
    assert ran.err.startswith(f"{deal}: {said}")
    assert ran.err.count("\n") == 1
    assert deal.read_bytes() == data
    assert not deal.with_name("out.pdf").exists()


@pytest.mark.parametrize("command", COMMANDS)
def test_a_file_that_is_not_there(
    capsys: pytest.CaptureFixture[str], tmp_path: Path, command: str
) -> None:
    ran = run(capsys, *words_of(command, tmp_path / "none.deal"))
    assert (ran.status, ran.out) == (2, "")
    assert ran.err == f"{tmp_path / 'none.deal'}: no such file or directory\n"


@pytest.mark.parametrize("command", ["figures", "check", "working"])
def test_a_folder_is_no_deal(
    capsys: pytest.CaptureFixture[str], tmp_path: Path, command: str
) -> None:
    ran = run(capsys, *words_of(command, tmp_path))
    assert (ran.status, ran.err) == (2, f"{tmp_path}: is a directory\n")


@pytest.mark.skipif(os.name != "posix" or os.geteuid() == 0, reason="root reads everything")
def test_a_file_that_may_not_be_read(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    deal.chmod(0)
    ran = run(capsys, "check", deal)
    assert (ran.status, ran.err) == (2, f"{deal}: permission denied\n")


def test_every_fault_has_a_line(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    raw = fullest_raw()
    raw["leave"]["hold"] = "ten"
    raw["purchase"]["price"] = None
    raw["spaces"][0]["count"] = 1.5
    deal.write_text(json.dumps(raw))
    ran = run(capsys, "check", deal)
    assert ran.status == 2
    assert [line.split(": ")[1] for line in ran.err.splitlines()] == [
        "spaces@s1.count", "leave.hold",
    ]  # fmt: skip


def test_every_issue_has_a_line(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    raw = small_raw()
    raw["spaces"][0]["name"] = "two\nlines\x1b[31m"
    raw["spaces"][0]["count"] = None
    raw["leave"]["hold"] = None
    deal.write_text(json.dumps(raw))
    ran = run(capsys, "check", deal)
    assert ran.status == 1
    assert sorted(ran.err.splitlines()) == [
        "leave.hold: Hold: a value from 1 to 40 is needed",
        "spaces@s1.count: Units of space s1 “two lines [31m”: a value from 1 to 100,000 is needed",
    ]


def test_a_file_name_can_neither_break_nor_steer_a_line(
    capsys: pytest.CaptureFixture[str], tmp_path: Path
) -> None:
    ran = run(capsys, "check", tmp_path / "two\nlines\x1b[31m.deal")
    assert ran.err == f"{tmp_path}/two lines [31m.deal: no such file or directory\n"


@pytest.mark.parametrize(
    ("words", "said"),
    [
        (["value"], "value: there is no such deal file, and no such command (figures, "),
        (["value", "my.deal"], "invalid choice: 'value'"),
        (["figures"], "the following arguments are required: deal"),
        (["document", "my.deal"], "the following arguments are required: OUT.pdf"),
        (["check", "my.deal", "other.deal"], "unrecognized arguments: other.deal"),
        (["check", "my.deal", "--loud"], "unrecognized arguments: --loud"),
        (["check", "my.deal", "--json"], "unrecognized arguments: --json"),
        (["check", "my.deal", "--set"], "argument --set: expected one argument"),
        (["document", "my.deal", "o.pdf", "--paper", "a3"], "invalid choice: 'a3'"),
    ],
)
def test_a_line_that_is_not_understood(
    capsys: pytest.CaptureFixture[str], words: list[str], said: str
) -> None:
    ran = run(capsys, *words)
    assert (ran.status, ran.out) == (2, "")
    assert said in ran.err


@pytest.mark.parametrize("words", [[], [str(FLATS)]])
def test_without_a_display_the_window_says_so(
    capsys: pytest.CaptureFixture[str], monkeypatch: pytest.MonkeyPatch, words: list[str]
) -> None:
    for name in ("DISPLAY", "WAYLAND_DISPLAY", "QT_QPA_PLATFORM"):
        monkeypatch.delenv(name, raising=False)
    monkeypatch.setattr("sys.platform", "linux")
    ran = run(capsys, *words)
    assert (ran.status, ran.out) == (2, "")
    assert "there is no display to open a window on" in ran.err


@pytest.mark.parametrize("words", [["--help"], *([command, "--help"] for command in COMMANDS)])
def test_help_is_fine(capsys: pytest.CaptureFixture[str], words: list[str]) -> None:
    ran = run(capsys, *words)
    assert (ran.status, ran.err) == (0, "")
    assert "usage: groundcourse" in ran.out


def test_help_says_what_the_figures_are_not(capsys: pytest.CaptureFixture[str]) -> None:
    out = " ".join(run(capsys, "--help").out.split())
    assert "not an appraisal and not investment advice" in out
    assert all(command in out for command in COMMANDS)


def test_version(capsys: pytest.CaptureFixture[str]) -> None:
    assert run(capsys, "--version").out == f"groundcourse {__version__}\n"


# In a process of its own, for what is about its streams


def process(
    *words: object,
    stdout: int | IO[bytes] = subprocess.PIPE,
    env: Mapping[str, str] | None = None,
) -> subprocess.CompletedProcess[bytes]:
    line = [*PYTHON, *map(str, words)]
    return subprocess.run(
        line, stdout=stdout, stderr=subprocess.PIPE, env=env, check=False, timeout=60
    )


def test_it_runs_as_a_module(deal: Path) -> None:
    done = process("check", deal)
    assert (done.returncode, done.stderr) == (0, b"")
    assert done.stdout.decode() == f"{deal}: no issues found\n"


@pytest.mark.parametrize("encoding", ["ascii", "latin-1", "cp1252"])
def test_what_is_piped_is_utf_8_whatever_the_terminal(deal: Path, encoding: str) -> None:
    raw = fullest_raw()
    raw["property"]["name"] = "Ωμέγα 🏠"
    raw["leave"]["hold"] = None
    deal.write_text(json.dumps(raw))
    environment = {**os.environ, "PYTHONIOENCODING": encoding}
    done = process("figures", deal, "--json", env=environment)
    assert done.returncode == 1
    assert json.loads(done.stdout.decode("utf-8"))["value"] is None
    done = process("figures", deal, env=environment)
    assert done.stdout.decode("utf-8").startswith("Ωμέγα 🏠\n")


def test_a_file_name_that_is_no_text(tmp_path: Path) -> None:
    path = Path(os.fsdecode(bytes(tmp_path) + b"/na\xffme.deal"))
    path.write_text(json.dumps(FULLEST), encoding="utf-8")
    done = process("check", path)
    assert (done.returncode, done.stderr) == (0, b"")
    assert done.stdout.decode().endswith("na\ufffdme.deal: no issues found\n")


@pytest.mark.skipif(not Path("/dev/full").exists(), reason="no device that is always full")
@pytest.mark.parametrize("words", [[], ["--json"]])
def test_output_that_cannot_be_written(deal: Path, words: list[str]) -> None:
    with Path("/dev/full").open("wb") as full:
        done = process("figures", deal, *words, stdout=full)
    assert done.returncode == 2
    assert done.stderr == b"standard output: no space left on device\n"


def test_a_reader_who_has_had_enough(deal: Path) -> None:
    reading, writing = os.pipe()
    os.close(reading)
    done = process("figures", deal, "--json", stdout=writing)
    os.close(writing)
    assert (done.returncode, done.stderr) == (0, b"")


@pytest.mark.skipif(os.name != "posix", reason="closes streams by number")
@pytest.mark.parametrize("stream", [1, 2])
def test_a_stream_that_is_closed(deal: Path, stream: int) -> None:
    line = f'"$@" {stream}>&-'
    words = [*PYTHON, "figures", str(deal), "--set", "leave.hold=99"]
    done = subprocess.run(
        ["sh", "-c", line, "sh", *words], capture_output=True, check=False, timeout=60
    )
    assert done.returncode == 1
    assert b"Traceback" not in done.stdout + done.stderr


# What only a broken installation or a break-off can bring about


def test_a_missing_part_of_the_program_is_named(
    capsys: pytest.CaptureFixture[str], deal: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def fail(_: object) -> int:
        raise FileNotFoundError(errno.ENOENT, os.strerror(errno.ENOENT), "font.ttf")

    monkeypatch.setattr("workbench.commands.check.run", fail)
    monkeypatch.setattr(program, "_let_go_of_output", lambda: None)
    ran = run(capsys, "check", deal)
    assert (ran.status, ran.err) == (2, "font.ttf: no such file or directory\n")


def test_breaking_off_leaves_no_trace(
    capsys: pytest.CaptureFixture[str], deal: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def stop(_: object) -> int:
        raise KeyboardInterrupt

    monkeypatch.setattr("workbench.commands.check.run", stop)
    ran = run(capsys, "check", deal)
    assert (ran.status, ran.out, ran.err) == (2, "", "stopped\n")


def test_a_fault_of_the_program_itself_is_not_hidden(
    deal: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    def fail(_: object) -> int:
        raise ZeroDivisionError

    monkeypatch.setattr("workbench.commands.check.run", fail)
    with pytest.raises(ZeroDivisionError):
        main(["check", str(deal)])
