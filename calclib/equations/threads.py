"""Tensile stress area of screw threads."""

from math import pi

from calclib.equations.form import Cite, equation

ISO_898_1 = Cite("ISO 898-1", {"": "nominal stress area"})
APPENDIX_3 = Cite("AISC 360", {"22": "Appendix 3.4, Eq. A-3-7", "16": "Appendix 3.4, Eq. A-3-7"})


@equation(APPENDIX_3)
def tensile_stress_area_unified(d, n):
    """Return the tensile stress area of a Unified external thread.

    Parameters
    ----------
    d : nominal diameter [in], 0.25 to 4
    n : threads per inch [1/in], 3 to 32

    Returns
    -------
    A_t : tensile stress area [in2]

    Source: AISC 360 Appendix 3.4, Eq. A-3-7; the same as in ASME B1.1 (from memory).

    >>> round(tensile_stress_area_unified(d=1.0, n=8), 4)
    0.6057
    """
    A_t = pi / 4 * (d - 0.9743 / n) ** 2
    return A_t


@equation(ISO_898_1)
def tensile_stress_area_metric(d, P):
    """Return the tensile stress area of an ISO metric external thread.

    Parameters
    ----------
    d : nominal diameter [mm], 1.6 to 100
    P : pitch [mm], 0.35 to 6

    Returns
    -------
    A_t : tensile stress area [mm2]

    Source: ISO 898-1. The circle on the mean of the pitch and minor diameters; 0.9382 is half of 0.6495 + 1.2269.
    ISO 898-1 covers up to M39; AISC 360 Appendix 3.4, Eq. A-3-7M uses the same form for larger rods.

    >>> round(tensile_stress_area_metric(d=20, P=2.5), 1)
    244.8
    """
    A_t = pi / 4 * (d - 0.9382 * P) ** 2
    return A_t
