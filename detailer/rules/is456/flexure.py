"""Bending: IS 456:2000, 38.1 and Annex G; stress of steel by Fig. 23."""

from __future__ import annotations

from collections.abc import Mapping
from math import sqrt

CONCRETE_STRAIN = 0.0035
"""Strain of concrete at its outermost fibre, 38.1 b."""

BLOCK_FORCE = 0.36
"""Force of the stress block over fck b xu, 38.1 c."""

BLOCK_CENTRE = 0.42
"""Depth of that force over xu, 38.1 c."""

FLANGE_STRESS = 0.45
"""Stress in a flange over fck, G-2.2."""

DESIGN_SHARE = 0.87
"""Design stress of steel over fy, 38.1 e and Annex G."""

STEEL_MODULUS = 200_000.0
"""Modulus of elasticity of steel, 5.6.3. [N/mm²]"""

XU_LIMIT: Mapping[int, float] = {250: 0.53, 415: 0.48, 500: 0.46}
"""Greatest depth of the neutral axis over d by grade, 38.1."""

CURVE = ((0.80, 0.0), (0.85, 0.0001), (0.90, 0.0003), (0.95, 0.0007), (0.975, 0.001), (1.0, 0.002))
"""Inelastic strain of cold-worked bars at shares of the design strength, Fig. 23 A.

FROM MEMORY (page_seen=False).
"""


def yield_strain(fy: float) -> float:
    """Return the strain that tension steel reaches at least when the section fails. [-]

    Parameters
    ----------
    fy : float
        Characteristic strength. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 38.1 f (derived from the printed limits of the neutral axis).
    """
    return 0.002 + DESIGN_SHARE * fy / STEEL_MODULUS


def xu_limit(fy: float) -> float:
    """Return the greatest depth of the neutral axis over the effective depth. [-]

    Parameters
    ----------
    fy : float
        Characteristic strength. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 38.1 (confirmed on the page); other grades by its strain condition,
       0.0035/(0.0055 + 0.87 fy/Es) (derived).
    """
    printed = XU_LIMIT.get(round(fy))
    if printed is not None:
        return printed
    return CONCRETE_STRAIN / (CONCRETE_STRAIN + yield_strain(fy))


def steel_stress(strain: float, fy: float) -> float:
    """Return the design stress of steel at a strain, unsigned. [N/mm²]

    Parameters
    ----------
    strain : float
        Strain. [-]
    fy : float
        Characteristic strength; up to 250 the line has a sharp yield. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, Fig. 23; points of the curve FROM MEMORY (page_seen=False).
    """
    size = abs(strain)
    design = 0.87 * fy
    if fy <= 250:
        return min(STEEL_MODULUS * size, design)
    below = (CURVE[0][0] * design / STEEL_MODULUS, CURVE[0][0] * design)
    if size <= below[0]:
        return STEEL_MODULUS * size
    for share, inelastic in CURVE[1:]:
        here = (share * design / STEEL_MODULUS + inelastic, share * design)
        if size <= here[0]:
            along = (size - below[0]) / (here[0] - below[0])
            return below[1] + along * (here[1] - below[1])
        below = here
    return design


def rectangle_moment(b: float, d: float, area: float, fck: float, fy: float) -> float:
    """Return the moment of resistance of an under-reinforced rectangle. [N·mm]

    Parameters
    ----------
    b : float
        Width. [mm]
    d : float
        Effective depth. [mm]
    area : float
        Tension steel. [mm²]
    fck : float
        Characteristic strength of concrete. [N/mm²]
    fy : float
        Characteristic strength of steel. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, G-1.1 b (confirmed on the page).
    """
    return 0.87 * fy * area * d * (1 - area * fy / (b * d * fck))


