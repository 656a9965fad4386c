#!/usr/bin/env bash
# One command runs Pegwell, without containers. What each word does is told by `./docker-free-dev.sh help`.
# Here only what must be true before any JavaScript can run.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")"

say() { printf '%s\n' "$1" >&2; }

if ! command -v node >/dev/null 2>&1; then
  say 'Pegwell runs on Node.js 20 (20.20 or a later 20), and no node is on the PATH. Please install it and try again.'
  exit 1
fi
if ! node -e 'const [a, b] = process.versions.node.split(".").map(Number); process.exit(a === 20 && b >= 20 ? 0 : 1)'; then
  say "Pegwell runs on Node.js 20 (20.20 or a later 20); the node on the PATH is $(node --version). Please install Node.js 20 and try again."
  exit 1
fi

exec node scripts/begin.cjs "$@"
