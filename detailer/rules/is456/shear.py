"""Shear and torsion: IS 456:2000, 40 and 41, Tables 19 and 20."""

from __future__ import annotations

from bisect import bisect_right
from collections.abc import Mapping
from math import cos, radians, sin

from detailer.values import Required

TABLE_19_PT = (0.15, 0.25, 0.50, 0.75, 1.00, 1.25, 1.50, 1.75, 2.00, 2.25, 2.50, 2.75, 3.00)
"""Rows of Table 19: 100 As/(b d). [%]"""

TABLE_19: Mapping[int, tuple[float, ...]] = {
    15: (0.28, 0.35, 0.46, 0.54, 0.60, 0.64, 0.68, 0.71, 0.71, 0.71, 0.71, 0.71, 0.71),
    20: (0.28, 0.36, 0.48, 0.56, 0.62, 0.67, 0.72, 0.75, 0.79, 0.81, 0.82, 0.82, 0.82),
    25: (0.29, 0.36, 0.49, 0.57, 0.64, 0.70, 0.74, 0.78, 0.82, 0.85, 0.88, 0.90, 0.92),
    30: (0.29, 0.37, 0.50, 0.59, 0.66, 0.71, 0.76, 0.80, 0.84, 0.88, 0.91, 0.94, 0.96),
    35: (0.29, 0.37, 0.50, 0.59, 0.67, 0.73, 0.78, 0.82, 0.86, 0.90, 0.93, 0.96, 0.99),
    40: (0.30, 0.38, 0.51, 0.60, 0.68, 0.74, 0.79, 0.84, 0.88, 0.92, 0.95, 0.98, 1.01),
}
"""Design shear strength of concrete by grade, at the percentages of TABLE_19_PT. [N/mm²]"""

TABLE_20: Mapping[int, float] = {15: 2.5, 20: 2.8, 25: 3.1, 30: 3.5, 35: 3.7, 40: 4.0}
"""Greatest shear stress by grade. [N/mm²]"""

LINK_FY_LIMIT = 415.0
"""Strength of links counts no higher, 40.4. [N/mm²]"""

BENT_UP_SHARE = 0.5
"""Bars bent up carry at most this share of the shear left to steel, 40.4."""


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
    """Return the shear strength at a section close to a support. [N/mm²]

    Sections nearer than 2 d to the face gain; at the face itself no gain is counted, and the
    stress stays bound by :func:`max_shear_stress`.

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


def shear_stress(v: float, b: float, d: float, *, slope_moment: float = 0.0) -> float:
    """Return the nominal shear stress. [N/mm²]

    Parameters
    ----------
    v : float
        Shear. [N]
    b : float
        Width of the web. [mm]
    d : float
        Effective depth. [mm]
    slope_moment : float
        M tan β of a beam of varying depth: positive where the moment grows with the depth. [N·mm]

    References
    ----------
    .. [1] IS 456:2000, 40.1 and 40.1.1 (confirmed on the page).
    """
    return (v - slope_moment / d) / (b * d)


def inclined_link_shear(asv: float, s: float, d: float, fy: float, angle: float) -> float:
    """Return the shear that inclined links, or a series of bent-up bars, carry. [N]

    Parameters
    ----------
    asv : float
        Area of one link or bend, all legs. [mm²]
    s : float
        Spacing along the beam. [mm]
    d : float
        Effective depth. [mm]
    fy : float
        Of the links; no more than 415 counts. [N/mm²]
    angle : float
        Slope to the axis of the beam, at least 45. [degrees]

    Raises
    ------
    ValueError
        Flatter than 45°.

    References
    ----------
    .. [1] IS 456:2000, 40.4 b (confirmed on the page).
    """
    if angle < 45:
        raise ValueError(f"links slope at least 45°, not {angle:g}°")
    return link_shear(asv, s, d, fy) * (sin(radians(angle)) + cos(radians(angle)))


def near_support_links(
    tau_v: float, tau_c: float, b: float, d: float, av: float, fy: float
) -> Required:
    """Return the links, all together, for a section close to a support. [mm²]

    They stand within the middle three quarters of `av`.

    Parameters
    ----------
    tau_v : float
        Nominal shear stress. [N/mm²]
    tau_c : float
        Strength by Table 19. [N/mm²]
    b : float
        Width of the web. [mm]
    d : float
        Effective depth. [mm]
    av : float
        Distance of the section from the face of the support. [mm]
    fy : float
        Of the links; no more than 415 counts. [N/mm²]

    References
    ----------
    .. [1] IS 456:2000, 40.5.2 with Amendment 4 (confirmed on the page).
    """
    design = 0.87 * min(fy, LINK_FY_LIMIT)
    stress = tau_v - 2 * d * tau_c / av
    because = "what concrete leaves" if stress >= 0.4 else "0.4 N/mm²"
    return Required(av * b * max(stress, 0.4) / design, "IS 456:2000, 40.5.2", because)


def torsion_moments(m: float, t: float, depth: float, b: float) -> tuple[float, float]:
    """Return the moments for the tension face and for the other face, unsigned. [N·mm]

    Parameters
    ----------
    m : float
        Bending moment, unsigned. [N·mm]
    t : float
        Torsion. [N·mm]
    depth : float
        Overall depth. [mm]
    b : float
        Width of the web. [mm]

    References
    ----------
    .. [1] IS 456:2000, 41.4.2 and 41.4.2.1 (confirmed on the page): M + Mt; Mt − M where Mt is
       the greater, else nothing. None of it where the equivalent stress stays under τc (41.3.2).
    """
    added = torsion_moment(t, depth, b)
    return m + added, max(added - m, 0.0)