def rectangle_steel(
    b: float,
    d: float,
    moment: float,
    fck: float,
    fy: float,
    *,
    share: float = DESIGN_SHARE,
    block: float = 1.0,
) -> float:
    """Return the tension steel of an under-reinforced rectangle. [mm²]

    Parameters
    ----------
    b : float
        Width. [mm]
    d : float
        Effective depth. [mm]
    moment : float
        Factored moment. [N·mm]
    fck : float
        Characteristic strength of concrete. [N/mm²]
    fy : float
        Characteristic strength of steel. [N/mm²]
    share : float
        Design stress over fy: 0.87 here, 1/1.15 in SP 16. [-]
    block : float
        Coefficient of As fy/(b d fck) in the lever arm: 1 here, 1.005 in SP 16. [-]

    Raises
    ------
    ValueError
        No area reaches the moment.

    References
    ----------
    .. [1] IS 456:2000, G-1.1 b solved for the area (confirmed on the page).
    """
    k = block * fy / (b * d * fck)
    root = 1 - 4 * k * moment / (share * fy * d)
    if root < 0:
        raise ValueError("the section cannot carry the moment with tension steel alone")
    return (1 - sqrt(root)) / (2 * k)


def limit_moment(b: float, d: float, fck: float, fy: float) -> float:
    """Return the greatest moment of a singly reinforced rectangle. [N·mm]

    Parameters
    ----------
    b : float
        Width. [mm]
    d : float
        Effective depth. [mm]
    fck : float
        Characteristic strength of concrete. [N/mm²]
    fy : float
        Characteristic strength of steel. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, G-1.1 c (confirmed on the page).
    """
    k = xu_limit(fy)
    return BLOCK_FORCE * k * (1 - BLOCK_CENTRE * k) * b * d * d * fck


def flange_depth(df: float, xu: float) -> float:
    """Return the depth over which a flange counts at 0.45 fck. [mm]

    The switch of G-2.3 at Df/xu = 0.43 and the limit Df/d = 0.2 of G-2.2 are where
    0.15 xu + 0.65 Df reaches Df, so one formula serves all cases.

    Parameters
    ----------
    df : float
        Thickness of the flange. [mm]
    xu : float
        Depth of the neutral axis. [mm]

    References
    ----------
    .. [1] IS 456:2000, G-2.2, G-2.2.1 and G-2.3 (confirmed on the page).
    """
    return min(0.15 * xu + 0.65 * df, df)


def compression_stress(fy: float, depth_ratio: float) -> float:
    """Return the design stress of compression steel at the limit of the neutral axis. [N/mm²]

    Parameters
    ----------
    fy : float
        Characteristic strength. [N/mm²]
    depth_ratio : float
        Depth of the compression steel over the effective depth, d'/d. [-]

    References
    ----------
    .. [1] IS 456:2000, G-1.2 (confirmed on the page); the curve of Fig. 23, see
       :func:`steel_stress`.
    """
    k = xu_limit(fy)
    return steel_stress(CONCRETE_STRAIN * max(k - depth_ratio, 0.0) / k, fy)


def compression_steel(excess: float, d: float, d_top: float, fy: float) -> float:
    """Return the compression steel for what exceeds the limit moment. [mm²]

    Parameters
    ----------
    excess : float
        Moment beyond :func:`limit_moment`. [N·mm]
    d : float
        Effective depth. [mm]
    d_top : float
        Depth of the compression steel. [mm]
    fy : float
        Characteristic strength. [N/mm²]

    Raises
    ------
    ValueError
        Steel below the neutral axis does not help.

    References
    ----------
    .. [1] IS 456:2000, G-1.2 (confirmed on the page): the concrete it displaces is neglected.
    """
    stress = compression_stress(fy, d_top / d)
    if stress <= 0:
        raise ValueError("compression steel lies below the neutral axis")
    return excess / (stress * (d - d_top))


def flanged_moment(bf: float, bw: float, df: float, d: float, xu: float, fck: float) -> float:
    """Return the moment of a flanged section at a neutral axis below the flange. [N·mm]

    Parameters
    ----------
    bf : float
        Effective width of the flange. [mm]
    bw : float
        Width of the web. [mm]
    df : float
        Thickness of the flange. [mm]
    d : float
        Effective depth. [mm]
    xu : float
        Depth of the neutral axis, no more than its limit. [mm]
    fck : float
        Characteristic strength of concrete. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, G-2.2, G-2.2.1 and G-2.3 (confirmed on the page).
    """
    web = BLOCK_FORCE * fck * bw * xu * (d - BLOCK_CENTRE * xu)
    y = flange_depth(df, xu)
    return web + FLANGE_STRESS * fck * (bf - bw) * y * (d - y / 2)
