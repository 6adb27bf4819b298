"""What is refused of the stresses of a steel, whatever the member."""

from calclib import units

# Range of structural steel, pins and rods: a value in ksi typed as MPa, or the reverse, lies far outside.
YIELD_STRESS = {units.US: (20.0, 150.0), units.SI: (140.0, 1035.0)}
TENSILE_STRENGTH = {units.US: (30.0, 200.0), units.SI: (205.0, 1380.0)}


def refuse_stresses(x, run, yield_stresses=("F_y",)):
    """Refuse a yield stress or tensile strength that is no steel's, and a tensile strength not above `F_y`."""
    for name in (*yield_stresses, "F_u"):
        low, high = run.pair(TENSILE_STRENGTH if name == "F_u" else YIELD_STRESS)
        value = getattr(x, name)
        run.require((value >= low) & (value <= high), name,
                    "{value} lies outside {low} to {high}, the range of structural steel; check its unit",
                    value=(value, units.STRESS), low=(low, units.STRESS), high=(high, units.STRESS))
    run.require(x.F_u > x.F_y, "F_u", "{F_u} is not above the yield stress of {F_y}; give the specified minimum values "
                "of one grade", F_u=(x.F_u, units.STRESS), F_y=(x.F_y, units.STRESS))
