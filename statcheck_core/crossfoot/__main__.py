"""``python -m crossfoot``."""

import sys

from crossfoot.cli import main

if __name__ == "__main__":
    sys.exit(main())
