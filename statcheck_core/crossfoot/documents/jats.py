"""JATS XML, in which journals keep their articles."""

from __future__ import annotations

from crossfoot.documents.markup_reader import markup_reader
from crossfoot.documents.markup_text import Dialect
from crossfoot.documents.words import words

DIALECT = Dialect(
    blocks=words(
        "abstract ack app app-group article article-title attrib back body boxed-text caption "
        "statement def def-item disp-quote fig fig-group floats-group fn fn-group front "
        "label notes p sec speech subject supplementary-material table table-wrap table-wrap-foot "
        "table-wrap-group tbody td term tfoot th thead title title-group tr trans-abstract "
        "verse-group article-meta sub-article response list-item subtitle"
    ),
    headings={"title": 0, "article-title": 1},
    hidden=words(
        "journal-meta contrib-group aff pub-date permissions history ref-list kwd-group "
        "custom-meta-group article-id article-categories volume issue fpage lpage elocation-id "
        "author-notes funding-group counts self-uri object-id related-article product "
        "processing-meta pub-history article-version textual-form subj-group"
    ),
    lists=frozenset(("list", "def-list")),
    items=frozenset(("list-item", "def-item")),
    within_items=frozenset(("p", "list-item", "def-item", "def", "term", "title", "label")),
    sections=frozenset(("sec", "abstract", "ack", "app", "trans-abstract")),
)

READER = markup_reader(DIALECT)
