;;; crossfoot.el --- The Crossfoot language server in Emacs  -*- lexical-binding: t; -*-

;; Package-Requires: ((emacs "28.1"))

;;; Commentary:

;; With eglot:     (require 'crossfoot), then M-x eglot in a draft.
;; With lsp-mode:  (require 'crossfoot), then M-x lsp in a draft.

;;; Code:

(defgroup crossfoot nil
  "Checks the statistics that a manuscript reports."
  :group 'text)

(defcustom crossfoot-command '("crossfoot" "serve")
  "The command that starts the server, and its arguments."
  :type '(repeat string))

(defcustom crossfoot-settings '()
  "Settings of the server, a property list such as (:inlayHints t)."
  :type 'plist)

(defconst crossfoot-modes
  '(markdown-mode gfm-mode poly-markdown-mode poly-quarto-mode quarto-mode latex-mode LaTeX-mode
    tex-mode html-mode mhtml-mode nxml-mode rst-mode org-mode typst-ts-mode adoc-mode text-mode)
  "The modes of documents that are read.")

;; Quarto and R Markdown are Markdown, if no other mode has been set for them.
(dolist (pattern '("\\.qmd\\'" "\\.[Rr]md\\'"))
  (unless (assoc pattern auto-mode-alist)
    (add-to-list 'auto-mode-alist
                 (cons pattern (if (fboundp 'markdown-mode) 'markdown-mode 'text-mode)))))

(defvar eglot-server-programs)

(defun crossfoot--options ()
  "Return what the server is told when it starts."
  (list :settings (or crossfoot-settings (make-hash-table :size 1))))

(with-eval-after-load 'eglot
  (add-to-list 'eglot-server-programs
               (cons crossfoot-modes
                     (lambda (&rest _)
                       (append crossfoot-command
                               (list :initializationOptions (crossfoot--options)))))))

(declare-function lsp-register-client "ext:lsp-mode")
(declare-function make-lsp-client "ext:lsp-mode")
(declare-function lsp-stdio-connection "ext:lsp-mode")
(defvar lsp-language-id-configuration)

(with-eval-after-load 'lsp-mode
  (dolist (pair '(("\\.qmd\\'" . "quarto") ("\\.[Rr]md\\'" . "rmd")))
    (add-to-list 'lsp-language-id-configuration pair))
  (lsp-register-client
   (make-lsp-client
    :new-connection (lsp-stdio-connection (lambda () crossfoot-command))
    :major-modes crossfoot-modes
    :add-on? t
    :server-id 'crossfoot
    :initialization-options #'crossfoot--options)))

(declare-function eglot-current-server "ext:eglot")
(declare-function eglot-execute-command "ext:eglot")
(declare-function eglot--path-to-uri "ext:eglot")
(declare-function lsp-workspace-command-execute "ext:lsp-mode")
(declare-function lsp--buffer-uri "ext:lsp-mode")

(defun crossfoot-summary ()
  "Show how many results of this document agree, and what disagrees."
  (interactive)
  (if (bound-and-true-p lsp-mode)
      (lsp-workspace-command-execute "crossfoot.summary" (vector (lsp--buffer-uri)))
    (eglot-execute-command (eglot-current-server) 'crossfoot.summary
                           (vector (eglot--path-to-uri buffer-file-name)))))

(provide 'crossfoot)
;;; crossfoot.el ends here
