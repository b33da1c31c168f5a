"""The finished file, read back."""

from dataclasses import replace
from datetime import date
from io import BytesIO
from typing import Any

import pytest
from pypdf import PdfReader
from pypdf.generic import DictionaryObject

from tests.report.deals import DEAL, figures, opening, pages_of
from workbench.report.document import Document, Section, Subheading, plain
from workbench.report.pdf import draw
from workbench.text.locale import LOCALES

PLAIN = Document("Memo", "Title", "", "Author", "", "Foot.", (Section("", (plain("Body."),)),))


def embedded_fonts(reader: PdfReader) -> dict[str, Any]:
    """Base fonts of all pages with the embedded font file of each, None where there is none."""
    found: dict[str, Any] = {}
    for page in reader.pages:
        resources = page["/Resources"]
        assert isinstance(resources, DictionaryObject)
        fonts = resources["/Font"].get_object()
        assert isinstance(fonts, DictionaryObject)
        for reference in fonts.values():
            font = reference.get_object()
            descriptor = font.get("/FontDescriptor")
            file = descriptor.get_object().get("/FontFile2") if descriptor else None
            found[font["/BaseFont"]] = file
    return found


def test_only_the_shipped_font_is_used_embedded_and_subset() -> None:
    pdf = draw(opening(DEAL, figures(), LOCALES["en-GB"])).pdf
    fonts = embedded_fonts(PdfReader(BytesIO(pdf)))
    assert fonts
    for name, file in fonts.items():
        assert "Lato" in name
        assert "+" in name, "a subset has a tag before its name"
        assert file is not None
    assert len(pdf) < 150_000, "three whole fonts would be two million bytes"


def test_the_same_document_gives_the_same_bytes() -> None:
    document = opening(DEAL, figures(), LOCALES["en-GB"])
    assert draw(document).pdf == draw(document).pdf


def test_properties() -> None:
    reader = PdfReader(BytesIO(draw(PLAIN).pdf))
    assert reader.metadata is not None
    assert reader.metadata.title == "Memo: Title"
    assert reader.metadata.author == "Author"
    assert str(reader.root_object["/Lang"]) == "en"


def titles_and_pages(reader: PdfReader, outline: Any) -> list[Any]:
    return [
        titles_and_pages(reader, entry)
        if isinstance(entry, list)
        else (str(entry.title), reader.get_destination_page_number(entry))
        for entry in outline
    ]


def test_the_outline_has_sections_and_what_is_within_them() -> None:
    inner = (Subheading("Loan\nA"), plain("Body."), Subheading("Loan B"))
    last = Section("End", (plain("x"),), new_page=True)
    document = replace(PLAIN, sections=(Section("Loans", inner), last))
    reader = PdfReader(BytesIO(draw(document).pdf))
    assert titles_and_pages(reader, reader.outline) == [
        ("Memo", 0),
        ("Loans", 0),
        [("Loan A", 0), ("Loan B", 0)],
        ("End", 1),
    ]
    assert str(reader.root_object["/PageMode"]) == "/UseOutlines"
    assert "/DisplayDocTitle" in str(reader.root_object["/ViewerPreferences"])


def test_a_stated_date_is_that_of_the_file() -> None:
    made = replace(PLAIN, made_on=date(2026, 3, 14))
    metadata = PdfReader(BytesIO(draw(made).pdf)).metadata
    assert metadata is not None
    assert metadata.creation_date is not None
    assert metadata.creation_date.date() == date(2026, 3, 14)


def test_properties_hold_no_control_characters_and_are_not_endless() -> None:
    drawn = draw(replace(PLAIN, title="Ωμέγα\n<&>\x00\ud800" + "x" * 5000))
    metadata = PdfReader(BytesIO(drawn.pdf)).metadata
    assert metadata is not None
    assert metadata.title is not None
    assert metadata.title.startswith("Memo: Ωμέγα <&>xxx")
    assert len(metadata.title) == 300


@pytest.mark.parametrize(
    "text",
    [
        "a < b & c > d",
        "<b>not bold</b> &amp; <para>",
        "Ωμέγα Ήλιος",
        "Жуков Щёлково",
        "100 % → −5 €",
    ],
)
def test_any_text_is_printed_as_it_is(text: str) -> None:
    document = replace(PLAIN, title=text, sections=(Section(text, (plain(text),)),))
    (page,) = pages_of(draw(document).pdf)
    assert page.count(text) == 3
    assert draw(document).lacking == ()


def test_five_thousand_characters_without_a_space() -> None:
    document = replace(PLAIN, sections=(Section("", (plain("W" * 5000),)),))
    assert sum(page.count("W") for page in pages_of(draw(document).pdf)) == 5000


def test_characters_that_the_font_lacks_are_marked_and_listed() -> None:
    document = replace(PLAIN, sections=(Section("", (plain("[日本] 🏠 日"),)),))
    drawn = draw(document)
    assert drawn.lacking == ("日", "本", "🏠")
    assert "[□□] □ □" in pages_of(drawn.pdf)[0]
