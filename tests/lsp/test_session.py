"""A session with `deckline serve` by a client that others wrote (pytest-lsp, on pygls): it touches every request.

The capabilities of three editors are played, as that library has them.
"""

import asyncio
import os
import pathlib

import pytest
import pytest_lsp
from lsprotocol import types
from pytest_lsp import ClientServerConfig, LanguageClient, client_capabilities

SHARED = """\
# The air of the observing floor.
given
    T_floor = 8 degC "air of the observing floor"

fluid cabinet_air
    substance      air
    reference      25 degC at 0.79 bar
    density-law    boussinesq
"""

DECK = """\
include "shared.buoy"

case "Cabinet, fans off 🌡"
    gravity        9.81 m/s^2 along -z

given
    height = 1.1 m "inside height"
    P_boards = 180 W
    idle = 2*height

region cabinet
    box            0.5 m by 0.6 m by height
    filled with    cabinet_air
    flow           laminar

boundary boards of cabinet
    side           west
    wall
    heated by      P_boards

boundary skin of cabinet
    side           east
    wall
    exchanges      6 W/m^2/K with T_floor

boundary rest of cabinet
    side           remaining
    wall
    insulated

run
    steady
"""


@pytest.fixture(scope="module")
def folder(tmp_path_factory) -> pathlib.Path:
    folder = tmp_path_factory.mktemp("decks").resolve()
    (folder / "shared.buoy").write_text(SHARED)
    (folder / "cabinet.buoy").write_text(DECK)
    (folder / "other.buoy").write_text('include "shared.buoy"\n\nrequire\n    T_floor < 300 K\n')
    return folder


EDITORS = ["visual-studio-code", "neovim", "emacs"]


@pytest_lsp.fixture(
    config=ClientServerConfig(server_command=[os.environ["DECKLINE"], "serve"]),
    params=EDITORS,
)
async def client(lsp_client: LanguageClient, request, folder):
    lsp_client.registered = []

    # What the library says that these editors can, and does not do itself.
    @lsp_client.feature(types.CLIENT_REGISTER_CAPABILITY)
    def _(params: types.RegistrationParams):
        lsp_client.registered += [one.method for one in params.registrations]

    @lsp_client.feature(types.WORKSPACE_INLAY_HINT_REFRESH)
    def _(_):
        pass

    result = await lsp_client.initialize_session(
        types.InitializeParams(
            capabilities=client_capabilities(request.param),
            process_id=os.getpid(),
            workspace_folders=[types.WorkspaceFolder(uri=folder.as_uri(), name="decks")],
        )
    )
    lsp_client.offered = result.capabilities
    lsp_client.editor = request.param
    yield
    await lsp_client.shutdown_session()


def document(folder, name="cabinet.buoy"):
    return types.TextDocumentIdentifier(uri=(folder / name).as_uri())


def position(needle: str, into: int = 0, text: str = DECK) -> types.Position:
    """Where a piece of text stands; only after ASCII on its line, where all encodings agree."""
    before = text[: text.index(needle) + into]
    line = before.rsplit("\n", 1)[-1]
    assert line.isascii()
    return types.Position(before.count("\n"), len(line))


def all_of_it(text: str = DECK) -> types.Range:
    return types.Range(types.Position(0, 0), types.Position(text.count("\n"), 0))


async def opened(client, folder, name="cabinet.buoy", text=DECK, version=1):
    item = types.TextDocumentItem(document(folder, name).uri, "buoy", version, text)
    client.text_document_did_open(types.DidOpenTextDocumentParams(item))
    return await findings(client, folder, name)


async def findings(client, folder, name="cabinet.buoy"):
    """What is found, by the way that the client has said it wants."""
    capabilities = client_capabilities(client.editor).text_document
    if capabilities.diagnostic is not None:
        report = await client.text_document_diagnostic_async(types.DocumentDiagnosticParams(document(folder, name)))
        return report.items
    while document(folder, name).uri not in client.diagnostics:
        await asyncio.wait_for(client.wait_for_notification(types.TEXT_DOCUMENT_PUBLISH_DIAGNOSTICS), 10)
    return client.diagnostics[document(folder, name).uri]


def close(client, folder, name="cabinet.buoy"):
    client.text_document_did_close(types.DidCloseTextDocumentParams(document(folder, name)))


