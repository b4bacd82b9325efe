#!/usr/bin/env bash
# Times the kernels beside plain numpy scripts in one run, on one thread each, and writes the table of ratios into DEVELOPERS.md between
# its marks, with the processor and the runtime. Takes a few minutes; nothing else should run meanwhile.
# Needs numpy for the plain scripts (Debian: python3-numpy); without it the table has no ratios.
set -euo pipefail
cd "$(dirname "$0")/../.."
export OPENBLAS_NUM_THREADS=1 OMP_NUM_THREADS=1
found=$(mktemp)
trap 'rm -f "$found" "$found.reference"' EXIT
# The first interpreter that has numpy.
python=
for candidate in python3 /usr/bin/python3; do
    if "$candidate" -c "import numpy" 2>/dev/null; then python=$candidate; break; fi
done

dotnet build -c Release tests/BarbuleOptics.Benchmarks >/dev/null
program="dotnet tests/BarbuleOptics.Benchmarks/bin/Release/net10.0/BarbuleOptics.Benchmarks.dll"
# Workload after workload, so that what is compared ran within the same seconds.
for workload in $($program kernels --list); do
    $program kernels --json "$workload" | tee -a "$found"
    if [ -n "$python" ]; then
        "$python" tests/BarbuleOptics.Benchmarks/Kernels/plain_films.py "$workload" | sed 's/^{/{"plain": true, /' | tee -a "$found"
    fi
done
if [ -n "$python" ]; then
    # Rods by the plain Fourier modal code, 21 harmonics; the mean of s and p.
    $program rows "$found.reference" >/dev/null
    "$python" tests/BarbuleOptics.Benchmarks/Rows/plain_modal.py "$found.reference" 12 | awk '
        /^numpy plain 21 harmonics/ { split($0, part, /lumen | nm, |: | ms, /); sum[part[2]] += 500 * part[4] }
        END {
            for (lumen in sum) {
                name[0] = lumen == 0 ? "rods-solid" : "rods-hollow"
                name[1] = lumen == 0 ? "" : "rods-1e-4"
                for (i = 0; i < 2; i++)
                    if (name[i] != "")
                        printf "{\"plain\": true, \"workload\": \"%s\", \"points_per_second\": null, \"microseconds_per_solve\": %.1f}\n", name[i], sum[lumen]
            }
        }' | tee -a "$found"
    "$python" tests/BarbuleOptics.Benchmarks/Kernels/table.py "$found" DEVELOPERS.md "$(dotnet --version)"
else
    echo "numpy is missing (Debian: apt-get install python3-numpy): DEVELOPERS.md was left as it was"
fi
