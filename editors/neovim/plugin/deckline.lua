-- Decks of buoyancy-driven flow (*.buoy): the file type, and the language server. For Neovim 0.10 and later.

vim.filetype.add({ extension = { buoy = "buoy" } })

vim.api.nvim_create_autocmd("FileType", {
  pattern = "buoy",
  group = vim.api.nvim_create_augroup("deckline", {}),
  callback = function(event)
    vim.bo[event.buf].commentstring = "# %s"
    if vim.fn.executable("deckline") == 0 then
      vim.notify_once("deckline is not on the path; decks are not checked", vim.log.levels.WARN)
      return
    end
    vim.lsp.start({
      name = "deckline",
      cmd = { "deckline", "serve" },
      root_dir = vim.fs.root(event.buf, { "practice.buoy", ".git" }) or vim.fs.dirname(event.file),
      -- `gate`: the mildest level that is shown; `practice`: a file of house rules; `hints`: values beside words.
      init_options = vim.g.deckline or {},
    }, { bufnr = event.buf })
  end,
})
