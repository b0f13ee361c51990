"""``python -m crossfoot_lsp`` serves, as ``crossfoot serve`` does."""

import sys

from crossfoot_lsp import serve

sys.exit(serve())
