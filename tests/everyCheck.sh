#!/usr/bin/env bash
# Every check and test of the project, in the order that fails soonest. `npm test`, `npm run check` and .ci/run are this file.
set -euo pipefail
cd "$(dirname "$0")/.."

step() {
	printf '\n== %s\n' "$1"
	shift
	"$@"
}

bash tests/ensureChromium.sh
step 'compiled kernel' npm run --silent kernel
step 'generated types' npx svelte-kit sync
step 'format' npm run --silent check:format
step 'lint' npm run --silent check:lint
step 'import rules' npm run --silent check:imports
step 'unused code' npm run --silent check:unused
step 'types' npm run --silent check:types
step 'build' npm run --silent build
step 'unit, reference and integration tests' npm run --silent test:unit
step 'browser tests' npm run --silent test:browser
