"""Writes a generated table in each format."""

from __future__ import annotations

import re
from collections.abc import Callable

from tables.drawn import Cell, Drawn, filled

_TAG = re.compile(r"<(/?)(i|sup|sub)>")
_NOTE = "Note. "


def _tagged(text: str, marks: dict[str, tuple[str, str]]) -> str:
    return _TAG.sub(lambda found: marks[found[2]][1 if found[1] else 0], text)


def _plain(text: str) -> str:
    return _tagged(text.replace("<sup>2</sup>", "²"), dict.fromkeys(("i", "sup", "sub"), ("", "")))


def _markdown(text: str) -> str:
    text = re.sub(r"\*+", lambda m: "\\*" * len(m[0]), text).replace("|", "\\|")
    return _tagged(text, {"i": ("*", "*"), "sup": ("^", "^"), "sub": ("~", "~")})


def _html(text: str) -> str:
    parts = _TAG.split(text)
    kept = [p.replace("&", "&amp;").replace("<", "&lt;") for p in parts[::3]]
    tags = [f"<{a}{b}>" for a, b in zip(parts[1::3], parts[2::3], strict=True)]
    return "".join(a + b for a, b in zip(kept, [*tags, ""], strict=True))


def _jats(text: str) -> str:
    return _html(text).replace("<i>", "<italic>").replace("</i>", "</italic>")


def _latex(text: str) -> str:
    text = text.replace("%", r"\%").replace("&", r"\&")
    text = re.sub(r"<sup>2</sup>|²", "$^2$", text)
    text = _tagged(text, {"i": (r"\textit{", "}"), "sup": ("$^{", "}$"), "sub": ("$_{", "}$")})
    text = text.replace("<", "$<$").replace(">", "$>$").replace("−", "$-$")
    for letter, name in (("η", "eta"), ("β", "beta"), ("χ", "chi"), ("Δ", "Delta"), ("×", "times")):
        text = text.replace(letter, f"$\\{name}$")
    return text


def _rst(text: str) -> str:
    text = re.sub(r"(?<!<i>)\*+", lambda m: "\\*" * len(m[0]), text).replace("|", "\\|")
    marks = {"i": ("*", "*\\ "), "sup": ("\\ :sup:`", "`\\ "), "sub": ("\\ :sub:`", "`\\ ")}
    return _tagged(text, marks)


def _org(text: str) -> str:
    text = text.replace("Δ<i>", "<i>Δ").replace("</i>²", "</i><sup>2</sup>")
    text = text.replace("|", "\\vert{}")
    return _tagged(text, {"i": ("/", "/"), "sup": ("^{", "}"), "sub": ("_{", "}")})


def _asciidoc(text: str) -> str:
    text = re.sub(r"\*+", lambda m: "{asterisk}" * len(m[0]), text).replace("|", "\\|")
    text = text.replace("<i>R</i>²", "__R__^2^").replace("Δ<i>F</i>", "ΔF")
    return _tagged(text, {"i": ("_", "_"), "sup": ("^", "^"), "sub": ("~", "~")})


def _grid(drawn: Drawn, inline: Callable[[str], str]) -> list[list[str]]:
    """Plain texts, a cell that spans columns followed by empty ones."""
    rows = []
    for row in drawn.rows:
        cells: list[str] = []
        for cell in row:
            cells += [inline(filled(cell.text, drawn.numbers)), *[""] * (cell.columns - 1)]
        rows.append(cells)
    return rows


def _words(drawn: Drawn, inline: Callable[[str], str]) -> tuple[str, list[str]]:
    return inline(filled(drawn.caption, drawn.numbers)), [
        inline(_NOTE + filled(note, drawn.numbers) if n == 0 else filled(note, drawn.numbers))
        for n, note in enumerate(drawn.notes)
    ]


def pipe(drawn: Drawn) -> str:
    rows = _grid(drawn, _markdown)
    caption, notes = _words(drawn, _markdown)
    lines = ["| " + " | ".join(row) + " |" for row in rows]
    lines.insert(1, "|" + "---|" * len(rows[0]))
    return "\n\n".join([caption, "\n".join(lines), *notes]) + "\n"


def _widths(rows: list[list[str]]) -> list[int]:
    return [
        max(3, *(len(row[i]) if i < len(row) else 0 for row in rows)) for i in range(len(rows[0]))
    ]


