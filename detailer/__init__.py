"""From reinforced-concrete design results to placed bars, checked drawings and a schedule.

The verbs of the command line for Python are in :mod:`detailer.api`; `read`, `draw`, `check` and
`start` are also here, and load when they are first asked for. (`detailer.schedule` is the
package; its verb is :func:`detailer.api.schedule`.)
"""

from __future__ import annotations

__version__ = "0.1.0"

__all__ = ["__version__", "check", "draw", "read", "start"]

TYPE_CHECKING = False
if TYPE_CHECKING:
    from detailer.api import check, draw, read, start


def __getattr__(name: str) -> object:
    if name.startswith("_") or name not in __all__:
        raise AttributeError(f"module 'detailer' has no attribute {name!r}")
    from importlib import import_module

    verb: object = getattr(import_module("detailer.api"), name)
    return verb
