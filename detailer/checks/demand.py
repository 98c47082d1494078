"""The moments that bottom and top steel must resist along a span, torsion included."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from detailer.checks.case import Case
from detailer.model import Span
from detailer.statics import Envelope
from detailer.strength.torsion import added_moment, resisted, with_torsion
from detailer.values import Face

Floats = NDArray[np.float64]


def moments_asked(case: Case, envelope: Envelope, span: Span, xs: Floats) -> tuple[Floats, Floats]:
    """Return the moments asked of bottom and top steel, neither less than 0. [N·mm]

    Parameters
    ----------
    case : Case
        The member.
    envelope : Envelope
        Its envelope.
    span : Span
        One of its spans.
    xs : ndarray
        Places in it. [mm]

    References
    ----------
    .. [1] IS 456:2000, 41.3.2 and 41.4.2.
    """
    least, most = envelope.moments(xs)
    if not envelope.twisted:
        return np.maximum(most, 0.0), np.maximum(-least, 0.0)
    low, high = envelope.shears(xs)
    twist = resisted(
        case.shear, span, xs, (least, most), np.maximum(high, -low), envelope.torsions(xs)
    )
    return with_torsion(least, most, added_moment(twist, span.section))


def tension_asked(case: Case, envelope: Envelope, span: Span, face: Face, xs: Floats) -> Floats:
    """Return the moment asked of the steel of one face. [N·mm]

    Parameters
    ----------
    case : Case
        The member.
    envelope : Envelope
        Its envelope.
    span : Span
        One of its spans.
    face : Face
        TOP or BOTTOM.
    xs : ndarray
        Places in it. [mm]
    """
    return moments_asked(case, envelope, span, xs)[0 if face is Face.BOTTOM else 1]
