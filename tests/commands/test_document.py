"""`document`: writes the memo whole or not at all, and never over the deal."""

import json
import os
from io import BytesIO
from pathlib import Path

import pytest
from pypdf import PdfReader

from tests.commands.running import run
from tests.fullest import FULLEST, fullest_raw


@pytest.fixture
def deal(tmp_path: Path) -> Path:
    path = tmp_path / "my.deal"
    path.write_text(json.dumps(FULLEST), encoding="utf-8")
    return path


def size(data: bytes) -> tuple[int, int]:
    box = PdfReader(BytesIO(data)).pages[0].mediabox
    return round(box.width), round(box.height)


def test_the_memo_is_written(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    out = deal.with_name("memo.pdf")
    ran = run(capsys, "document", deal, out)
    assert (ran.status, ran.out, ran.err) == (0, "", "")
    assert out.read_bytes().startswith(b"%PDF-")
    text = PdfReader(out).pages[0].extract_text()
    assert "Sailmaker's corner" in text


def test_the_paper_may_be_chosen(capsys: pytest.CaptureFixture[str], deal: Path) -> None:
    out = deal.with_name("memo.pdf")
    sizes = []
    for words in ([], ["--paper", "a4"], ["--paper", "letter"]):
        run(capsys, "document", deal, out, *words)
        sizes.append(size(out.read_bytes()))
    assert sizes == [(612, 792), (595, 842), (612, 792)]


def test_a_deal_with_issues_has_a_memo_all_the_same(
    capsys: pytest.CaptureFixture[str], deal: Path
) -> None:
    out = deal.with_name("memo.pdf")
    ran = run(capsys, "document", deal, out, "--set", "leave.hold=null")
    assert (ran.status, ran.out) == (1, "")
    assert ran.err == "leave.hold: Hold: a value from 1 to 40 is needed\n"
    assert out.read_bytes().startswith(b"%PDF-")


def test_characters_that_the_font_lacks_are_named(
    capsys: pytest.CaptureFixture[str], deal: Path
) -> None:
    raw = fullest_raw()
    raw["property"]["name"] = "House 日本"
    deal.write_text(json.dumps(raw))
    ran = run(capsys, "document", deal, deal.with_name("memo.pdf"))
    assert ran.status == 0
    assert ran.err.startswith(f"{deal}: printed as a mark, since the font lacks them: ")
    assert "日" in ran.err and "本" in ran.err


@pytest.mark.parametrize(
    ("name", "said"),
    [
        ("nowhere/memo.pdf", "no such file or directory"),
        (".", "is a directory"),
        ("my.deal/memo.pdf", "not a directory"),
        ("x" * 300, "file name too long"),
    ],
)
def test_where_it_cannot_be_written(
    capsys: pytest.CaptureFixture[str], deal: Path, name: str, said: str
) -> None:
    out = deal.parent / name
    before = sorted(deal.parent.iterdir())
    ran = run(capsys, "document", deal, out)
    assert (ran.status, ran.out) == (2, "")
    shown = str(out) if len(str(out)) <= 200 else f"{str(out)[:199]}…"
    assert ran.err == f"{shown}: {said}\n"
    assert sorted(deal.parent.iterdir()) == before


@pytest.mark.parametrize("link", [False, True])
def test_the_deal_is_never_overwritten(
    capsys: pytest.CaptureFixture[str], deal: Path, link: bool
) -> None:
    out = deal
    if link:
        out = deal.with_name("link.pdf")
        out.symlink_to(deal)
    before = deal.read_bytes()
    ran = run(capsys, "document", deal, out)
    assert (ran.status, ran.out) == (2, "")
    assert ran.err == f"{out}: this is the deal file; name another file for the memo\n"
    assert deal.read_bytes() == before


def test_an_old_memo_stands_until_the_new_one_is_whole(
    capsys: pytest.CaptureFixture[str], deal: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    out = deal.with_name("memo.pdf")
    out.write_bytes(b"the memo of yesterday")

    def full(_: int) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(os, "fsync", full)
    ran = run(capsys, "document", deal, out)
    assert (ran.status, ran.err) == (2, f"{out}: no space left on device\n")
    assert out.read_bytes() == b"the memo of yesterday"
    assert {path.name for path in deal.parent.iterdir()} == {"my.deal", "memo.pdf"}
