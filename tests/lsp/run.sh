#!/usr/bin/env bash
# Two clients that are not ours talk to the release binary and touch every request; then the long edits test and the
# latency. Puts what it installs under target/lsp.
set -euo pipefail
cd "$(dirname "$0")/../.."

cargo build --release --locked --quiet
program="$PWD/target/release/deckline"
place="$PWD/target/lsp"
mkdir -p "$place"

test -x "$place/venv/bin/pytest" || python3 -m venv "$place/venv"
"$place/venv/bin/pip" install --quiet --disable-pip-version-check -r tests/lsp/requirements.txt
DECKLINE="$program" "$place/venv/bin/pytest" -q -p no:cacheprovider -c /dev/null --rootdir tests/lsp \
    -o asyncio_mode=auto tests/lsp/test_session.py

cp tests/lsp/package.json tests/lsp/package-lock.json tests/lsp/session.mjs "$place/"
(cd "$place" && npm ci --silent --no-audit --no-fund && DECKLINE="$program" node session.mjs)

DECKLINE_EDITS=20000 cargo test --release --locked --test server_edits -- --nocapture