def grid(drawn: Drawn) -> str:
    """A grid table, as Pandoc and reStructuredText have it."""
    return _gridded(drawn, _markdown)


def _gridded(drawn: Drawn, inline: Callable[[str], str]) -> str:
    rows = _grid(drawn, inline)
    caption, notes = _words(drawn, inline)
    widths = _widths(rows)
    rule = "+" + "+".join("-" * (w + 2) for w in widths) + "+"
    lines = [rule]
    for number, row in enumerate(rows):
        lines.append(
            "|" + "|".join(f" {t.ljust(w)} " for t, w in zip(row, widths, strict=True)) + "|"
        )
        lines.append(rule.replace("-", "=") if number == drawn.heads - 1 else rule)
    return "\n\n".join([caption, "\n".join(lines), *notes]) + "\n"


def simple(drawn: Drawn) -> str:
    """A simple table of Pandoc's."""
    rows = _grid(drawn, _markdown)
    caption, notes = _words(drawn, _markdown)
    widths = _widths(rows)
    lines = [
        "  ".join(t.ljust(w) for t, w in zip(row, widths, strict=True)).rstrip() for row in rows
    ]
    lines.insert(1, "  ".join("-" * w for w in widths))
    return "\n\n".join([": " + caption, "\n".join(lines), *notes]) + "\n"


def html(drawn: Drawn) -> str:
    caption, notes = _words(drawn, _html)
    body = [
        _tr(row, drawn.numbers, "th" if n < drawn.heads else "td", _html)
        for n, row in enumerate(drawn.rows)
    ]
    head, rest = "".join(body[: drawn.heads]), "\n".join(body[drawn.heads :])
    table = (
        f"<table><caption>{caption}</caption>\n<thead>{head}</thead>\n<tbody>{rest}</tbody></table>"
    )
    return "\n".join([table, *(f"<p>{note}</p>" for note in notes)]) + "\n"


def _tr(row: list[Cell], numbers: list[str], tag: str, inline: Callable[[str], str]) -> str:
    cells = ""
    for cell in row:
        span = f' colspan="{cell.columns}"' if cell.columns > 1 else ""
        cells += f"<{tag}{span}>{inline(filled(cell.text, numbers))}</{tag}>"
    return f"<tr>{cells}</tr>"


def jats(drawn: Drawn) -> str:
    caption, notes = _words(drawn, _jats)
    rows = [_tr(row, drawn.numbers, "td", _jats) for row in drawn.rows]
    head, body = "".join(rows[: drawn.heads]), "\n".join(rows[drawn.heads :])
    foot = "".join(f"<p>{note}</p>" for note in notes)
    return (
        f"<sec><table-wrap><label>Table 1</label><caption><p>{caption}</p></caption>"
        f"<table><thead>{head}</thead><tbody>{body}</tbody></table>"
        f"<table-wrap-foot>{foot}</table-wrap-foot></table-wrap></sec>\n"
    )


def latex(drawn: Drawn) -> str:
    caption, notes = _words(drawn, _latex)
    lines = []
    for row in drawn.rows:
        cells = []
        for cell in row:
            text = _latex(filled(cell.text, drawn.numbers))
            text = re.sub(r"(?<=\d)(\*+)", r"$^{\1}$", text) if "(" not in text else text
            cells.append(
                f"\\multicolumn{{{cell.columns}}}{{c}}{{{text}}}" if cell.columns > 1 else text
            )
        lines.append(" & ".join(cells) + r" \\")
    lines.insert(drawn.heads, r"\midrule")
    width = sum(cell.columns for cell in drawn.rows[0])
    body = "\n".join([r"\toprule", *lines, r"\bottomrule"])
    below = "\n\n".join(f"\\footnotesize {note}" for note in notes)
    return (
        f"\\begin{{table}}\n\\caption{{{caption}}}\n\\begin{{tabular}}{{l{'r' * (width - 1)}}}\n"
        f"{body}\n\\end{{tabular}}\n\n{below}\n\\end{{table}}\n"
    )


def rst_grid(drawn: Drawn) -> str:
    return _gridded(drawn, _rst)


