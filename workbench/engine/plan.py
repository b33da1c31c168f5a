"""Compiling a deal: its shape's program, its inputs as rows, and the facts of roll and works."""

import math
from collections.abc import Mapping
from dataclasses import dataclass
from itertools import pairwise

import numpy as np

from workbench.deal.checks import Checked, check_parts, faulty
from workbench.deal.deal import Deal
from workbench.deal.inputs import YEARS, YearRow, declared
from workbench.deal.issues import Issue
from workbench.deal.paths import Step, locate, value_at
from workbench.engine.facts import Facts, blocked_facts, facts_of
from workbench.engine.printer import Program, program
from workbench.engine.roll import (
    Floats,
)
from workbench.engine.shape import Shape, shape_of

HARMLESS = frozenset(
    {
        "too_long",
        "id_ahead",
        "draft",
        "path_lost",
        "bad_currency",
        "outside_lease",
        "longer_than_term",
        "longer_than_amortisation",
    }
)
"""Codes of issues that leave every figure as it is."""


@dataclass(frozen=True, eq=False)
class Plan:
    """A deal made ready: everything that does not change from trial to trial.

    `inputs` maps a key path to a row (41, 1) or a single figure (1,); `facts` likewise, months
    (492, 1). What an issue stands in the way of is not a number there; `blocked` maps it to the
    issue.
    """

    deal: Deal
    shape: Shape
    program: Program
    inputs: Mapping[str, Floats]
    facts: Mapping[str, Floats]
    issues: tuple[Issue, ...]
    blocked: Mapping[str, Issue]
    parts: "Parts"


@dataclass(frozen=True, eq=False)
class Parts:
    """What a plan was made of, for the plan after the next edit to take over."""

    checked: Checked
    facts: Facts
    places: Mapping[str, tuple[Step, ...]]
    """Where each input lies in a deal of this shape."""


def compile_deal(deal: Deal, earlier: Plan | None = None) -> Plan:
    """The plan of a deal. Any deal that was read whole compiles, whatever its issues.

    Parameters
    ----------
    deal : Deal
    earlier : Plan, optional
        The plan before an edit. What both deals share as the same objects is not looked at again,
        so that an edit costs what it changed; the plan comes out the same without it.

    Returns
    -------
    Plan

    Examples
    --------
    >>> compile_deal(Deal()).blocked["purchase.price"].code
    'missing'
    """
    shape = shape_of(deal)
    made = program(shape)
    before = earlier.parts if earlier is not None else None
    checked = check_parts(deal, before.checked if before is not None else None)
    issues = checked.issues
    wrong = faulty([one for one in issues if one.code not in HARMLESS])
    blocked: dict[str, Issue] = {}
    for name, issue in blocked_facts(deal, wrong):
        blocked.setdefault(name, issue)
    facts = facts_of(deal, frozenset(blocked), before.facts if before is not None else None)
    if earlier is not None and before is not None and earlier.shape == shape:
        places = before.places
    else:
        places = {path: locate(deal, path) for path in made.givens}
    inputs = {path: _given(deal, path, places[path], wrong, blocked) for path in made.givens}
    parts = Parts(checked, facts, places)
    return Plan(deal, shape, made, inputs, facts.values, issues, blocked, parts)


def _given(
    deal: Deal,
    path: str,
    steps: tuple[Step, ...],
    wrong: Mapping[str, Issue],
    blocked: dict[str, Issue],
) -> Floats:
    owner = value_at(deal, steps[:-1])
    name = str(steps[-1])
    value = getattr(owner, name)
    if declared(type(owner))[name].is_row:
        bad = {year for year in value or {} if f"{path}.{year}" in wrong}
        named = (wrong.get(f"{path}.{year}") for year in sorted(bad | {1}))
        issue = next((one for one in named if one is not None), None)
        if issue is not None:
            blocked[path] = issue
        return expand(value or {}, bad)
    if path in wrong:
        blocked[path] = wrong[path]
        return np.array([np.nan])
    return np.array([math.nan if value is None else float(value)])


def expand(row: YearRow, bad: set[int] | frozenset[int] = frozenset()) -> Floats:
    """A year row written out, shape (41, 1): each year has the last value typed before it."""
    out = np.full((YEARS, 1), np.nan)
    years = sorted(year for year in row if 1 <= year <= YEARS)
    for year, following in pairwise([*years, YEARS + 1]):
        out[year - 1 : following - 1] = math.nan if year in bad else row[year]
    return out
