// A session with `deckline serve` by the protocol library of another editor's makers: it touches every request.
import assert from "node:assert/strict";
import { spawn } from "node:child_process";
import { mkdtempSync, realpathSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import protocol from "vscode-languageserver-protocol/node.js";

const { createProtocolConnection, StreamMessageReader, StreamMessageWriter } = protocol;

const shared = `given
    T_floor = 8 degC "air of the observing floor"

fluid cabinet_air
    substance      air
    reference      25 degC at 0.79 bar
    density-law    boussinesq
`;
const deck = `include "shared.buoy"

given
    height = 1.1 m "inside height"
    idle = 2*height

region cabinet
    box            0.5 m by 0.6 m by height
    filled with    cabinet_air
    flow           laminar

boundary skin of cabinet
    side           remaining
    wall
    exchanges      6 W/m^2/K with T_floor
`;

const folder = realpathSync(mkdtempSync(join(tmpdir(), "deckline-session-")));
const uriOf = (name) => pathToFileURL(join(folder, name)).toString();
writeFileSync(join(folder, "shared.buoy"), shared);
writeFileSync(join(folder, "cabinet.buoy"), deck);

const server = spawn(process.env.DECKLINE, ["serve"], { stdio: ["pipe", "pipe", "inherit"] });
const ended = new Promise((resolve) => server.on("exit", resolve));
const connection = createProtocolConnection(
    new StreamMessageReader(server.stdout),
    new StreamMessageWriter(server.stdin),
);

const findings = new Map();
const watchers = [];
connection.onNotification(protocol.PublishDiagnosticsNotification.type, (params) => {
    findings.set(`${params.uri} ${params.version}`, params.diagnostics);
    watchers.splice(0).forEach((wake) => wake());
});
const registered = [];
connection.onRequest(protocol.RegistrationRequest.type, (params) => {
    registered.push(...params.registrations.map((one) => one.method));
});
connection.listen();

const until = async (what, ask) => {
    for (const begun = Date.now(); Date.now() - begun < 20000; ) {
        const found = await ask();
        if (found) return found;
        await new Promise((resolve) => {
            watchers.push(resolve);
            setTimeout(resolve, 50);
        });
    }
    throw new Error(`${what} did not come`);
};

const textDocument = { uri: uriOf("cabinet.buoy") };
const position = (needle, into = 0) => {
    const before = deck.slice(0, deck.indexOf(needle) + into).split("\n");
    return { line: before.length - 1, character: before.at(-1).length };
};
const ask = (type, more) => connection.sendRequest(type, { textDocument, ...more });
const whole = { start: { line: 0, character: 0 }, end: { line: 99, character: 0 } };
let touched = 0;
const touch = async (name, check) => {
    await check();
    touched += 1;
};

const hello = await connection.sendRequest(protocol.InitializeRequest.type, {
    processId: process.pid,
    rootUri: null,
    workspaceFolders: [{ uri: pathToFileURL(folder).toString(), name: "decks" }],
    capabilities: {
        general: { positionEncodings: ["utf-16"] },
        workspace: { didChangeWatchedFiles: { dynamicRegistration: true }, workspaceFolders: true },
        textDocument: {
            publishDiagnostics: { relatedInformation: true, versionSupport: true },
            completion: { completionItem: { snippetSupport: true } },
            documentSymbol: { hierarchicalDocumentSymbolSupport: true },
            codeAction: { codeActionLiteralSupport: { codeActionKind: { valueSet: ["quickfix", "refactor", "source"] } } },
        },
    },
});
assert.equal(hello.capabilities.positionEncoding, "utf-16");
await connection.sendNotification(protocol.InitializedNotification.type, {});
await until("the registration", () => registered.includes("workspace/didChangeWatchedFiles"));

await connection.sendNotification(protocol.DidOpenTextDocumentNotification.type, {
    textDocument: { ...textDocument, languageId: "buoy", version: 1, text: deck },
});
const found = await until("findings", () => findings.get(`${textDocument.uri} 1`));
const spacing = found.find((one) => one.code === "unit-spacing");
assert.ok(spacing, JSON.stringify(found));

await touch("completion", async () => {
    const list = await ask(protocol.CompletionRequest.type, { position: position("height\n    filled") });
    assert.ok(list.items.some((item) => item.label === "height"));
});
await touch("hover", async () => {
    const hover = await ask(protocol.HoverRequest.type, { position: position("height = ", 2) });
    assert.match(hover.contents.value, /inside height/);
});
await touch("signature help", async () => {
    const help = await ask(protocol.SignatureHelpRequest.type, { position: position("6 W/m^2/K", 1) });
    assert.match(help.signatures[0].label, /exchanges/);
    const [start, end] = help.signatures[0].parameters[0].label;
    assert.ok(start < end && end <= help.signatures[0].label.length);
});
await touch("inlay hints", async () => {
    assert.ok((await ask(protocol.InlayHintRequest.type, { range: whole })).length > 0);
});
await touch("code actions", async () => {
    const actions = await ask(protocol.CodeActionRequest.type, {
        range: spacing.range,
        context: { diagnostics: [spacing], only: ["quickfix"] },
    });
    assert.ok(actions.some((action) => action.kind === "quickfix" && action.diagnostics.length === 1));
    const all = await ask(protocol.CodeActionRequest.type, { range: whole, context: { diagnostics: [], only: ["source"] } });
    assert.ok(all.every((action) => action.kind === "source.fixAll"));
});
await touch("symbols", async () => {
    const symbols = await ask(protocol.DocumentSymbolRequest.type, {});
    assert.ok(symbols.some((symbol) => symbol.name.includes("cabinet")));
    await until("symbols of the folder", async () => {
        const found = await connection.sendRequest(protocol.WorkspaceSymbolRequest.type, { query: "T_floor" });
        return found.some((symbol) => symbol.location.uri === uriOf("shared.buoy"));
    });
});
await touch("definition, references, highlights", async () => {
    const at = { position: position("with T_floor", 6) };
    assert.equal((await ask(protocol.DefinitionRequest.type, at))[0].uri, uriOf("shared.buoy"));
    const places = await ask(protocol.ReferencesRequest.type, { ...at, context: { includeDeclaration: true } });
    assert.equal(new Set(places.map((place) => place.uri)).size, 2);
    assert.equal((await ask(protocol.DocumentHighlightRequest.type, at)).length, 1);
});
await touch("rename", async () => {
    const at = { position: position("with T_floor", 6) };
    assert.equal((await ask(protocol.PrepareRenameRequest.type, at)).placeholder, "T_floor");
    const edit = await ask(protocol.RenameRequest.type, { ...at, newName: "T_ground" });
    assert.equal(Object.values(edit.changes).flat().length, 2);
    await assert.rejects(ask(protocol.RenameRequest.type, { ...at, newName: "9 lives" }), /name/);
});
await touch("folds, selections, links", async () => {
    assert.ok((await ask(protocol.FoldingRangeRequest.type, {})).length > 1);
    const [chain] = await ask(protocol.SelectionRangeRequest.type, { positions: [position("0.6 m", 1)] });
    assert.ok(chain.parent);
    assert.deepEqual((await ask(protocol.DocumentLinkRequest.type, {})).map((link) => link.target), [uriOf("shared.buoy")]);
});
await touch("semantic tokens", async () => {
    const full = await ask(protocol.SemanticTokensRequest.type, {});
    assert.ok(full.data.length > 0 && full.data.length % 5 === 0);
    const delta = await ask(protocol.SemanticTokensDeltaRequest.type, { previousResultId: full.resultId });
    assert.deepEqual(delta.edits, []);
    const range = { start: { line: 0, character: 0 }, end: { line: 2, character: 0 } };
    const part = await ask(protocol.SemanticTokensRangeRequest.type, { range });
    assert.ok(part.data.length < full.data.length);
});
await touch("formatting", async () => {
    const options = { tabSize: 4, insertSpaces: true };
    assert.ok(Array.isArray(await ask(protocol.DocumentFormattingRequest.type, { options })));
    assert.ok(Array.isArray(await ask(protocol.DocumentRangeFormattingRequest.type, { options, range: whole })));
    const at = { position: position("    filled"), ch: "\n", options };
    assert.ok(Array.isArray(await ask(protocol.DocumentOnTypeFormattingRequest.type, at)));
});
await touch("pulled findings", async () => {
    const report = await ask(protocol.DocumentDiagnosticRequest.type, {});
    assert.deepEqual(report.items, found);
    const again = await ask(protocol.DocumentDiagnosticRequest.type, { previousResultId: report.resultId });
    assert.equal(again.kind, "unchanged");
    const all = await connection.sendRequest(protocol.WorkspaceDiagnosticRequest.type, { previousResultIds: [] });
    assert.ok(all.items.some((item) => item.uri === textDocument.uri));
});
await touch("an edit", async () => {
    const range = { start: position("2*height"), end: position("2*height", 8) };
    await connection.sendNotification(protocol.DidChangeTextDocumentNotification.type, {
        textDocument: { ...textDocument, version: 2 },
        contentChanges: [{ range, text: "2 * height" }],
    });
    const after = await until("findings", () => findings.get(`${textDocument.uri} 2`));
    assert.ok(!after.some((one) => one.code === "unit-spacing"));
});
await touch("files, folders, settings, closing", async () => {
    await connection.sendNotification(protocol.DidSaveTextDocumentNotification.type, { textDocument });
    const changes = [{ uri: uriOf("shared.buoy"), type: 2 }];
    await connection.sendNotification(protocol.DidChangeWatchedFilesNotification.type, { changes });
    await connection.sendNotification(protocol.DidChangeConfigurationNotification.type, { settings: { deckline: {} } });
    const event = { added: [], removed: [{ uri: pathToFileURL(folder).toString(), name: "decks" }] };
    await connection.sendNotification(protocol.DidChangeWorkspaceFoldersNotification.type, { event });
    await connection.sendNotification(protocol.DidCloseTextDocumentNotification.type, { textDocument });
    await until("their end", () => findings.get(`${textDocument.uri} undefined`)?.length === 0);
});

await connection.sendRequest(protocol.ShutdownRequest.type);
await connection.sendNotification(protocol.ExitNotification.type);
assert.equal(await ended, 0);
connection.dispose();
rmSync(folder, { recursive: true });
console.log(`session.mjs: ${touched} groups of requests answered as they should be`);
