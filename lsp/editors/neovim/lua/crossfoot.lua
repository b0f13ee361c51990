-- The Crossfoot language server in Neovim, 0.7 and newer.
--
--   require("crossfoot").setup({ cmd = { "crossfoot", "serve" }, settings = { inlayHints = true } })

local M = {}

M.filetypes = {
  "markdown", "quarto", "rmd", "pandoc", "tex", "latex", "plaintex", "rnoweb", "html", "xml",
  "rst", "org", "typst", "asciidoc", "text",
}

local markers = { "crossfoot.toml", "pyproject.toml", ".git" }

-- Asks for the reason of an allowance; the server then writes the remark.
local function allow(command, context)
  local client = vim.lsp.get_client_by_id(context.client_id)
  vim.ui.input({ prompt = "It is right as printed because " }, function(reason)
    if reason and reason ~= "" then
      local arguments = command.arguments
      client.request("workspace/executeCommand", {
        command = "crossfoot.allow",
        arguments = { arguments[1], arguments[2], arguments[3], reason },
      }, nil, context.bufnr)
    end
  end)
end

function M.config(options)
  options = options or {}
  return {
    name = "crossfoot",
    cmd = options.cmd or { "crossfoot", "serve" },
    filetypes = options.filetypes or M.filetypes,
    init_options = { askReason = true, settings = options.settings or vim.empty_dict() },
    settings = { crossfoot = options.settings or vim.empty_dict() },
    commands = { ["crossfoot.allowWithReason"] = allow },
    root_markers = markers,
  }
end

-- Shows how many results of this document agree, and what disagrees.
function M.summary()
  local arguments = { vim.uri_from_bufnr(0) }
  vim.lsp.buf.execute_command({ command = "crossfoot.summary", arguments = arguments })
end

local function root(buffer)
  local path = vim.api.nvim_buf_get_name(buffer)
  local folder = vim.fn.fnamemodify(path ~= "" and path or vim.fn.getcwd(), ":p:h")
  while true do
    for _, marker in ipairs(markers) do
      if vim.loop.fs_stat(folder .. "/" .. marker) then
        return folder
      end
    end
    local parent = vim.fn.fnamemodify(folder, ":h")
    if parent == folder then
      return nil
    end
    folder = parent
  end
end

-- Neovim 0.7 knows no vim.lsp.start: one server a root folder, started with the first document.
local clients = {}

local function start(options, buffer)
  local config = M.config(options)
  config.root_dir = root(buffer)
  config.filetypes, config.root_markers = nil, nil
  if vim.lsp.start then
    return vim.lsp.start(config, { bufnr = buffer })
  end
  local key = config.root_dir or ""
  if not (clients[key] and vim.lsp.get_client_by_id(clients[key])) then
    clients[key] = vim.lsp.start_client(config)
  end
  if clients[key] then
    vim.lsp.buf_attach_client(buffer, clients[key])
  end
end

function M.setup(options)
  for pattern, name in pairs({ ["*.qmd"] = "quarto", ["*.[Rr]md"] = "rmd" }) do
    vim.api.nvim_create_autocmd({ "BufRead", "BufNewFile" }, {
      pattern = pattern,
      callback = function(event)
        vim.bo[event.buf].filetype = name
      end,
    })
  end
  vim.api.nvim_create_user_command("CrossfootSummary", M.summary, {})
  if vim.lsp.config and vim.lsp.enable then
    vim.lsp.config("crossfoot", M.config(options))
    vim.lsp.enable("crossfoot")
    return
  end
  vim.api.nvim_create_autocmd("FileType", {
    pattern = (options or {}).filetypes or M.filetypes,
    callback = function(event)
      start(options, event.buf)
    end,
  })
end

return M
