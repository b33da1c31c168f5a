"""The look of the window: every text stands out from its ground, light and dark."""

from collections.abc import Iterator
from typing import TypeAlias

import pytest
from PySide6.QtGui import QColor, QFontInfo, QFontMetricsF, QPalette
from PySide6.QtWidgets import QApplication, QLabel, QLineEdit
from pytestqt.qtbot import QtBot

from workbench.charts.lettering import Weight, width
from workbench.charts.palette import DARK, LIGHT, Palette, contrast
from workbench.ui.theme import (
    CHART_LETTERS,
    RULES,
    TYPE_HEADING,
    TYPE_TEXT,
    Rule,
    apply_theme,
    chart_font,
    load_font,
    picture_palette,
    style_sheet,
    system_prefers_dark,
    window_palette,
)

Role: TypeAlias = QPalette.ColorRole
Group: TypeAlias = QPalette.ColorGroup
BOTH = pytest.mark.parametrize("tones", [LIGHT, DARK], ids=["light", "dark"])


@pytest.fixture
def application(qapp: QApplication) -> Iterator[QApplication]:
    """The application, which looks afterwards as it did before."""
    before = (qapp.palette(), qapp.font(), qapp.styleSheet(), qapp.style().name())
    yield qapp
    qapp.setStyleSheet(before[2])
    qapp.setStyle(before[3])
    qapp.setPalette(before[0])
    qapp.setFont(before[1])


def ratio(palette: QPalette, group: QPalette.ColorGroup, letters: Role, ground: Role) -> float:
    return contrast(palette.color(group, letters).name(), palette.color(group, ground).name())


@BOTH
@pytest.mark.parametrize("group", [Group.Active, Group.Inactive, Group.Disabled])
@pytest.mark.parametrize(
    ("letters", "ground"),
    [
        (Role.WindowText, Role.Window),
        (Role.Text, Role.Base),
        (Role.Text, Role.AlternateBase),
        (Role.PlaceholderText, Role.Base),
        (Role.ButtonText, Role.Button),
        (Role.BrightText, Role.Window),
        (Role.ToolTipText, Role.ToolTipBase),
        (Role.HighlightedText, Role.Highlight),
        (Role.Link, Role.Base),
        (Role.Link, Role.Window),
        (Role.LinkVisited, Role.Base),
    ],
)
def test_text_is_legible(
    tones: Palette, group: QPalette.ColorGroup, letters: Role, ground: Role
) -> None:
    assert ratio(window_palette(tones), group, letters, ground) >= 4.5


@BOTH
@pytest.mark.parametrize("rule", RULES, ids=[rule.selector for rule in RULES])
def test_text_of_the_style_sheet_is_legible(tones: Palette, rule: Rule) -> None:
    assert rule.grounds
    assert all(contrast(tones[rule.colour], tones[ground]) >= 4.5 for ground in rule.grounds)
    if "background: {" in rule.more:
        assert rule.grounds == (rule.more.partition("background: {")[2].partition("}")[0],)


@BOTH
def test_the_style_sheet_holds_no_colour_of_its_own(tones: Palette) -> None:
    sheet = style_sheet(tones)
    assert "{ink}" not in sheet and "{paper}" not in sheet
    named = {word.strip(";}") for word in sheet.replace(":", " ").split() if word.startswith("#")}
    assert named and named <= set(tones.values())


def test_disabled_text_differs(qapp: QApplication) -> None:
    palette = window_palette(LIGHT)
    assert palette.color(Group.Disabled, Role.Text) != palette.color(Group.Active, Role.Text)


@pytest.mark.parametrize("weight", ["regular", "bold", "italic"])
@pytest.mark.parametrize("text", ["AVATAR To 3,807,783", "−53.5 %", "“exit” Ωμέγα Жуков"])
def test_painted_letters_are_as_wide_as_the_layout_says(
    qapp: QApplication, weight: Weight, text: str
) -> None:
    load_font()
    font = chart_font(weight)
    assert QFontInfo(font).family() == "Lato"
    measured = QFontMetricsF(font).horizontalAdvance(text)
    assert measured == pytest.approx(width(text, CHART_LETTERS, weight), rel=1e-3)


def test_a_theme_is_put_on_and_changed(application: QApplication, qtbot: QtBot) -> None:
    heading, field = QLabel("Earn"), QLineEdit("7")
    heading.setProperty("role", "heading")
    field.setProperty("fault", True)
    for widget in (heading, field):
        qtbot.addWidget(widget)
        widget.show()
    application.setStyle("Windows")
    for dark, tones in ((False, LIGHT), (True, DARK)):
        apply_theme(application, dark)
        assert application.font().family() == "Lato"
        assert application.font().pixelSize() == TYPE_TEXT
        assert heading.font().pixelSize() == TYPE_HEADING
        assert heading.font().bold()
        assert heading.palette().color(Role.WindowText) == QColor(tones["ink"])
        assert field.palette().color(Role.Text) == QColor(tones["price"])
        assert picture_palette(heading.palette()) is tones
    application.setStyleSheet("")
    assert application.style().name().lower() == "fusion"


def test_windows_are_light_where_the_desktop_does_not_say(qapp: QApplication) -> None:
    assert system_prefers_dark(qapp) is False
