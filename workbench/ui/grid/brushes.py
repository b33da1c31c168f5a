"""Colours and letters of a grid, made once for many cells."""

from dataclasses import dataclass

from PySide6.QtGui import QColor, QFont, QFontMetrics, QPalette

from workbench.ui.grid.cell import Cell
from workbench.ui.grid.tones import Tones, tones_of

_ON_TYPED = frozenset({"typed", "following", "unset"})
_MUTED = frozenset({"following", "missing"})
_BOLD = frozenset({"typed", "strong"})


@dataclass(frozen=True)
class Brushes:
    """What a painter is set to, by the state of a cell."""

    tones: Tones
    colours: dict[str, QColor]
    fonts: dict[tuple[bool, bool], QFont]
    digit: int
    """The width of a bold digit; the marks of a figure are no wider."""

    def ground(self, cell: Cell, chosen: bool) -> QColor | None:
        """What lies under a cell; None where that is the paper of the whole grid."""
        if chosen:
            return self.colours[self.tones.chosen]
        if cell.kind == "band":
            return self.colours[self.tones.band]
        return self.colours[self.tones.typed] if cell.kind in _ON_TYPED else None

    def ink(self, cell: Cell, chosen: bool) -> QColor:
        """The colour of the letters."""
        if cell.mark:
            return self.colours[self.tones.fault]
        muted = cell.kind in _MUTED and not chosen
        return self.colours[self.tones.muted if muted else self.tones.ink]

    def font(self, cell: Cell) -> QFont:
        """The letters: bold for what is typed and for sums, sloping for what is not taken in."""
        return self.fonts[cell.kind in _BOLD, cell.mark == "draft"]

    def surely_fits(self, cell: Cell, width: int) -> bool:
        """Whether a text needs no measuring, as nearly all figures do not."""
        return not cell.left and not cell.mark and len(cell.text) * self.digit <= width

    @property
    def fault(self) -> QColor:
        return self.colours[self.tones.fault]

    @property
    def frame(self) -> QColor:
        return self.colours[self.tones.ink]


def brushes(palette: QPalette, font: QFont) -> Brushes:
    """The brushes that go with a widget's own colours and letters."""
    tones = tones_of(palette)
    colours = {tone: QColor(tone) for tone in vars(tones).values()}
    fonts: dict[tuple[bool, bool], QFont] = {}
    for bold in (False, True):
        for italic in (False, True):
            fonts[bold, italic] = QFont(font)
            fonts[bold, italic].setBold(bold)
            fonts[bold, italic].setItalic(italic)
    digit = QFontMetrics(fonts[True, False]).horizontalAdvance("8")
    return Brushes(tones, colours, fonts, digit)
