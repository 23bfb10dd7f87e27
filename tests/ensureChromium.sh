#!/usr/bin/env bash
# Browser tests drive Debian's Chromium, PDF tests Debian's poppler. Installs them where that is possible, else says what to do.
set -euo pipefail

missing=()
[ -n "${CHROMIUM_PATH:-}" ] || command -v chromium >/dev/null 2>&1 || missing+=(chromium)
command -v pdffonts >/dev/null 2>&1 || missing+=(poppler-utils)
[ ${#missing[@]} -eq 0 ] && exit 0

if command -v apt-get >/dev/null 2>&1 && [ "$(id -u)" = 0 ]; then
	echo "Installing ${missing[*]} from Debian for the tests."
	apt-get update -qq
	DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "${missing[@]}" >/dev/null
	exit 0
fi
echo "The tests need ${missing[*]}. Install with: sudo apt-get install ${missing[*]}   (or set CHROMIUM_PATH to a Chromium)." >&2
exit 1
