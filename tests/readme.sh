#!/usr/bin/env bash
# Makes anew what the README shows: the figures and the printed answers, from the samples.
# Usage, anywhere in a checkout: bash tests/readme.sh
set -euo pipefail
cd "$(dirname "$0")/.."
dotnet build -c Release src/BarbuleOptics.Cli --nologo -v quiet
barbule() { dotnet src/BarbuleOptics.Cli/bin/Release/net10.0/barbule.dll "$@"; }

results=$(mktemp -d)
trap 'rm -rf "$results"' EXIT
barbule predict src/BarbuleOptics.Cli/Samples/hollow-rods.toml --angles 0,30,60 --out "$results" >/dev/null
mkdir -p tests/BarbuleOptics.Tests/Documentation
cp "$results/reflectance.png" tests/BarbuleOptics.Tests/Documentation/reflectance.png
cp "$results/section.png" tests/BarbuleOptics.Tests/Documentation/section.png
barbule predict src/BarbuleOptics.Cli/Samples/hollow-rods.toml --angles 0:60:10 --out "$results" --force >/dev/null
for figure in chromaticity bird-space swatches; do cp "$results/$figure.png" "tests/BarbuleOptics.Tests/Documentation/$figure.png"; done
barbule predict src/BarbuleOptics.Cli/Samples/spaced-hollow-rods.toml --angles 0,45 --overlay --out "$results" --force >/dev/null
cp "$results/reflectance.png" tests/BarbuleOptics.Tests/Documentation/rods-are-not-films.png

# A block that follows <!-- printed: WORDS --> holds what "barbule WORDS" prints.
while IFS= read -r line; do
    if [[ ${skipping:-} ]]; then
        [[ $line == '```' ]] || continue
        skipping=
    fi
    printf '%s\n' "$line"
    if [[ $line =~ ^'<!-- printed: '(.*)' -->'$ ]]; then
        printf '```text\n'
        read -r -a words <<<"${BASH_REMATCH[1]}"
        # Through a substitution the blank lines at the end go.
        printf '%s\n' "$(barbule "${words[@]}")"
        skipping=1
    fi
done <README.md >"$results/README.md"
cp "$results/README.md" README.md
