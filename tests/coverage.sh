#!/usr/bin/env bash
# Prints how often the 95 % interval of the mean covers the truth over studies of a known structure (DEVELOPERS.md). Takes minutes.
# Usage, anywhere in a checkout: bash tests/coverage.sh [NUMBER OF STUDIES]
set -euo pipefail
cd "$(dirname "$0")/.."
dotnet build -c Release tests/BarbuleOptics.Benchmarks --nologo -v quiet
dotnet tests/BarbuleOptics.Benchmarks/bin/Release/net10.0/BarbuleOptics.Benchmarks.dll coverage "$@"
