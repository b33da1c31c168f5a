"""The table of letter widths, held to the font files."""

import pytest
from reportlab.pdfbase.ttfonts import TTFontFile

from workbench.charts.font_table import FACES, TABLE, font_table, read_face
from workbench.charts.lettering import Weight, face
from workbench.places import resources


def test_the_shipped_table_is_that_of_the_shipped_fonts() -> None:
    fonts = resources() / "fonts"
    assert (fonts / TABLE).read_text(encoding="utf-8") == font_table(fonts)


@pytest.mark.parametrize("weight", ["regular", "bold", "italic"])
def test_every_width_is_the_one_another_reader_finds(weight: Weight) -> None:
    """Against reportlab's own reading of the same file."""
    file = TTFontFile(str(resources() / "fonts" / FACES[weight]))
    ours = face(weight).widths
    theirs = {code: width for code, width in file.charWidths.items() if code not in (0, 0xFFFF)}
    assert {ord(character) for character in ours} == set(theirs)
    worst = max(abs(ours[chr(code)] - width / 1000) for code, width in theirs.items())
    assert worst < 1e-9


def test_every_weight_has_the_same_characters() -> None:
    assert set(face("bold").widths) == set(face("regular").widths) == set(face("italic").widths)


def test_measures_of_a_face() -> None:
    data = (resources() / "fonts" / FACES["regular"]).read_bytes()
    found = read_face(data)
    assert (found["units_per_em"], found["ascent"], found["descent"]) == (2000, 1974, -426)
