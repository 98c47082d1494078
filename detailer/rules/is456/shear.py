"""Shear and torsion: IS 456:2000, 40 and 41, Tables 19 and 20."""

from __future__ import annotations

from bisect import bisect_right

from detailer.values import Required

TABLE_19_PT = (0.15, 0.25, 0.50, 0.75, 1.00, 1.25, 1.50, 1.75, 2.00, 2.25, 2.50, 2.75, 3.00)
TABLE_19 = {
    15: (0.28, 0.35, 0.46, 0.54, 0.60, 0.64, 0.68, 0.71, 0.71, 0.71, 0.71, 0.71, 0.71),
    20: (0.28, 0.36, 0.48, 0.56, 0.62, 0.67, 0.72, 0.75, 0.79, 0.81, 0.82, 0.82, 0.82),
    25: (0.29, 0.36, 0.49, 0.57, 0.64, 0.70, 0.74, 0.78, 0.82, 0.85, 0.88, 0.90, 0.92),
    30: (0.29, 0.37, 0.50, 0.59, 0.66, 0.71, 0.76, 0.80, 0.84, 0.88, 0.91, 0.94, 0.96),
    35: (0.29, 0.37, 0.50, 0.59, 0.67, 0.73, 0.78, 0.82, 0.86, 0.90, 0.93, 0.96, 0.99),
    40: (0.30, 0.38, 0.51, 0.60, 0.68, 0.74, 0.79, 0.84, 0.88, 0.92, 0.95, 0.98, 1.01),
}
"""Design shear strength of concrete by grade, at the percentages of TABLE_19_PT. [N/mm²]"""

TABLE_20 = {15: 2.5, 20: 2.8, 25: 3.1, 30: 3.5, 35: 3.7, 40: 4.0}
"""Greatest shear stress by grade. [N/mm²]"""

LINK_FY_LIMIT = 415.0
"""Strength of links counts no higher, 40.4. [N/mm²]"""


def _grade(fck: float) -> int:
    grades = sorted(TABLE_20)
    row = bisect_right(grades, fck) - 1
    if row < 0:
        raise ValueError(f"no shear strength below M15 (fck {fck})")
    return grades[row]


def shear_strength(pt: float, fck: float) -> float:
    """Return the design shear strength of concrete, linear between rows. [N/mm²]

    Parameters
    ----------
    pt : float
        100 As/(b d) of tension bars that go on at least d past the section. [%]
    fck : float
        Characteristic strength; grades between columns take the lower one. [N/mm²]

    Raises
    ------
    ValueError
        Below M15.

    References
    ----------
    .. [1] IS 456:2000, Table 19 (confirmed on the page).
    """
    row = TABLE_19[_grade(fck)]
    if pt <= TABLE_19_PT[0]:
        return row[0]
    if pt >= TABLE_19_PT[-1]:
        return row[-1]
    i = bisect_right(TABLE_19_PT, pt) - 1
    share = (pt - TABLE_19_PT[i]) / (TABLE_19_PT[i + 1] - TABLE_19_PT[i])
    return row[i] + share * (row[i + 1] - row[i])


def max_shear_stress(fck: float) -> float:
    """Return the greatest nominal shear stress, whatever the links. [N/mm²]

    Parameters
    ----------
    fck : float
        Characteristic strength. [N/mm²]

    Raises
    ------
    ValueError
        Below M15.

    References
    ----------
    .. [1] IS 456:2000, Table 20 (confirmed on the page).
    """
    return TABLE_20[_grade(fck)]


def enhanced_shear(tau_c: float, d: float, av: float) -> float:
    """Return the shear strength at a section close to a support, on its face's side. [N/mm²]

    Parameters
    ----------
    tau_c : float
        Strength by Table 19. [N/mm²]
    d : float
        Effective depth. [mm]
    av : float
        Distance of the section from the face of the support. [mm]

    References
    ----------
    .. [1] IS 456:2000, 40.5.1 (confirmed on the page).
    """
    return tau_c * max(1.0, 2 * d / av) if av > 0 else tau_c


def link_shear(asv: float, s: float, d: float, fy: float) -> float:
    """Return the shear that upright links carry. [N]

    Parameters
    ----------
    asv : float
        Area of all legs of one link. [mm²]
    s : float
        Spacing. [mm]
    d : float
        Effective depth. [mm]
    fy : float
        Of the links; no more than 415 counts. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 40.4 a (confirmed on the page).
    """
    return 0.87 * min(fy, LINK_FY_LIMIT) * asv * d / s


def bent_up_shear(asv: float, angle_sin: float, fy: float) -> float:
    """Return the shear that bars bent up at one place carry. [N]

    Parameters
    ----------
    asv : float
        Area of the bars bent up. [mm²]
    angle_sin : float
        Sine of their slope, at least that of 45°. [-]
    fy : float
        Of the bars; no more than 415 counts. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 40.4 c (confirmed on the page).
    """
    return 0.87 * min(fy, LINK_FY_LIMIT) * asv * angle_sin


def torsion_shear(v: float, t: float, b: float) -> float:
    """Return the equivalent shear. [N]

    Parameters
    ----------
    v : float
        Shear. [N]
    t : float
        Torsion. [N·mm]
    b : float
        Width of the web. [mm]

    References
    ----------
    .. [1] IS 456:2000, 41.3.1 (confirmed on the page).
    """
    return v + 1.6 * t / b


def torsion_moment(t: float, depth: float, b: float) -> float:
    """Return the moment that torsion adds to bending. [N·mm]

    Parameters
    ----------
    t : float
        Torsion. [N·mm]
    depth : float
        Overall depth. [mm]
    b : float
        Width of the web. [mm]

    References
    ----------
    .. [1] IS 456:2000, 41.4.2 (confirmed on the page).
    """
    return t * (1 + depth / b) / 1.7


def torsion_link_area(
    t: float, v: float, s: float, b1: float, d1: float, fy: float, *, floor: float
) -> Required:
    """Return the area of two-legged closed links for torsion and shear. [mm²]

    Parameters
    ----------
    t : float
        Torsion. [N·mm]
    v : float
        Shear. [N]
    s : float
        Spacing. [mm]
    b1 : float
        Centre distance of corner bars across. [mm]
    d1 : float
        Centre distance of corner bars in height. [mm]
    fy : float
        Of the links; no more than 415 counts. [N/mm²]
    floor : float
        (τve − τc) b, the floor of the clause. [N/mm]

    References
    ----------
    .. [1] IS 456:2000, 41.4.3 (confirmed on the page).
    """
    design = 0.87 * min(fy, LINK_FY_LIMIT)
    asv = t * s / (b1 * d1 * design) + v * s / (2.5 * d1 * design)
    least = floor * s / design
    because = "torsion and shear" if asv >= least else "(τve − τc) b s / 0.87 fy"
    return Required(max(asv, least), "IS 456:2000, 41.4.3", because)
