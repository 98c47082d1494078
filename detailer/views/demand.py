"""The moments a beam's diagram shows, sampled from its envelope and its placed steel."""

from __future__ import annotations

import numpy as np

from detailer.cage.bar import Cage
from detailer.model import Beam, Project
from detailer.statics import Envelope
from detailer.views.diagram import Curves

STEP = 50.0
"""Between two places at which moments are taken. [mm]"""


def curves_of(project: Project, beam: Beam, envelope: Envelope | None, cage: Cage) -> Curves | None:
    """Return what the moment diagram shows; None without design results.

    Parameters
    ----------
    project, beam : Project, Beam
        What was asked.
    envelope : Envelope or None
        What the design asks for.
    cage : Cage
        What was placed.
    """
    if envelope is None:
        return None
    xs: list[float] = []
    for span in beam.spans:
        xs += [float(x) for x in envelope.sample(span, STEP)]
    least, most = envelope.moments(np.asarray(xs))
    return Curves(
        xs=tuple(xs),
        most=tuple(max(float(m), 0.0) for m in most),
        least=tuple(min(float(m), 0.0) for m in least),
    )
