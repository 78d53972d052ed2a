#!/usr/bin/env bash
# The one test command. It installs what it needs on a Debian machine with Go,
# and then checks format, code, tests with the race detector, fuzz targets and
# the static binary. It fails when a test was skipped.
#
# Usage: deploy/test.sh [seconds for each fuzz target, usually 5]
set -euo pipefail
cd "$(dirname "$0")/.."
fuzz_seconds="${1:-5}"
scratch="$(mktemp -d)"
current=start
finish() {
	code=$?
	rm -rf "$scratch"
	[ "$code" = 0 ] || printf '\nFAILED at: %s\n' "$current" >&2
}
trap finish EXIT
export GOFLAGS="${GOFLAGS:-} -mod=readonly"

step() {
	current="$1"
	printf '\n== %s (%s s)\n' "$1" "$SECONDS"
}
fail() {
	printf '%s\n' "$1" >&2
	exit 1
}

as_root() {
	if [ "$(id -u)" = 0 ]; then "$@"; else sudo "$@"; fi
}

# need COMMAND PACKAGE: installs the package where the command is missing.
updated=
need() {
	command -v "$1" >/dev/null && return
	if [ -z "$updated" ]; then
		as_root apt-get update -qq
		updated=yes
	fi
	as_root env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "$2" >"$scratch/apt" 2>&1 ||
		{ cat "$scratch/apt"; fail "could not install $2"; }
}

step "what the tests need"
command -v go >/dev/null || fail "Go is missing: install the version that go.mod names"
need redis-server redis-server
need bwrap bubblewrap
need gcc gcc # the race detector is C
[ -e /usr/include/stdio.h ] || need no-such-command libc6-dev
go mod download

step "format"
unformatted="$(gofmt -l .)"
[ -z "$unformatted" ] || fail "gofmt would change: $unformatted"
for script in deploy/*.sh .ci/run; do bash -n "$script"; done

step "go vet"
go vet ./...

step "staticcheck"
go tool staticcheck ./...

step "tests with the race detector"
if ! go test -race -timeout 7m -v ./... >"$scratch/tests" 2>&1; then
	grep -vE '^ *(=== (RUN|PAUSE|CONT|NAME)|--- PASS)|^PASS$' "$scratch/tests" | head -n 400 || true
	printf '%s passed, %s failed\n' "$(grep -cE '^--- PASS' "$scratch/tests")" "$(grep -cE '^--- FAIL' "$scratch/tests")"
	fail "tests"
fi
grep -E '^(ok|\?)' "$scratch/tests"
if grep -E '^ *--- SKIP' "$scratch/tests"; then fail "a test was skipped: every test must run here"; fi
passed="$(grep -cE '^--- PASS' "$scratch/tests")"

step "general reference libraries"
deploy/reference.sh

step "fuzz, $fuzz_seconds s a target"
targets=0
while IFS=: read -r file _ line; do
	target="$(sed -E 's/^func (Fuzz[A-Za-z0-9_]*).*/\1/' <<<"$line")"
	echo "$target in $(dirname "$file")"
	go test -run '^$' -fuzz "^$target\$" -fuzztime "${fuzz_seconds}s" "./$(dirname "$file")" >"$scratch/fuzz" 2>&1 ||
		{ cat "$scratch/fuzz"; fail "$target"; }
	targets=$((targets + 1))
done < <(grep -rnE '^func Fuzz[A-Za-z0-9_]*\(' --include='*_test.go' . | sort)
[ "$targets" -gt 0 ] || fail "no fuzz target was found"

step "the static binary, read-only and without privileges"
deploy/try-container.sh

printf '\nEverything holds: %s tests, %s fuzz targets, %s s.\n' "$passed" "$targets" "$SECONDS"
printf '%s passed, 0 failed\n' "$passed"
