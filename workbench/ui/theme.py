"""The look of the window in one place: letters, sizes, spacing and colours, light and dark."""

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache

from PySide6.QtCore import QByteArray, Qt
from PySide6.QtGui import QColor, QFont, QFontDatabase, QPalette
from PySide6.QtWidgets import QApplication

from workbench.charts.lettering import Weight
from workbench.charts.palette import DARK, LIGHT, Palette
from workbench.charts.shapes import Role
from workbench.places import resources

FAMILY = "Lato"
FONT_FILES = ("Lato-Regular.ttf", "Lato-Bold.ttf", "Lato-Italic.ttf")

TYPE_SMALL = 11
TYPE_TEXT = 13
TYPE_FIGURE = 17
TYPE_HEADING = 20
"""Heights of letters in pixels of a screen at 100 %."""
CHART_LETTERS = 64

SPACE_TIGHT = 4
SPACE = 8
SPACE_WIDE = 16
"""Distances: within a group, between groups, around headings."""

RAIL_WIDTH = 108
WALL_WIDTH = 262
BAR_WIDTH = 44
NARROW_BELOW = 1180
"""A window less wide than this shows the wall as a bar."""
YEAR_WIDTH = 70
"""Least width of a column of a year."""

_ROLES: Mapping[QPalette.ColorRole, Role] = {
    QPalette.ColorRole.Window: "panel",
    QPalette.ColorRole.WindowText: "ink",
    QPalette.ColorRole.Base: "paper",
    QPalette.ColorRole.AlternateBase: "panel",
    QPalette.ColorRole.Text: "ink",
    QPalette.ColorRole.PlaceholderText: "muted",
    QPalette.ColorRole.Button: "panel",
    QPalette.ColorRole.ButtonText: "ink",
    QPalette.ColorRole.BrightText: "price",
    QPalette.ColorRole.ToolTipBase: "paper",
    QPalette.ColorRole.ToolTipText: "ink",
    QPalette.ColorRole.Highlight: "debt",
    QPalette.ColorRole.HighlightedText: "paper",
    QPalette.ColorRole.Accent: "debt",
    QPalette.ColorRole.Link: "debt",
    QPalette.ColorRole.LinkVisited: "debt",
    QPalette.ColorRole.Light: "paper",
    QPalette.ColorRole.Midlight: "rule",
    QPalette.ColorRole.Mid: "rule",
    QPalette.ColorRole.Dark: "muted",
    QPalette.ColorRole.Shadow: "rule",
}

_WHEN_DISABLED = (
    QPalette.ColorRole.WindowText,
    QPalette.ColorRole.Text,
    QPalette.ColorRole.ButtonText,
)


@dataclass(frozen=True)
class Rule:
    """A rule of the style sheet. `grounds` are what its letters may stand on."""

    selector: str
    colour: Role
    grounds: tuple[Role, ...]
    more: str = ""
    """Further declarations; a role in braces stands for its tone."""


_PLAIN: tuple[Role, ...] = ("paper", "panel")

RULES = (
    Rule('QLabel[role="heading"]', "ink", _PLAIN, f"font-size: {TYPE_HEADING}px; font-weight: 700"),
    Rule('QLabel[role="headline"]', "muted", _PLAIN, f"font-size: {TYPE_TEXT}px"),
    Rule('QLabel[role="subheading"]', "ink", _PLAIN, "font-weight: 700"),
    Rule('QLabel[role="muted"]', "muted", _PLAIN, f"font-size: {TYPE_SMALL}px"),
    Rule('QLabel[role="figure"]', "ink", _PLAIN, f"font-size: {TYPE_FIGURE}px"),
    Rule(
        'QLabel[role="figure-strong"]',
        "ink",
        _PLAIN,
        f"font-size: {TYPE_FIGURE}px; font-weight: 700",
    ),
    Rule('QLabel[role="fault"]', "price", _PLAIN),
    Rule('QFrame[role="rule"]', "muted", _PLAIN),
    Rule('QLineEdit[fault="true"]', "price", ("paper",), "border: 2px solid {price}"),
    Rule(
        'QWidget[role="strip"]',
        "ink",
        ("paper",),
        "background: {paper}; border-bottom: 1px solid {rule}",
    ),
    Rule(
        'QAbstractButton[role="switch"]',
        "ink",
        _PLAIN,
        "background: transparent; border: 1px solid transparent; border-radius: 2px; "
        f"padding: {SPACE_TIGHT}px {SPACE}px",
    ),
    Rule('QAbstractButton[role="switch"]:hover', "ink", _PLAIN, "border-color: {rule}"),
    Rule(
        'QAbstractButton[role="switch"]:checked',
        "ink",
        ("paper",),
        "background: {paper}; border-color: {muted}; border-bottom: 2px solid {ink}",
    ),
    Rule('QAbstractButton[role="switch"]:focus', "ink", _PLAIN, "border: 1px dashed {ink}"),
    Rule("QToolTip", "ink", ("paper",), "background: {paper}; border: 1px solid {muted}"),
)
"""Widgets say what they are by the property `role`, and `fault` where an entry is wrong."""


@cache
def load_font() -> str:
    """Make the shipped letters known to Qt, once for a process; gives their family."""
    for name in FONT_FILES:
        data = (resources() / "fonts" / name).read_bytes()
        QFontDatabase.addApplicationFontFromData(QByteArray(data))
    return FAMILY


def chart_font(weight: Weight) -> QFont:
    """Letters of a painted picture, CHART_LETTERS high, as wide as the layout measured them.

    The painter is scaled to the height that is wanted: letters of any height are asked for, and
    Qt rounds heights to whole dots. Kerning would set them closer, and hinting would round widths.
    """
    font = QFont(FAMILY)
    font.setPixelSize(CHART_LETTERS)
    font.setBold(weight == "bold")
    font.setItalic(weight == "italic")
    font.setKerning(False)
    font.setHintingPreference(QFont.HintingPreference.PreferNoHinting)
    return font


def system_prefers_dark(app: QApplication) -> bool:
    """Whether the desktop asks for dark windows; where it does not say, they are light."""
    return app.styleHints().colorScheme() == Qt.ColorScheme.Dark


def apply_theme(app: QApplication, dark: bool) -> None:
    """Set style, letters and colours of all windows; may be called again at any time."""
    tones = DARK if dark else LIGHT
    app.setStyle("Fusion")
    font = QFont(load_font())
    font.setPixelSize(TYPE_TEXT)
    app.setFont(font)
    app.setPalette(window_palette(tones))
    app.setStyleSheet(style_sheet(tones))


def window_palette(tones: Palette) -> QPalette:
    """The house colours in the places where Qt looks for them."""
    palette = QPalette()
    for place, role in _ROLES.items():
        palette.setColor(place, QColor(tones[role]))
    for place in _WHEN_DISABLED:
        palette.setColor(QPalette.ColorGroup.Disabled, place, QColor(tones["muted"]))
    return palette


def style_sheet(tones: Palette) -> str:
    """What the palette cannot say."""
    return "\n".join(_written(rule, tones) for rule in RULES)


def _written(rule: Rule, tones: Palette) -> str:
    more = rule.more.format_map({str(role): tone for role, tone in tones.items()})
    return f"{rule.selector} {{ color: {tones[rule.colour]}; {more} }}"


def picture_palette(palette: QPalette) -> Palette:
    """The tones in which pictures go with a widget's own colours."""
    return DARK if palette.window().color().lightness() < 128 else LIGHT
