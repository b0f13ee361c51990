"""How the lines of Markdown are told apart; each pattern is matched from the start of a line."""

from __future__ import annotations

import re

QUOTE = re.compile(r"(?: {0,3}> ?)+")
#: The start of a chunk that is run: its lines are code, and what they print stands elsewhere.
EXECUTED = re.compile(r"\s*\{[A-Za-z]")
FENCE = re.compile(r"[ \t]*(?:(?:[-+*]|\d{1,9}[.)])[ \t]+)?(`{3,}(?=[^`]*$)|~{3,})")
ATX = re.compile(r" {0,3}(#{1,6})(?:[ \t]|$)")
PRINTED = re.compile(r" {0,3}(#>|## )")
RULE = re.compile(
    r" {0,3}(?:\*[ \t]*(?:\*[ \t]*){2,}+|-[ \t]*(?:-[ \t]*){2,}+|_[ \t]*(?:_[ \t]*){2,}+)$"
)
FULL = re.compile(r" {0,3}-{3,}[ \t]*")
SETEXT = re.compile(r" {0,3}(=+|-+)[ \t]*$")
ITEM = re.compile(
    r"[ \t]*(?:[-+*]|\d{1,9}[.)]|\(?[a-zA-Z0-9]{1,3}\)|\(@[\w-]{0,40}\)|#\.)(?:[ \t]|$)"
)
DIV = re.compile(r" {0,3}:{3,}")
LINK = re.compile(r" {0,3}\[(?!\^)[^\[\]\n]{1,200}\]:[ \t]*\S")
NOTE = re.compile(r" {0,3}\[\^[^\s\[\]]{1,60}\]:")
INDENTED = re.compile(r"(?: {4}| {0,3}\t)")
DEEP = re.compile(r"(?: {8}|\t\t| {4}\t|\t {4})")
HTML = re.compile(r" {0,3}<(table|pre|script|style|textarea)\b", re.I)
ENVIRONMENT = re.compile(r" {0,3}\\begin\{([A-Za-z]{1,30}\*?)\}")
TICKS = re.compile(r"`[^`\n]{0,500}<!--")
TABLES = frozenset(("table", "longtable", "tabular", "tabularx", "sidewaystable", "threeparttable"))
