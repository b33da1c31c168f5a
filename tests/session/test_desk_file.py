"""Opening, saving and what is kept safe in between."""

from pathlib import Path

import pytest
from pytestqt.qtbot import QtBot

from workbench.deal.fresh import new_deal
from workbench.files.deal_file import read_deal, write_deal
from workbench.places import sample_deals
from workbench.session import recovery
from workbench.session.desk_file import KEEP_AFTER, DeskFile
from workbench.session.session import Session

FLATS = sample_deals() / "quillon-court-flats.deal"


@pytest.fixture
def desk(qtbot: QtBot, tmp_path: Path) -> DeskFile:
    session = Session(new_deal())
    return DeskFile(session, tmp_path / "kept", session)


def session_of(desk: DeskFile) -> Session:
    session = desk.parent()
    assert isinstance(session, Session)
    return session


def test_save_and_open_again(desk: DeskFile, tmp_path: Path) -> None:
    session = session_of(desk)
    assert desk.open(FLATS)
    session.set("leave.hold", 7, "hold")
    target = tmp_path / "mine.deal"
    assert desk.save(target)
    assert (desk.path, session.modified) == (target, False)
    assert read_deal(target) == session.deal
    session.set("leave.hold", 8, "hold")
    assert desk.save()
    assert read_deal(target).leave.hold == 8


def test_what_cannot_be_read_leaves_the_open_deal(desk: DeskFile, tmp_path: Path) -> None:
    said: list[str] = []
    desk.troubled.connect(said.append)
    desk.open(FLATS)
    bad = tmp_path / "bad.deal"
    bad.write_text("{", "utf-8")
    assert not desk.open(bad)
    assert not desk.open(tmp_path / "none.deal")
    assert session_of(desk).deal == read_deal(FLATS)
    assert "bad.deal was not opened" in said[0]
    assert bad.read_text("utf-8") == "{"


def test_a_failed_save_is_told_and_the_old_file_stands(desk: DeskFile, tmp_path: Path) -> None:
    said: list[str] = []
    desk.troubled.connect(said.append)
    desk.open(FLATS)
    assert not desk.save(tmp_path / "no-such-folder" / "x.deal")
    assert "x.deal was not saved" in said[0]
    assert not DeskFile(Session(new_deal()), tmp_path).save()


def test_unsaved_work_is_kept_within_two_seconds(
    desk: DeskFile, qtbot: QtBot, tmp_path: Path
) -> None:
    assert KEEP_AFTER <= 2000
    session = session_of(desk)
    target = tmp_path / "mine.deal"
    write_deal(target, read_deal(FLATS))
    desk.open(target)
    session.set("leave.hold", 7, "hold")
    qtbot.waitUntil(lambda: bool(recovery.left_behind(tmp_path / "kept")), timeout=4000)
    (found,) = recovery.left_behind(tmp_path / "kept")
    assert (found.path, found.deal.leave.hold) == (target, 7)
    assert read_deal(target).leave.hold == read_deal(FLATS).leave.hold
    again = Session(new_deal())
    other = DeskFile(again, tmp_path / "kept", again)
    other.take_up(found)
    assert again.deal == session.deal
    assert again.modified
    assert other.save()
    assert recovery.left_behind(tmp_path / "kept") == []


def test_saving_and_undoing_forget_the_recovery_file(desk: DeskFile, tmp_path: Path) -> None:
    session = session_of(desk)
    desk.open(FLATS)
    session.set("leave.hold", 7, "hold")
    desk.keep_now()
    assert recovery.left_behind(tmp_path / "kept")
    session.undo()
    desk.keep_now()
    assert recovery.left_behind(tmp_path / "kept") == []


def test_a_file_changed_by_others_is_noticed(desk: DeskFile, tmp_path: Path) -> None:
    target = tmp_path / "mine.deal"
    desk.open(FLATS)
    desk.save(target)
    assert not desk.changed_by_others()
    target.write_text(target.read_text("utf-8") + "\n", "utf-8")
    assert desk.changed_by_others()
    target.unlink()
    assert desk.changed_by_others()
    desk.new()
    assert not desk.changed_by_others()
    assert session_of(desk).deal == new_deal()


def test_a_broken_recovery_file_is_passed_over(tmp_path: Path) -> None:
    recovery.keep(tmp_path, None, read_deal(FLATS))
    for name, text in (("a", "{"), ("b", "{}"), ("c", "[]"), ("d", '{"path": null, "deal": {}}')):
        (tmp_path / f"{name}.recovery").write_text(text, "utf-8")
    assert [one.path for one in recovery.left_behind(tmp_path)] == [None]
