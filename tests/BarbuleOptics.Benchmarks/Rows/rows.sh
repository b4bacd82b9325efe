#!/usr/bin/env bash
# Times multipole rows, the Fourier modal method and a plain numpy Fourier modal code in one run, on one thread, and prints how many
# times faster the multipole rows are. Takes a minute or two. Needs numpy for the plain code (Debian: python3-numpy).
set -euo pipefail
cd "$(dirname "$0")/../../.."
reference=$(mktemp)
trap 'rm -f "$reference" "$reference.out"' EXIT
export OPENBLAS_NUM_THREADS=1 OMP_NUM_THREADS=1
# The first interpreter that has numpy.
python=
for candidate in python3 /usr/bin/python3; do
    if "$candidate" -c "import numpy" 2>/dev/null; then python=$candidate; break; fi
done
dotnet run -c Release --project tests/BarbuleOptics.Benchmarks -- rows "$reference" | tee "$reference.out"
if [ -z "$python" ]; then
    echo "numpy is missing (Debian: apt-get install python3-numpy): the plain code was not timed"
    exit 0
fi
"$python" tests/BarbuleOptics.Benchmarks/Rows/plain_modal.py "$reference" | tee -a "$reference.out"
# Lines "multipole, ..., lumen L nm, P: T us, ..." against "numpy WAY 21 harmonics, lumen L nm, P: T ms, ...".
awk '
    match($0, /lumen [0-9]+ nm, [sp]/) { rods = substr($0, RSTART, RLENGTH); split(substr($0, RSTART + RLENGTH + 2), word, " ") }
    /^multipole/ { fast[rods] = word[1] }
    /^numpy (plain|careful) 21/ { printf "numpy %s 21 harmonics / multipole rows, %s: %.0f times\n", $2, rods, 1000 * word[1] / fast[rods] }
' "$reference.out"