def rst_list(drawn: Drawn) -> str:
    rows = _grid(drawn, _rst)
    caption, notes = _words(drawn, _rst)
    lines = [f".. list-table:: {caption}", f"   :header-rows: {drawn.heads}", ""]
    for row in rows:
        lines += [f"   {'* ' if n == 0 else '  '}- {text}".rstrip() for n, text in enumerate(row)]
    return "\n\n".join(["\n".join(lines), *notes]) + "\n"


def org(drawn: Drawn) -> str:
    rows = _grid(drawn, _org)
    caption, notes = _words(drawn, _org)
    lines = ["| " + " | ".join(row) + " |" for row in rows]
    lines.insert(drawn.heads, "|" + "+".join("---" for _ in rows[0]) + "|")
    table = "\n".join([f"#+CAPTION: {caption}", *lines])
    # A note of its own that begins with a star would be a headline.
    return "\n\n".join([table, *([" ".join(notes)] if notes else [])]) + "\n"


def asciidoc(drawn: Drawn) -> str:
    caption, notes = _words(drawn, _asciidoc)
    width = sum(cell.columns for cell in drawn.rows[0])
    lines = [f".{caption}", f'[cols="{",".join("1" * width)}",options="header"]', "|==="]
    for row in drawn.rows:
        cells = []
        for cell in row:
            mark = f"{cell.columns}+|" if cell.columns > 1 else "|"
            cells.append(f"{mark} {_asciidoc(filled(cell.text, drawn.numbers))}")
        lines.append(" ".join(cells))
    return "\n\n".join(["\n".join([*lines, "|==="]), *notes]) + "\n"


def typst(drawn: Drawn) -> str:
    caption, notes = _words(drawn, _typst_inline)
    width = sum(cell.columns for cell in drawn.rows[0])
    lines = []
    for row in drawn.rows:
        cells = []
        for cell in row:
            text = f"[{_typst_inline(filled(cell.text, drawn.numbers))}]"
            cells.append(f"table.cell(colspan: {cell.columns}){text}" if cell.columns > 1 else text)
        lines.append("    " + ", ".join(cells) + ",")
    body = "\n".join(lines)
    table = f"#figure(\n  table(\n    columns: {width},\n{body}\n  ),\n  caption: [{caption}],\n)"
    return "\n\n".join([table, *notes]) + "\n"


def _typst_inline(text: str) -> str:
    text = re.sub(r"\*+", lambda m: "\\*" * len(m[0]), text)
    text = text.replace("<i>R</i>²", "$R^2$")
    text = re.sub(r"<(?!/?(?:i|sup|sub)>)", r"\\<", text)
    return _tagged(text, {"i": ("_", "_"), "sup": ("#super[", "]"), "sub": ("#sub[", "]")})


def aligned(drawn: Drawn) -> str:
    """Columns aligned by spaces, in plain text."""
    rows = _grid(drawn, _plain)
    caption, notes = _words(drawn, _plain)
    widths = _widths(rows)
    lines = [
        "  ".join(
            t.ljust(w) if n == 0 else t.rjust(w)
            for n, (t, w) in enumerate(zip(row, widths, strict=True))
        ).rstrip()
        for row in rows
    ]
    rule = "-" * max(map(len, lines))
    lines.insert(drawn.heads, rule)
    return "\n".join([caption, rule, *lines, rule, *notes]) + "\n"


def tabs(drawn: Drawn) -> str:
    rows = _grid(drawn, _plain)
    caption, notes = _words(drawn, _plain)
    return (
        "\n".join([caption, "", *("\t".join(row).rstrip("\t") for row in rows), "", *notes]) + "\n"
    )


#: Each way to write a table: its format, the writer.
WRITERS: dict[str, tuple[str, Callable[[Drawn], str]]] = {
    "pipe": ("markdown", pipe),
    "grid": ("markdown", grid),
    "simple": ("markdown", simple),
    "html": ("html", html),
    "html in markdown": ("markdown", html),
    "jats": ("jats", jats),
    "latex": ("latex", latex),
    "rst grid": ("rst", rst_grid),
    "rst list": ("rst", rst_list),
    "org": ("org", org),
    "asciidoc": ("asciidoc", asciidoc),
    "typst": ("typst", typst),
    "aligned": ("plain", aligned),
    "tabs": ("plain", tabs),
}
