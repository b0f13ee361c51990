;;; Run by test_emacs.py: goes through a draft as its author would, and writes down what it saw.
;;; -*- lexical-binding: t; -*-

(require 'json)
(require 'eglot)
(require 'crossfoot)

(setq crossfoot-command (json-parse-string (getenv "CROSSFOOT_COMMAND") :array-type 'list)
      eglot-sync-connect 60
      eglot-connect-timeout 60
      eglot-confirm-server-initiated-edits nil)

(defvar seen nil)

(defun see (key value) (push (cons key value) seen))

(defun await (what condition)
  "Wait for CONDITION; without a person at the keys nothing is idle, so edits are sent here."
  (let ((end (+ (float-time) 30)))
    (while (not (funcall condition))
      (eglot--signal-textDocument/didChange)
      (when (> (float-time) end) (error "Gave up waiting for %s" what))
      (accept-process-output nil 0.05))))

(condition-case problem
    (progn
      (find-file (getenv "CROSSFOOT_DRAFT"))
      (see 'mode (symbol-name major-mode))
      (apply #'eglot--connect (eglot--guess-contact))
      (let ((server (eglot-current-server)))
        (see 'server (plist-get (eglot--server-info server) :name))
        (flymake-mode 1)
        (await "diagnostics" (lambda () (flymake-start) (flymake-diagnostics)))
        (let ((found (car (flymake-diagnostics))))
          (see 'text (buffer-substring (flymake-diagnostic-beg found) (flymake-diagnostic-end found)))
          (see 'message (flymake-diagnostic-text found))
          (goto-char (1+ (flymake-diagnostic-beg found))))
        (let ((hover (jsonrpc-request server :textDocument/hover
                                      (eglot--TextDocumentPositionParams))))
          (see 'hover (plist-get (plist-get hover :contents) :value)))
        (let* ((range (list :start (eglot--pos-to-lsp-position)
                            :end (eglot--pos-to-lsp-position)))
               (actions (jsonrpc-request
                         server :textDocument/codeAction
                         (list :textDocument (eglot--TextDocumentIdentifier)
                               :range range
                               :context (list :diagnostics [])))))
          (see 'actions (vconcat (mapcar (lambda (action) (plist-get action :title)) actions)))
          (eglot--apply-workspace-edit (plist-get (aref actions 0) :edit)))
        (see 'line (buffer-substring (line-beginning-position) (line-end-position)))
        (await "no diagnostics" (lambda () (flymake-start) (not (flymake-diagnostics))))
        (goto-char (point-max))
        (insert "\nNow t(40) = 2.20, p = .533.\n")
        (await "the new diagnostic" (lambda () (flymake-start) (flymake-diagnostics)))
        (see 'typed (flymake-diagnostic-text (car (flymake-diagnostics))))
        (crossfoot-summary)
        (see 'outline (caar (eglot-imenu)))
        (eglot-shutdown server)))
  (error (see 'problem (error-message-string problem))))

(with-temp-file (getenv "CROSSFOOT_OUT")
  (insert (json-encode seen)))
