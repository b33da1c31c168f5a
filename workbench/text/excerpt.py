"""A person’s own text within a sentence: on one line, nothing that steers a terminal, not long."""

import unicodedata

LONGEST = 60


def excerpt(text: str, most: int = LONGEST) -> str:
    """The text, or its beginning with an ellipsis; each run of blank or unseen marks is a space."""
    line = " ".join("".join(map(_seen, text[: 20 * most])).split())
    return line if len(line) <= most else f"{line[: most - 1]}…"


def _seen(character: str) -> str:
    kind = unicodedata.category(character)
    return " " if kind in ("Cc", "Zl", "Zp") else "\ufffd" if kind == "Cs" else character
