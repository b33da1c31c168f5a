"""Names that do not leave the program in a document."""

import re
from dataclasses import replace

from workbench.deal.checks import check
from workbench.deal.deal import Deal
from workbench.deal.earn import Space
from workbench.engine.result import Result

WITHHELD = "name withheld"

_RESIDENTIAL = re.compile(
    r"\b(flat|apartment|residen|dwelling|studio|house|home|bedroom|condo"
    r"|maisonette|bedsit|duplex|villa|cottage|bungalow|lodging|loft|penthouse|tenement"
    r"|appartement|logement|piso|vivienda|habita|appartamento|alloggio|abita|apartamento"
    r"|mieszkan|lägenhet|lagenhet|bostad|διαμ[εέ]ρισμα|κατοικ[ιί])"
    r"|wohn|woning|住宅|住戸|マンション|アパート",
    re.IGNORECASE,
)
"""Words for dwellings in the languages of the locales that come with the program."""


def shareable(result: Result) -> Result:
    """The same figures of a deal without those names, nor in what is said to be wrong with it.

    Everything in a document is made from this, so that no issue, reason or label can tell a name.
    """
    deal = without_names(result.plan.deal)
    return replace(result, plan=replace(result.plan, deal=deal, issues=tuple(check(deal))))


def without_names(deal: Deal) -> Deal:
    """The deal with a name withheld where tenants may be private persons.

    The schema has no use that says whether people live in a space, and no choice to print their
    names, so that words decide; in doubt the name is withheld.
    """
    spaces = tuple(_without_names(deal, space) for space in deal.spaces)
    private = {
        f"leases@{lease.id}.tenant"
        for space in deal.spaces
        if is_residential(deal, space)
        for lease in space.leases
    }
    drafts = {path: WITHHELD if path in private else text for path, text in deal.drafts.items()}
    return replace(deal, spaces=spaces, drafts=drafts)


def _without_names(deal: Deal, space: Space) -> Space:
    if not is_residential(deal, space):
        return space
    leases = (
        replace(lease, tenant=WITHHELD if lease.tenant.strip() else "") for lease in space.leases
    )
    return replace(space, leases=tuple(leases))


def is_residential(deal: Deal, space: Space) -> bool:
    """Whether people seem to live there, by the words of its use.

    A space without a stated use goes by its own name and by the kind of property.
    """
    words = space.use if space.use.strip() else f"{space.name}; {deal.property.kind}"
    return _RESIDENTIAL.search(words) is not None
