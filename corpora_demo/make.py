"""Write the invented manuscripts and their answer key.

    python corpora_demo/make.py            write the files
    python corpora_demo/make.py --check    say whether the files are as they would be written

Needs NumPy and SciPy. All numbers come from least-squares fits and tests of simulated data
(``making/fits.py``) with fixed seeds, so the files come out byte for byte the same each time.
"""

from __future__ import annotations

import json
import sys
from pathlib import Path

HERE = Path(__file__).resolve().parent
sys.path.insert(0, str(HERE))

from making import access, footing, timber, visitors, wildlife  # noqa: E402  # path set above
from making.paper import write_out  # noqa: E402  # path set above

ABOUT = (
    "What is wrong in the invented manuscripts of this folder. Each error gives the line of the "
    "file (in a notebook: the cell as its page, and the line in it), the number as printed and as it would be right, the slip, the identities that may "
    "report it, and the weakest severity that will do. A manuscript without errors is consistent."
)


def files() -> dict[str, str]:
    """Return the text of each file by its name."""
    texts, documents = {}, []
    for team in (access, footing, timber, visitors, wildlife):
        for paper in team.papers():
            texts[paper.path], errors = write_out(paper)
            documents.append(
                {
                    "path": paper.path,
                    "consistent": not errors,
                    "errors": [error._asdict() for error in errors],
                }
            )
    documents.sort(key=lambda document: str(document["path"]))
    key = {"about": ABOUT, "documents": documents}
    texts["key.json"] = json.dumps(key, ensure_ascii=False, indent=2) + "\n"
    return texts


def main(arguments: list[str]) -> int:
    """Write or check the files; 0 if all is as it should be."""
    if arguments not in ([], ["--check"]):
        print(__doc__, file=sys.stderr)
        return 2
    stale = []
    for name, text in files().items():
        path = HERE / name
        if arguments:
            if not path.exists() or path.read_bytes() != text.encode():
                stale.append(name)
        else:
            path.write_bytes(text.encode())
    for name in stale:
        print(f"{name} is not as make.py writes it", file=sys.stderr)
    return 1 if stale else 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