async def test_what_is_offered(client):
    offered = client.offered
    assert offered.text_document_sync.change == types.TextDocumentSyncKind.Incremental
    for name in [
        "completion_provider", "hover_provider", "signature_help_provider", "inlay_hint_provider", "code_action_provider",
        "document_symbol_provider", "workspace_symbol_provider", "definition_provider", "references_provider",
        "document_highlight_provider", "rename_provider", "folding_range_provider", "selection_range_provider",
        "semantic_tokens_provider", "document_link_provider", "document_formatting_provider",
        "document_range_formatting_provider", "document_on_type_formatting_provider", "diagnostic_provider",
    ]:  # fmt: skip
        assert getattr(offered, name), name


async def test_findings_and_their_fixes(client, folder):
    found = await opened(client, folder)
    spacing = [one for one in found if one.code == "unit-spacing"]
    assert spacing and spacing[0].source == "deckline", found
    assert any(one.code == "unused-name" and types.DiagnosticTag.Unnecessary in (one.tags or []) for one in found)
    params = types.CodeActionParams(
        document(folder), spacing[0].range, types.CodeActionContext([spacing[0]], only=[types.CodeActionKind.QuickFix])
    )
    actions = await client.text_document_code_action_async(params)
    fix = next(one for one in actions if one.diagnostics)
    edit = fix.edit.changes[document(folder).uri][0]
    change = types.TextDocumentContentChangePartial(text=edit.new_text, range=edit.range)
    client.diagnostics.pop(document(folder).uri, None)
    client.text_document_did_change(
        types.DidChangeTextDocumentParams(types.VersionedTextDocumentIdentifier(2, document(folder).uri), [change])
    )
    assert not [one for one in await findings(client, folder) if one.code == "unit-spacing"]
    whole = types.CodeActionParams(document(folder), all_of_it(), types.CodeActionContext([]))
    kinds = {one.kind for one in await client.text_document_code_action_async(whole)}
    assert kinds & {types.CodeActionKind.Refactor, types.CodeActionKind.QuickFix}, kinds
    close(client, folder)


async def test_workspace_diagnostics(client, folder):
    await opened(client, folder)
    report = await client.workspace_diagnostic_async(types.WorkspaceDiagnosticParams([]))
    assert document(folder).uri in {item.uri for item in report.items}
    known = [types.PreviousResultId(item.uri, item.result_id) for item in report.items]
    again = await client.workspace_diagnostic_async(types.WorkspaceDiagnosticParams(known))
    mine = next(item for item in again.items if item.uri == document(folder).uri)
    assert mine.kind == "unchanged"
    close(client, folder)


async def test_completion_hover_and_signature(client, folder):
    await opened(client, folder)
    at = position("height\n    filled")
    answer = await client.text_document_completion_async(types.CompletionParams(document(folder), at))
    assert "height" in [item.label for item in answer.items]
    assert all(item.text_edit for item in answer.items)
    hover = await client.text_document_hover_async(types.HoverParams(document(folder), position("height = ", 2)))
    assert "inside height" in hover.contents.value
    help_params = types.SignatureHelpParams(document(folder), position("6 W/m^2/K", 1))
    signature = await client.text_document_signature_help_async(help_params)
    assert "exchanges" in signature.signatures[0].label
    path = types.CompletionParams(document(folder), position('"shared.buoy"', 3))
    answer = await client.text_document_completion_async(path)
    assert "shared.buoy" in [item.label for item in answer.items]
    close(client, folder)


async def test_inlay_hints_and_settings(client, folder):
    await opened(client, folder)
    params = types.InlayHintParams(document(folder), all_of_it())
    assert await client.text_document_inlay_hint_async(params)
    client.workspace_did_change_configuration(types.DidChangeConfigurationParams({"deckline": {"hints": False}}))
    assert not await client.text_document_inlay_hint_async(params)
    client.workspace_did_change_configuration(types.DidChangeConfigurationParams({"deckline": {}}))
    close(client, folder)


async def test_names_across_files(client, folder):
    await opened(client, folder)
    at = position("with T_floor", 6)
    found = await client.text_document_definition_async(types.DefinitionParams(document(folder), at))
    assert found[0].uri == document(folder, "shared.buoy").uri
    marks = await client.text_document_document_highlight_async(types.DocumentHighlightParams(document(folder), at))
    assert len(marks) == 1
    everywhere = types.ReferenceParams(types.ReferenceContext(True), document(folder), at)
    for _ in range(100):
        places = await client.text_document_references_async(everywhere)
        # `other.buoy` is known once the folder has been looked through.
        if len({place.uri for place in places}) == 3:
            break
        await asyncio.sleep(0.05)
    assert {place.uri for place in places} == {document(folder, it).uri for it in ["cabinet.buoy", "shared.buoy", "other.buoy"]}
    ready = await client.text_document_prepare_rename_async(types.PrepareRenameParams(document(folder), at))
    assert ready.placeholder == "T_floor"
    edit = await client.text_document_rename_async(types.RenameParams(document(folder), at, "T_ground"))
    assert sum(len(edits) for edits in edit.changes.values()) == 3
    with pytest.raises(Exception, match="name"):
        await client.text_document_rename_async(types.RenameParams(document(folder), at, "not a name"))
    close(client, folder)


