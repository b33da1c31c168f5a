"""Documents as plain data."""

from workbench.charts.wrapping import Run
from workbench.report.document import Column, KeyFigure, KeyFigures, Paragraph, Table, plain, texts


def test_plain_paragraphs() -> None:
    assert plain("a", "small") == Paragraph((Run("a"),), "small")


def test_every_text_is_found() -> None:
    table = Table((Column("head"),), (("cell one",), ("cell two",)))
    key = KeyFigures((KeyFigure("label", "value", "note"),))
    found = list(texts((table, key, plain("para"))))
    wanted = {"head", "cell one", "cell two", "label", "value", "note", "para"}
    assert wanted <= set(found)
