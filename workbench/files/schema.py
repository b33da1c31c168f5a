"""The JSON Schema of the deal file, generated from the records.

`python -m workbench.files.schema` writes it anew.
"""

import json
from pathlib import Path
from typing import Any

from workbench.deal.deal import ID_LETTERS, SCHEMA
from workbench.deal.inputs import DAYS, YEARS, Field, Input, declared
from workbench.files.adapter import deal_adapter, record_classes
from workbench.places import resources


def schema_path() -> Path:
    """Where the generated schema is kept."""
    return resources() / "deal.schema.json"


def deal_schema() -> dict[str, Any]:
    """JSON Schema 2020-12 of a deal file of the newest version."""
    schema: dict[str, Any] = deal_adapter().json_schema()
    schema["$schema"] = "https://json-schema.org/draft/2020-12/schema"
    schema["title"] = f"Groundcourse deal, schema {SCHEMA}"
    shapes = {**schema.get("$defs", {}), "Deal": schema}
    for name, record in record_classes().items():
        shape = shapes[name]
        shape["description"] = " ".join((record.__doc__ or "").split())
        if shape["description"].startswith(f"{name}("):
            del shape["description"]
        for field in declared(record).values():
            _describe(shape["properties"][field.name], field)
    _describe_ids(schema)
    schema["required"] = ["schema"]
    return schema


def _describe(shape: dict[str, Any], field: Field) -> None:
    shape.pop("title", None)
    if field.input is None:
        return
    mark = field.input
    shape["title"] = mark.label
    shape["description"] = _words(mark, field)
    if field.is_row:
        row = {
            "type": "object",
            "propertyNames": {"pattern": "^[1-9][0-9]*$"},
            "additionalProperties": {"type": "number"},
        }
        shape.pop("type", None)
        shape.pop("additionalProperties", None)
        shape["anyOf"] = [row, {"type": "null"}] if _nullable(shape) else [row]


def _nullable(shape: dict[str, Any]) -> bool:
    return any(option.get("type") == "null" for option in shape.get("anyOf", []))


def _words(mark: Input, field: Field) -> str:
    words = [mark.help] if mark.help else []
    if field.is_row:
        words.append(
            f"Year row: deal year (1…{YEARS}) to value; an absent year follows the last one typed."
        )
    words.append(f"Unit: {mark.unit}.")
    if mark.unit == "text":
        words.append(f"At most {mark.high:,.0f} characters." if mark.high else "")
    elif mark.unit == "date":
        words.append(_allowed(*DAYS))
    elif mark.low is not None:
        words.append(_allowed(f"{mark.low:.16g}", f"{mark.high:.16g}"))
    if mark.needed:
        words.append("Has no default.")
    return " ".join(word for word in words if word)


def _allowed(low: object, high: object) -> str:
    return f"Allowed: {low} to {high}; checked, but a file with a value outside still opens."


def _describe_ids(schema: dict[str, Any]) -> None:
    letters = ", ".join(f"{letter} ({name})" for name, letter in ID_LETTERS.items())
    schema["properties"]["next_id"]["description"] = (
        "Greater than the number of every id in the file. An id is the letter of its list and a "
        f"number that was never given before: {letters}."
    )


def main() -> None:
    text = json.dumps(deal_schema(), indent=1, ensure_ascii=False) + "\n"
    schema_path().write_text(text, encoding="utf-8")


if __name__ == "__main__":
    main()
