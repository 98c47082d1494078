"""Draws the demo into output_samples, with a PNG of every sheet: `python -m tests.samples`.

The PNGs are at 110 dots an inch, near the size a sheet has on screen; they need the development
dependencies.
"""

from __future__ import annotations

import shutil
import sys
from pathlib import Path

import resvg_py

from detailer import api

DPI = 110
SAMPLES = Path(__file__).parents[1] / "output_samples"


def regenerate(target: Path = SAMPLES) -> None:
    """Write the folder anew."""
    if target.exists():
        shutil.rmtree(target)
    api.draw(out=target)
    for sheet in sorted((target / "drawings").glob("*.svg")):
        sheet.with_suffix(".png").write_bytes(picture(sheet))


def picture(sheet: Path) -> bytes:
    """Return a sheet as PNG."""
    return bytes(resvg_py.svg_to_bytes(svg_string=sheet.read_text(encoding="utf-8"), dpi=DPI))


if __name__ == "__main__":
    regenerate(*map(Path, sys.argv[1:]))
