"""How wide text is in the shipped font, and what stands for characters it lacks.

Every picture and page is laid out with these widths, so that a layout needs neither a screen nor
a font library. Letters are set without kerning; painters must switch it off.
"""

import json
import unicodedata
from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from itertools import accumulate
from typing import Literal, TypeAlias

from workbench.places import resources

Weight: TypeAlias = Literal["regular", "bold", "italic"]

MARK = "□"
"""What is printed for a character that the font lacks."""
ELLIPSIS = "…"
LEADING = 1.25
"""Distance of baselines as a multiple of the letter size."""
CAP_HEIGHT = 0.72


@dataclass(frozen=True)
class Face:
    """One weight of the font; widths are fractions of the letter size."""

    ascent: float
    descent: float
    widths: Mapping[str, float]


@cache
def face(weight: Weight) -> Face:
    """The measures of one weight, read once from the table beside the fonts."""
    text = (resources() / "fonts" / "lato-widths.json").read_text(encoding="utf-8")
    table = json.loads(text)["faces"][weight]
    units = table["units_per_em"]
    widths = {
        character: int(width) / units
        for width, characters in table["widths"].items()
        for character in characters
    }
    return Face(table["ascent"] / units, table["descent"] / units, widths)


def width(text: str, size: float, weight: Weight = "regular") -> float:
    """The length of a line of text; unknown characters count as the mark that is printed."""
    widths = face(weight).widths
    mark = widths[MARK]
    return size * sum(widths.get(character, mark) for character in text)


def printable(text: str) -> str:
    """The text as it can be printed: marks for what the font lacks, nothing for what is unseen."""
    known = face("regular").widths
    plain = unicodedata.normalize("NFC", text)
    return "".join(_shown(character, known) for character in plain)


def lacking(text: str) -> tuple[str, ...]:
    """The characters of a text that would print as a mark, each once, in order of appearance."""
    known = face("regular").widths
    plain = unicodedata.normalize("NFC", text)
    marked = (c for c in plain if c != MARK and _shown(c, known) == MARK)
    return tuple(dict.fromkeys(marked))


def _shown(character: str, known: Mapping[str, float]) -> str:
    if character == "\n":
        return character
    if character.isspace() and character not in known:
        return " "
    category = unicodedata.category(character)
    if category == "Cf" or "\ufe00" <= character <= "\ufe0f":
        return ""
    if category == "Cc" or character not in known:
        return " " if character.isspace() else MARK
    return character


def shorten(text: str, size: float, room: float, weight: Weight = "regular") -> str:
    """The text, or as much of its beginning as fits with an ellipsis."""
    if width(text, size, weight) <= room:
        return text
    widths = face(weight).widths
    reach = accumulate(widths.get(character, widths[MARK]) for character in text)
    kept = sum(end <= room / size - widths[ELLIPSIS] for end in reach)
    return text[:kept].rstrip() + ELLIPSIS
