"""Writes out the net area of a chain of holes, step by step, and names the chains that come next."""

from functools import lru_cache

from calclib import units
from calclib.equations.aisc360 import members
from calclib.paths import chains

LISTED = 4      # chains that a calc names


@lru_cache(512)      # a sweep of what is not geometry asks for the same chains again and again
def chains_of(width, holes, gross_area, listed=LISTED):
    """Return the governing chains of `holes`, a tuple of `Hole`, as `calclib.paths.chains` does."""
    return tuple(chains(width, list(holes), listed, gross_area))


def net_area(part, A_g, found, holes, t, count=1):
    """Record the net area of the governing chain and return its area for the full load [in2 or mm2].

    Parameters
    ----------
    part : the block
    A_g : gross area of the whole section [in2 or mm2]
    found : chains of one element, the governing one first
    holes : the holes that the chains index
    t : thickness of one element at the holes [in or mm]
    count : equal elements that tear together, such as two flanges
    """
    run, chain = part.run, found[0]
    if not chain.holes:
        return part.given("A_{n}", units.AREA, A_g, run.cite("B4.3b"), "Gross area: there are no holes.")
    first = holes[chain.holes[0]]
    hops = {}
    for hop in chain.stagger:
        key = round(hop.s, 9), round(hop.g, 9)
        hops[key] = hops.get(key, 0) + 1
    names = ["A_{n}"] if not hops else [f"A_{{n,{i}}}" for i in range(len(hops))] + ["A_{n}"]
    d_e = part(members.width_of_hole_deducted, d_h=first.width, Delta_h=first.allowance)
    A_n = part(members.net_area_after_holes, A_0=A_g, n_h=count * len(chain.holes), d_e=d_e, t=t,
               symbols={"A_0": "A_{g}", "A_n": names[0]}, note=_compared(run, found))
    for i, ((s, g), n) in enumerate(hops.items()):
        A_n = part(members.net_area_with_stagger, A_0=A_n, n_g=count * n, s=s, g=g, t=t,
                   symbols={"A_0": names[i], "A_n": names[i + 1]})
    bolts = sum(hole.fastener for hole in holes)
    if chain.shed:
        A_n = part(members.net_area_for_full_load, A_n=A_n, N=bolts, m=chain.shed,
                   note=f"{chain.shed} of {bolts} bolts have shed their load before this chain.")
    return A_n


def _compared(run, found):
    """Return in words the governing chain and the next ones, with the load that crosses each."""
    if run.silent:
        return ""

    def words(chain):
        share = "" if not chain.shed else f", {units.trimmed(chain.share)} of the load"
        angled = len(chain.stagger)
        return (f"{len(chain.holes)} holes" if len(chain.holes) != 1 else "1 hole") + (
            f", {angled} gage space{'s' if angled > 1 else ''} at an angle" if angled else "") + share

    def width(chain):
        return units.text(chain.net_width, units.LENGTH, run.units)
    text = f"Governing chain: {words(found[0])}, net width {width(found[0])} of one element."
    if len(found) > 1:
        text += " Next: " + "; ".join(f"{words(c)}, net width {width(c)}" + (
            f", for the full load {units.text(c.equivalent / found[0].equivalent, units.NUMBER, run.units)} of the "
            "governing area") for c in found[1:]) + "."
    return text
