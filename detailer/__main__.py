"""`python -m detailer`."""

import sys

from detailer.cli import main

if __name__ == "__main__":
    sys.exit(main())
