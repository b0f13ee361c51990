"""How the lines of Markdown are told apart; each pattern is matched from the start of a line."""

from __future__ import annotations

import re

from crossfoot.expressions import expression

QUOTE = expression(r"(?: {0,3}> ?)+")
#: The start of a chunk that is run: its lines are code, and what they print stands elsewhere.
EXECUTED = expression(r"\s*\{[A-Za-z]")
#: The start of markup that is passed on as it stands.
RAW = expression(r"\s*\{=(?:html|latex|tex)")
#: An option of such a chunk, and a caption among its options or in its first line.
OPTION = expression(r"[ \t]*(?:#|//|%%)\|")
CAPTIONED = expression(
    r"(?:fig|tbl|lst)[.-]cap[ \t]*[:=][ \t]*(?:\"((?:[^\"\\\n]|\\.){1,2000})\"|'([^'\n]{1,2000})'"
    r"|(?<=: )([^\s\"'>|!][^\n]*))"
)
FENCE = expression(r"[ \t]*(?:(?:[-+*]|\d{1,9}[.)])[ \t]+)?(`{3,}(?=[^`]*$)|~{3,})")
ATX = expression(r" {0,3}(#{1,6})(?:[ \t]|$)")
PRINTED = expression(r" {0,3}(#>|## )")
RULE = expression(
    r" {0,3}(?:\*[ \t]*(?:\*[ \t]*){2,}+|-[ \t]*(?:-[ \t]*){2,}+|_[ \t]*(?:_[ \t]*){2,}+)$"
)
FULL = expression(r" {0,3}-{3,}[ \t]*")
SETEXT = expression(r" {0,3}(=+|-+)[ \t]*$")
ITEM = expression(
    r"[ \t]*(?:[-+*]|\d{1,9}[.)]|\(?[a-zA-Z0-9]{1,3}\)|\(@[\w-]{0,40}\)|#\.)(?:[ \t]|$)"
)
DIV = expression(r" {0,3}:{3,}")
LINK = expression(r" {0,3}\[(?!\^)[^\[\]\n]{1,200}\]:[ \t]*\S")
NOTE = expression(r" {0,3}\[\^[^\s\[\]]{1,60}\]:")
INDENTED = expression(r"(?: {4}| {0,3}\t)")
DEEP = expression(r"(?: {8}|\t\t| {4}\t|\t {4})")
HTML = expression(r" {0,3}<(table|pre|script|style|textarea)\b", re.I)
ENVIRONMENT = expression(r" {0,3}\\begin\{([A-Za-z]{1,30}\*?)\}")
TICKS = expression(r"`[^`\n]{0,500}<!--")
TABLES = frozenset(("table", "longtable", "tabular", "tabularx", "sidewaystable", "threeparttable"))
