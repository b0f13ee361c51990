;;; Run by test_emacs.py: goes through a draft with lsp-mode, and writes down what it saw.
;;; -*- lexical-binding: t; -*-

(require 'json)
(require 'lsp-mode)
(require 'crossfoot)

(setq crossfoot-command (json-parse-string (getenv "CROSSFOOT_COMMAND") :array-type 'list)
      crossfoot-settings '(:inlayHints t)
      lsp-auto-guess-root t
      lsp-restart 'ignore
      lsp-response-timeout 60
      lsp-diagnostics-provider :flymake
      lsp-enable-file-watchers nil)

(defvar seen nil)

(defun see (key value) (push (cons key value) seen))

(defun await (what condition)
  "Wait for CONDITION."
  (let ((end (+ (float-time) 60)))
    (while (not (funcall condition))
      (when (> (float-time) end) (error "Gave up waiting for %s" what))
      (accept-process-output nil 0.05))))

(defun found ()
  "Return what is found in the draft."
  (gethash (lsp--fix-path-casing buffer-file-name) (lsp-diagnostics)))

(condition-case problem
    (progn
      (find-file (getenv "CROSSFOOT_DRAFT"))
      (see 'mode (symbol-name major-mode))
      (lsp)
      (await "the server" (lambda () (lsp-workspaces)))
      (see 'server (symbol-name (lsp--workspace-server-id (car (lsp-workspaces)))))
      (await "diagnostics" #'found)
      (let* ((diagnostic (car (found)))
             (region (lsp--range-to-region (lsp:diagnostic-range diagnostic))))
        (see 'text (buffer-substring (car region) (cdr region)))
        (see 'message (lsp:diagnostic-message diagnostic))
        (goto-char (1+ (car region))))
      (let ((hover (lsp-request "textDocument/hover" (lsp--text-document-position-params))))
        (see 'hover (lsp:markup-content-value (lsp:hover-contents hover))))
      (let ((actions (lsp-code-actions-at-point)))
        (see 'actions (vconcat (mapcar #'lsp:code-action-title actions)))
        (lsp-execute-code-action (elt actions 0)))
      (see 'line (buffer-substring (line-beginning-position) (line-end-position)))
      (await "no diagnostics" (lambda () (not (found))))
      (goto-char (point-max))
      (insert "\nNow t(40) = 2.20, p = .533.\n")
      (await "the new diagnostic" #'found)
      (see 'typed (lsp:diagnostic-message (car (found))))
      (crossfoot-summary)
      (see 'outline (lsp:document-symbol-name
                     (elt (lsp-request "textDocument/documentSymbol"
                                       (lsp-make-document-symbol-params
                                        :text-document (lsp--text-document-identifier)))
                          0)))
      (lsp-workspace-shutdown (car (lsp-workspaces))))
  (error (see 'problem (error-message-string problem))))

(with-temp-file (getenv "CROSSFOOT_OUT")
  (insert (json-encode seen)))
