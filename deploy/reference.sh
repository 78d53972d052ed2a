#!/usr/bin/env bash
# Compares the physiology with general libraries: steam tables, the standard
# atmosphere, units, and SciPy's roots, least squares and quantiles. It
# installs what is missing on a Debian machine, asks the libraries afresh, runs
# the tests named TestReference on their answers, prints the largest difference
# of each comparison with its bound, and fails when a bound is broken.
set -euo pipefail
cd "$(dirname "$0")/.."
ucum_version=7.1.10
python=/usr/bin/python3 # Debian's: its packages are not seen by another one
scratch="$(mktemp -d)"
trap 'rm -rf "$scratch"' EXIT

as_root() {
	if [ "$(id -u)" = 0 ]; then "$@"; else sudo "$@"; fi
}
quietly() {
	"$@" >"$scratch/log" 2>&1 || { cat "$scratch/log" >&2; echo "failed: $*" >&2; exit 1; }
}

missing=()
for module in scipy fluids iapws; do
	"$python" -c "import $module" 2>/dev/null || missing+=("python3-$module")
done
command -v node >/dev/null || missing+=(nodejs)
command -v npm >/dev/null || missing+=(npm)
if [ "${#missing[@]}" -gt 0 ]; then
	quietly as_root apt-get update -qq
	quietly as_root env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "${missing[@]}"
fi
mkdir "$scratch/node" "$scratch/answers"
quietly npm install --prefix "$scratch/node" --ignore-scripts --no-audit --no-fund --no-save "@lhncbc/ucum-lhc@$ucum_version"

PYTHONDONTWRITEBYTECODE=1 "$python" deploy/reference.py "$scratch/answers"
NODE_PATH="$scratch/node/node_modules" node deploy/reference_units.cjs "$scratch/answers"
head -qn1 "$scratch"/answers/*.csv | sort -u

status=0
for package in ./physio ./bot/shorthand; do
	go test -count=1 -v -run '^TestReference' "$package" -args -reference "$scratch/answers" >"$scratch/tests" 2>&1 || status=1
	if [ "$status" = 0 ]; then
		sed -nE 's/^ +[a-z_]*reference[a-z_]*\.go:[0-9]+: /  /p' "$scratch/tests"
	else
		cat "$scratch/tests"
		echo "a comparison with a library failed in $package" >&2
		break
	fi
done
exit "$status"
