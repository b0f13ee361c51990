"""``crossfoot identities``: what is checked, by which formula, under which assumption."""

from __future__ import annotations

import sys
from argparse import ArgumentParser, Namespace

from crossfoot.cli.command import FINE, UNUSABLE, Command
from crossfoot.cli.streams import columns, complain
from crossfoot.laws.assumptions import ASSUMPTIONS
from crossfoot.laws.identity import Form, Identity
from crossfoot.output.wrapping import wrapped

_DESCRIPTION = """\
List the identities that reported numbers are checked against, or show all
about one of them: its formula, the assumption under which it holds, every form
it is solved to, and its source."""

_EPILOG = """\
examples:
  crossfoot identities
  crossfoot identities f-from-r2

exit status:
  0  shown
  2  there is no identity of that name"""


def configure(parser: ArgumentParser) -> None:
    """Declare the options."""
    parser.add_argument("slug", nargs="?", metavar="SLUG", help="the name of one identity")


def run(options: Namespace) -> int:
    """Print the table or the page."""
    from crossfoot.laws import IDENTITIES  # no other command's help needs them

    width = columns(sys.stdout)
    if options.slug is None:
        sys.stdout.write("\n".join(table(tuple(IDENTITIES.values()), width)) + "\n")
        return FINE
    identity = IDENTITIES.get(options.slug)
    if identity is None:
        complain(None, unknown(options.slug, tuple(IDENTITIES)))
        return UNUSABLE
    sys.stdout.write("\n".join(page(identity, width)) + "\n")
    return FINE


def table(identities: tuple[Identity, ...], width: int) -> list[str]:
    """Return a line or more for each identity: its name and its formula."""
    indent = max(len(identity.slug) for identity in identities) + 2
    lines = []
    for identity in identities:
        lines += wrapped(identity.formula, width, identity.slug.ljust(indent), " " * indent)
    return [*lines, "", "“crossfoot identities SLUG” shows all about one of them."]


def page(identity: Identity, width: int) -> list[str]:
    """Return all about one identity."""
    facts = [
        ("formula", identity.formula),
        ("holds when", identity.assumption),
        ("speaks of", ", ".join(identity.kinds)),
        ("source", identity.source),
    ]
    lines = [f"{identity.slug}: {identity.title}", ""]
    for label, words in facts:
        if words:
            lines += wrapped(words, width, f"  {label:12}", " " * 14)
    lines += ["", *wrapped(identity.explanation, width, "  ")]
    if identity.forms:
        lines += ["", "  It is computed as"]
    for form in identity.forms:
        lines += wrapped(f"{form.formula}{_unless_stated(form)}", width, "    ", "      ")
    return lines


def _unless_stated(form: Form) -> str:
    """Return what a form takes for granted, as the rest of its line."""
    if not form.assumed:
        return ""
    taken = " ".join(ASSUMPTIONS[key].text for key in form.assumed)
    return f" (a doubt only, unless the text says so: {taken})"


def unknown(slug: str, known: tuple[str, ...]) -> str:
    """Return what to say of a name that no identity has."""
    from difflib import get_close_matches  # only a mistake needs it

    near = get_close_matches(slug, known, 3, 0.5) or [name for name in known if slug in name][:3]
    meant = f" Perhaps {' or '.join(near)}?" if near else ""
    return f"There is no identity {slug!r}.{meant} “crossfoot identities” lists them all."


COMMAND = Command("identities", _DESCRIPTION, _EPILOG, configure, run)
