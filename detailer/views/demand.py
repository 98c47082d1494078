"""The moments a beam's diagram shows, sampled from its envelope and its placed steel."""

from __future__ import annotations

import numpy as np

from detailer.model import Beam
from detailer.statics import Envelope
from detailer.strength.slices import Steel
from detailer.views.diagram import Curves

STEP = 50.0
"""Between two places at which moments are taken. [mm]"""


def curves_of(beam: Beam, envelope: Envelope | None, steel: Steel) -> Curves | None:
    """Return what the moment diagram shows; None without design results.

    Parameters
    ----------
    beam : Beam
        What was asked.
    envelope : Envelope or None
        What the design asks for.
    steel : Steel
        What was placed: each bar resists with the stress it develops.
    """
    if envelope is None:
        return None
    xs = np.concatenate([envelope.sample(span, STEP) for span in beam.spans])
    least, most = envelope.moments(xs)
    at = np.unique(xs)
    sagging, hogging = (
        tuple(r.moment for r in steel.profile(at, sagging=sense)) for sense in (True, False)
    )
    return Curves(
        xs=tuple(xs.tolist()),
        most=tuple(np.maximum(most, 0.0).tolist()),
        least=tuple(np.minimum(least, 0.0).tolist()),
        at=tuple(at.tolist()),
        sagging=sagging,
        hogging=hogging,
    )