async def test_symbols(client, folder):
    await opened(client, folder)
    symbols = await client.text_document_document_symbol_async(types.DocumentSymbolParams(document(folder)))
    assert any("cabinet" in symbol.name for symbol in symbols)
    for _ in range(100):
        found = await client.workspace_symbol_async(types.WorkspaceSymbolParams("T_floor"))
        if found:
            break
        await asyncio.sleep(0.05)
    assert any(symbol.location.uri == document(folder, "shared.buoy").uri for symbol in found)
    close(client, folder)


async def test_shape_of_the_text(client, folder):
    await opened(client, folder)
    folds = await client.text_document_folding_range_async(types.FoldingRangeParams(document(folder)))
    assert any(fold.start_line == position("region cabinet").line for fold in folds)
    at = [position("0.6 m", 1), position("steady", 1)]
    chains = await client.text_document_selection_range_async(types.SelectionRangeParams(document(folder), at))
    assert len(chains) == 2 and chains[0].parent
    links = await client.text_document_document_link_async(types.DocumentLinkParams(document(folder)))
    assert [link.target for link in links] == [document(folder, "shared.buoy").uri]
    close(client, folder)


async def test_semantic_tokens(client, folder):
    await opened(client, folder)
    full = await client.text_document_semantic_tokens_full_async(types.SemanticTokensParams(document(folder)))
    assert len(full.data) % 5 == 0 and full.data
    part = types.SemanticTokensRangeParams(document(folder), types.Range(types.Position(0, 0), types.Position(3, 0)))
    assert 0 < len((await client.text_document_semantic_tokens_range_async(part)).data) < len(full.data)
    change = types.TextDocumentContentChangePartial(
        text="# c\n", range=types.Range(types.Position(0, 0), types.Position(0, 0))
    )
    version = types.VersionedTextDocumentIdentifier(2, document(folder).uri)
    client.text_document_did_change(types.DidChangeTextDocumentParams(version, [change]))
    delta = await client.text_document_semantic_tokens_full_delta_async(
        types.SemanticTokensDeltaParams(document(folder), full.result_id)
    )
    now = await client.text_document_semantic_tokens_full_async(types.SemanticTokensParams(document(folder)))
    data = list(full.data)
    for edit in sorted(delta.edits, key=lambda edit: -edit.start):
        data[edit.start : edit.start + edit.delete_count] = edit.data or []
    assert data == list(now.data)
    close(client, folder)


async def test_formatting(client, folder):
    ragged = DECK.replace("    flow           laminar", "  flow laminar")
    await opened(client, folder, text=ragged)
    options = types.FormattingOptions(tab_size=4, insert_spaces=True)
    edits = await client.text_document_formatting_async(types.DocumentFormattingParams(document(folder), options))
    assert edits
    part = types.Range(position("region cabinet", text=ragged), position("boundary boards", text=ragged))
    edits = await client.text_document_range_formatting_async(
        types.DocumentRangeFormattingParams(document(folder), part, options)
    )
    assert edits
    behind = position("  flow laminar", len("  flow laminar"), ragged)
    enter = types.TextDocumentContentChangePartial(text="\n", range=types.Range(behind, behind))
    version = types.VersionedTextDocumentIdentifier(2, document(folder).uri)
    client.text_document_did_change(types.DidChangeTextDocumentParams(version, [enter]))
    await client.text_document_on_type_formatting_async(
        types.DocumentOnTypeFormattingParams(document(folder), types.Position(behind.line + 1, 0), "\n", options)
    )
    close(client, folder)


async def test_files_folders_and_saving(client, folder):
    await opened(client, folder)
    client.text_document_did_save(types.DidSaveTextDocumentParams(document(folder)))
    changed = types.FileEvent(document(folder, "shared.buoy").uri, types.FileChangeType.Changed)
    client.workspace_did_change_watched_files(types.DidChangeWatchedFilesParams([changed]))
    here = types.WorkspaceFolder(uri=folder.as_uri(), name="decks")
    for event in [types.WorkspaceFoldersChangeEvent([], [here]), types.WorkspaceFoldersChangeEvent([here], [])]:
        client.workspace_did_change_workspace_folders(types.DidChangeWorkspaceFoldersParams(event))
    assert await findings(client, folder) is not None
    close(client, folder)
