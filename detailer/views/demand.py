"""The moments a beam's diagram shows, sampled from its envelope and its placed steel."""

from __future__ import annotations

from collections.abc import Callable
from typing import TypeAlias

import numpy as np

from detailer.model import Beam
from detailer.statics import Envelope
from detailer.views.diagram import Curves

STEP = 50.0
"""Between two places at which moments are taken. [mm]"""

Resistance: TypeAlias = Callable[[float, bool], float]
"""From a place, and whether it sags there, to what the placed steel resists. [mm, N·mm]"""


def curves_of(
    beam: Beam, envelope: Envelope | None, resistance: Resistance | None
) -> Curves | None:
    """Return what the moment diagram shows; None without design results.

    Parameters
    ----------
    beam : Beam
        The beam line.
    envelope : Envelope or None
        What the design asks for.
    resistance : callable or None
        What the placed steel resists, as a magnitude; None shows the envelope alone.
    """
    if envelope is None:
        return None
    xs = [float(x) for span in beam.spans for x in envelope.sample(span, STEP)]
    least, most = envelope.moments(np.asarray(xs))
    at = tuple(sorted(set(xs))) if resistance is not None else ()
    return Curves(
        xs=tuple(xs),
        most=tuple(max(float(m), 0.0) for m in most),
        least=tuple(min(float(m), 0.0) for m in least),
        at=at,
        sagging=tuple(resistance(x, True) for x in at) if resistance is not None else (),
        hogging=tuple(resistance(x, False) for x in at) if resistance is not None else (),
    )
