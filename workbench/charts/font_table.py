"""Makes `resources/fonts/lato-widths.json` from the shipped fonts.

Run as `python -m workbench.charts.font_table` after a font file has changed. Reads what it needs
of the TrueType tables itself, so that neither the window nor the command line needs a font
library: `head` (units), `hhea` and `hmtx` (widths), `cmap` format 4 (characters to glyphs).
"""

import json
import struct
from pathlib import Path
from typing import Any

from workbench.places import resources

FACES = {"regular": "Lato-Regular.ttf", "bold": "Lato-Bold.ttf", "italic": "Lato-Italic.ttf"}
TABLE = "lato-widths.json"


def read_face(data: bytes) -> dict[str, Any]:
    """Units per em, ascent, descent and, for each width, the characters that have it."""
    start = _tables(data)
    units = struct.unpack_from(">H", data, start["head"] + 18)[0]
    ascent, descent = struct.unpack_from(">hh", data, start["hhea"] + 4)
    metrics = struct.unpack_from(">H", data, start["hhea"] + 34)[0]
    widths: dict[int, list[str]] = {}
    for code, glyph in sorted(_glyphs(data, start["cmap"]).items()):
        place = start["hmtx"] + 4 * min(glyph, metrics - 1)
        widths.setdefault(struct.unpack_from(">H", data, place)[0], []).append(chr(code))
    return {
        "units_per_em": units,
        "ascent": ascent,
        "descent": descent,
        "widths": {str(width): "".join(widths[width]) for width in sorted(widths)},
    }


def _tables(data: bytes) -> dict[str, int]:
    """Where each table of the font file begins."""
    count = struct.unpack_from(">H", data, 4)[0]
    records = (struct.unpack_from(">4sLLL", data, 12 + 16 * index) for index in range(count))
    return {tag.decode("ascii"): begins for tag, _, begins, _ in records}


def _glyphs(data: bytes, cmap: int) -> dict[int, int]:
    """Characters of the basic plane to glyph numbers, from the table for Unicode on Windows."""
    count = struct.unpack_from(">H", data, cmap + 2)[0]
    records = [struct.unpack_from(">HHL", data, cmap + 4 + 8 * index) for index in range(count)]
    begins = cmap + next(place for platform, kind, place in records if (platform, kind) == (3, 1))
    segments = struct.unpack_from(">H", data, begins + 6)[0] // 2

    def column(number: int, kind: str = "H") -> tuple[int, ...]:
        place = begins + 14 + 2 * segments * number + (2 if number else 0)
        return struct.unpack_from(f">{segments}{kind}", data, place)

    lasts, firsts, deltas, offsets = column(0), column(1), column(2, "h"), column(3)
    found: dict[int, int] = {}
    for index, (first, last) in enumerate(zip(firsts, lasts, strict=True)):
        for code in range(first, min(last, 0xFFFE) + 1):
            glyph = code
            if offsets[index]:
                own = begins + 16 + 6 * segments + 2 * index
                glyph = struct.unpack_from(">H", data, own + offsets[index] + 2 * (code - first))[0]
            if glyph and (glyph := (glyph + deltas[index]) & 0xFFFF):
                found[code] = glyph
    return found


def font_table(folder: Path) -> str:
    """The text of the table for the fonts of a folder."""
    faces = {weight: read_face((folder / name).read_bytes()) for weight, name in FACES.items()}
    return json.dumps({"faces": faces}, indent=1) + "\n"


if __name__ == "__main__":  # pragma: no cover
    fonts = resources() / "fonts"
    (fonts / TABLE).write_text(font_table(fonts), encoding="utf-8")
