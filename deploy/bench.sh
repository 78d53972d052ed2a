#!/usr/bin/env bash
# Measures what must stay quick, each against a named reference in the same run,
# and prints the ratios beside their limits. Fails when one is beyond its limit.
#
# Usage: deploy/bench.sh [time for each benchmark, usually 3s]
set -euo pipefail
cd "$(dirname "$0")/.."
out="$(mktemp)"
trap 'rm -f "$out"' EXIT
command -v redis-server >/dev/null || { echo "redis-server is missing: apt-get install redis-server" >&2; exit 1; }

go test -run '^$' -bench Against -benchtime "${1:-3s}" ./cmd/galeward >"$out" || { cat "$out"; exit 1; }

awk '
function row(name, value, sign, limit, ours, reference) {
	ok = sign == "<=" ? value <= limit : value >= limit
	if (!ok) beyond = 1
	printf "%-58s %7.2f  %s %-4s %-7s %s / %s\n", name, value, sign, limit, ok ? "holds" : "BEYOND", ours, reference
	rows++
}
function metric(unit,   i) { for (i = 3; i < NF; i++) if ($(i + 1) == unit) return $i; return "missing" }
BEGIN { printf "%-58s %7s  %-7s %-7s %s\n", "what / reference", "ratio", "limit", " ", "ours / reference" }
/^BenchmarkAnswerAgainstRoundTrip/ {
	row("answer to a usual line / HTTP round trip on loopback", metric("x"), "<=", "0.5", metric("µs/ours") " µs", metric("µs/reference") " µs")
}
/^BenchmarkAskAgainstHello/ {
	row("galeward ask, one process / a Go hello world", metric("x"), "<=", "6", metric("µs/ours") " µs", metric("µs/reference") " µs")
}
/^BenchmarkSlackCommandAgainstConstant/ {
	row("throughput of signed commands / verify, claim, constant", metric("throughput"), ">=", "0.5", metric("answers/s") " per s", metric("constants/s") " per s")
	printf "%-58s %7.2f  %-15s %s / %s\n", "  the same / a bare handler without a second request", metric("bare"), "", metric("answers/s") " per s", metric("bares/s") " per s"
}
END {
	if (rows != 3) { print "only " rows+0 " of 3 benchmarks ran"; exit 1 }
	exit beyond
}' "$out"
