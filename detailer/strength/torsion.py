"""Bending that torsion adds: IS 456:2000, 41.3.2 and 41.4.2."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from detailer.model import Section, Span
from detailer.rules import is456
from detailer.strength.shear import Shear
from detailer.values import Face

Floats = NDArray[np.float64]


def added_moment(torsion: Floats, section: Section) -> Floats:
    """Return the moment that torsion adds to bending. [N·mm]

    Parameters
    ----------
    torsion : ndarray
        Unsigned; 0 where none need be resisted. [N·mm]
    section : Section
        Concrete section there.

    References
    ----------
    .. [1] IS 456:2000, 41.4.2.
    """
    return torsion * is456.torsion_moment(1.0, section.depth, section.width)


def with_torsion(least: Floats, most: Floats, added: Floats) -> tuple[Floats, Floats]:
    """Return the moments that bottom and top must resist, torsion included. [N·mm]

    Where a face is in tension its moment grows by Mt; where it is in compression and Mt is the
    greater, Mt less the moment puts it in tension after all. Of an envelope that is the greatest
    moment plus Mt for the bottom, and Mt less the least for the top.

    Parameters
    ----------
    least, most : ndarray
        Bending moments, sagging +. [N·mm]
    added : ndarray
        Mt, from :func:`added_moment`. [N·mm]

    References
    ----------
    .. [1] IS 456:2000, 41.4.2 and 41.4.2.1.
    """
    return np.maximum(most + added, 0.0), np.maximum(added - least, 0.0)


def resisted(
    shear: Shear,
    span: Span,
    xs: Floats,
    moments: tuple[Floats, Floats],
    force: Floats,
    twist: Floats,
) -> Floats:
    """Return the torsion that steel must resist: none where the equivalent shear stays under τc.

    Parameters
    ----------
    shear : Shear
        Links and bars of the beam.
    span : Span
        One of its spans.
    xs : ndarray
        Places in it. [mm]
    moments : (ndarray, ndarray)
        Least and greatest bending moment; the greater tells which face is in tension. [N·mm]
    force : ndarray
        Shear, unsigned. [N]
    twist : ndarray
        Torsion, unsigned. [N·mm]

    References
    ----------
    .. [1] IS 456:2000, 41.3.1 and 41.3.2.
    """
    found = np.array(twist, dtype=np.float64)
    for k in np.nonzero(found > 0)[0].tolist():
        face = Face.BOTTOM if moments[1][k] >= -moments[0][k] else Face.TOP
        asked = is456.torsion_shear(float(force[k]), float(found[k]), span.section.width)
        if asked <= shear.capacity(float(xs[k]), span, face).concrete:
            found[k] = 0.0
    return found
