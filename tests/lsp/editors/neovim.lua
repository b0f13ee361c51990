-- Run by test_neovim.py: goes through a draft as its author would, and writes down what it saw.
local out = assert(os.getenv("CROSSFOOT_OUT"))
local seen = { version = vim.version().major .. "." .. vim.version().minor }

local function finish()
  local file = assert(io.open(out, "w"))
  file:write(vim.fn.json_encode(seen))
  file:close()
  vim.cmd("qa!")
end

local function wait(what, condition)
  if not vim.wait(30000, condition, 20) then
    seen.gave_up = what
    finish()
  end
end

local function ask(method, extra)
  local params = vim.lsp.util.make_position_params(0, "utf-16")
  for key, value in pairs(extra or {}) do
    params[key] = value
  end
  for _, answer in pairs(vim.lsp.buf_request_sync(0, method, params, 10000) or {}) do
    return answer.result
  end
end

local function main()
  local function clients()
    return (vim.lsp.get_clients or vim.lsp.get_active_clients)()
  end
  wait("a client", function()
    return #clients() > 0 and clients()[1].server_capabilities ~= nil
  end)
  seen.client = clients()[1].name
  wait("diagnostics", function()
    return #vim.diagnostic.get(0) > 0
  end)
  local found = vim.diagnostic.get(0)
  seen.count = #found
  seen.diagnostic = { found[1].lnum, found[1].col, found[1].code, found[1].message }
  vim.api.nvim_win_set_cursor(0, { found[1].lnum + 1, found[1].col + 1 })
  seen.hover = ask("textDocument/hover").contents.value
  local range = { start = { line = found[1].lnum, character = found[1].col } }
  range["end"] = range.start
  local actions = ask("textDocument/codeAction", { range = range, context = { diagnostics = {} } })
  seen.actions = vim.tbl_map(function(action)
    return action.title
  end, actions)
  vim.lsp.util.apply_workspace_edit(actions[1].edit, "utf-16")
  seen.line = vim.api.nvim_get_current_line()
  wait("no diagnostics", function()
    return #vim.diagnostic.get(0) == 0
  end)
  vim.api.nvim_buf_set_lines(0, -1, -1, true, { "", "Now *t*(40) = 2.20, *p* = .533." })
  wait("the new diagnostic", function()
    return #vim.diagnostic.get(0) == 1
  end)
  seen.typed = vim.diagnostic.get(0)[1].code
  local symbols = ask("textDocument/documentSymbol")
  seen.symbol = symbols[1].name
  if vim.lsp.inlay_hint then
    local all = { start = { line = 0, character = 0 }, ["end"] = { line = 9, character = 0 } }
    seen.hints = #ask("textDocument/inlayHint", { range = all })
  end
  vim.cmd("CrossfootSummary")
  finish()
end

vim.defer_fn(function()
  local fine, problem = pcall(main)
  if not fine then
    seen.problem = tostring(problem)
    finish()
  end
end, 50)
