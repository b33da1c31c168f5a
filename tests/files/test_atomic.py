"""Writing: at every moment either the old file or the new one is whole."""

import os
import stat
import threading
from dataclasses import replace
from pathlib import Path
from typing import Any

import pytest

from tests.fullest import fullest, small
from workbench.files.atomic import write_atomically
from workbench.files.deal_file import deal_to_text, read_deal, write_deal


class KilledError(BaseException):
    """Stands for the end of the process between two steps."""


def only(folder: Path) -> list[str]:
    return sorted(path.name for path in folder.iterdir())


def kill_at(monkeypatch: pytest.MonkeyPatch, owner: Any, name: str, error: BaseException) -> None:
    def fail(*_: Any, **__: Any) -> None:
        raise error

    monkeypatch.setattr(owner, name, fail)


def test_a_new_file(tmp_path: Path) -> None:
    target = tmp_path / "new.deal"
    write_atomically(target, b"data")
    assert target.read_bytes() == b"data"
    assert only(tmp_path) == ["new.deal"]


def test_an_old_file_is_replaced(tmp_path: Path) -> None:
    target = tmp_path / "old.deal"
    target.write_bytes(b"a much longer text than the new one")
    write_atomically(target, b"new")
    assert target.read_bytes() == b"new"
    assert only(tmp_path) == ["old.deal"]


STEPS = [
    ("os.fdopen", os, "fdopen"),
    ("os.fsync", os, "fsync"),
    ("chmod", Path, "chmod"),
    ("replace", Path, "replace"),
]


@pytest.mark.parametrize(("owner", "name"), [step[1:] for step in STEPS], ids=lambda one: str(one))
@pytest.mark.parametrize("error", [OSError(28, "No space left on device"), KilledError()])
def test_killed_between_two_steps_the_old_file_stands(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, owner: Any, name: str, error: BaseException
) -> None:
    target = tmp_path / "my.deal"
    write_deal(target, small())
    kill_at(monkeypatch, owner, name, error)
    with pytest.raises(type(error)):
        write_deal(target, fullest())
    monkeypatch.undo()
    assert read_deal(target) == small()
    assert only(tmp_path) == ["my.deal"]


@pytest.mark.parametrize("error", [OSError(5, "Input/output error"), KilledError()])
def test_killed_while_the_data_is_written_the_old_file_stands(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, error: BaseException
) -> None:
    """Half of the data has reached the temporary file by then."""
    target = tmp_path / "my.deal"
    write_deal(target, small())
    real = os.fdopen

    def opened(*words: Any) -> Any:
        file = real(*words)
        write = file.write

        class Half:
            def __enter__(self) -> "Half":
                return self

            def __exit__(self, *_: Any) -> None:
                file.close()

            def write(self, data: bytes) -> None:
                write(data[: len(data) // 2])
                raise error

        return Half()

    monkeypatch.setattr(os, "fdopen", opened)
    with pytest.raises(type(error)):
        write_deal(target, fullest())
    monkeypatch.undo()
    assert read_deal(target) == small()
    assert only(tmp_path) == ["my.deal"]


def test_a_folder_that_cannot_be_flushed_is_no_failure(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    """The new file is whole by then; some file systems cannot flush a folder."""
    target = tmp_path / "my.deal"
    write_deal(target, small())
    real, calls = os.fsync, []

    def second_fails(handle: int) -> None:
        calls.append(handle)
        if len(calls) == 2:
            raise OSError(22, "Invalid argument")
        real(handle)

    monkeypatch.setattr(os, "fsync", second_fails)
    write_deal(target, fullest())
    assert len(calls) == 2
    assert read_deal(target) == fullest()


def test_a_system_without_handles_of_folders(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    monkeypatch.delattr(os, "O_DIRECTORY")
    write_atomically(tmp_path / "my.deal", b"data")
    assert (tmp_path / "my.deal").read_bytes() == b"data"


def test_the_data_is_flushed_before_it_replaces(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    order: list[str] = []
    fsync, moved = os.fsync, Path.replace

    def flush(handle: int) -> None:
        order.append("flush")
        fsync(handle)

    def move(part: Path, target: Path) -> Path:
        order.append("replace")
        return moved(part, target)

    monkeypatch.setattr(os, "fsync", flush)
    monkeypatch.setattr(Path, "replace", move)
    write_atomically(tmp_path / "my.deal", b"data")
    assert order == ["flush", "replace", "flush"]


@pytest.mark.parametrize("mode", [0o600, 0o640, 0o664])
def test_permissions_stay(tmp_path: Path, mode: int) -> None:
    target = tmp_path / "my.deal"
    target.write_bytes(b"old")
    target.chmod(mode)
    write_atomically(target, b"new")
    assert stat.S_IMODE(target.stat().st_mode) == mode


def test_a_new_file_has_the_permissions_of_any_new_file(tmp_path: Path) -> None:
    (tmp_path / "usual").write_bytes(b"")
    before = os.umask(0o022)
    os.umask(before)
    write_atomically(tmp_path / "new", b"")
    usual, new = ((tmp_path / name).stat().st_mode for name in ("usual", "new"))
    assert usual == new
    after = os.umask(before)
    assert after == before


def test_a_link_keeps_pointing(tmp_path: Path) -> None:
    target, link = tmp_path / "real.deal", tmp_path / "link.deal"
    target.write_bytes(b"old")
    link.symlink_to(target)
    write_atomically(link, b"new")
    assert link.is_symlink()
    assert target.read_bytes() == b"new"


def test_a_link_that_leads_to_itself_is_replaced(tmp_path: Path) -> None:
    link = tmp_path / "loop"
    link.symlink_to(link)
    write_atomically(link, b"new")
    assert link.read_bytes() == b"new"


def test_a_name_of_the_greatest_length(tmp_path: Path) -> None:
    target = tmp_path / ("n" * 255)
    write_atomically(target, b"data")
    assert only(tmp_path) == ["n" * 255]


def test_a_pipe_is_written_to_and_not_replaced(tmp_path: Path) -> None:
    pipe = tmp_path / "pipe"
    os.mkfifo(pipe)
    got: list[bytes] = []
    reader = threading.Thread(target=lambda: got.append(pipe.read_bytes()))
    reader.start()
    write_atomically(pipe, b"data")
    reader.join(10)
    assert got == [b"data"]
    assert stat.S_ISFIFO(pipe.stat().st_mode)


@pytest.mark.parametrize(
    ("name", "error"),
    [("folder", IsADirectoryError), ("nowhere/my.deal", FileNotFoundError), ("a/b", OSError)],
)
def test_what_cannot_be_written_is_an_error_of_the_system(
    tmp_path: Path, name: str, error: type[OSError]
) -> None:
    (tmp_path / "folder").mkdir()
    (tmp_path / "a").write_bytes(b"a file where a folder is wanted")
    before = only(tmp_path)
    with pytest.raises(error):
        write_atomically(tmp_path / name, b"data")
    assert only(tmp_path) == before


def test_what_cannot_be_put_as_text_leaves_the_old_file(tmp_path: Path) -> None:
    target = tmp_path / "my.deal"
    write_deal(target, small())
    broken = replace(small(), purchase=replace(small().purchase, price=float("nan")))
    with pytest.raises(ValueError, match="not JSON compliant"):
        write_deal(target, broken)
    assert target.read_text(encoding="utf-8") == deal_to_text(small())
