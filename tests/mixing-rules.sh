#!/usr/bin/env bash
# Judges the mixing rules against the rigorous solution and writes the tables into the README, between the marks. Takes minutes.
# Usage, anywhere in a checkout: bash tests/mixing-rules.sh [NUMBER OF RANDOM STRUCTURES]
set -euo pipefail
cd "$(dirname "$0")/.."
for mark in '<!-- evidence -->' '<!-- end of evidence -->'; do
    grep -qxF -e "$mark" README.md || { echo "README.md has no line $mark: nowhere to write to" >&2; exit 1; }
done
dotnet build -c Release tests/BarbuleOptics.Benchmarks --nologo -v quiet
tables=$(mktemp)
trap 'rm -f "$tables" "$tables.md"' EXIT
dotnet tests/BarbuleOptics.Benchmarks/bin/Release/net10.0/BarbuleOptics.Benchmarks.dll rules "$@" >"$tables"

while IFS= read -r line; do
    if [[ ${skipping:-} ]]; then
        [[ $line == '<!-- end of evidence -->' ]] || continue
        skipping=
    fi
    printf '%s\n' "$line"
    if [[ $line == '<!-- evidence -->' ]]; then
        cat "$tables"
        skipping=1
    fi
done <README.md >"$tables.md"
cp "$tables.md" README.md
