"""Property tests draw the same examples on every machine; set HYPOTHESIS_SEEDLESS=1 to explore."""

import os

from hypothesis import settings

settings.register_profile("same", derandomize=True, deadline=None)
settings.register_profile("explore", deadline=None)
settings.load_profile("explore" if os.environ.get("HYPOTHESIS_SEEDLESS") else "same")
