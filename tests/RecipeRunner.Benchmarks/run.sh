#!/bin/sh
# Installs the baselines and prints the table of README.md: sh tests/RecipeRunner.Benchmarks/run.sh
# Needs node and npm, a Debian with apt-get (as root) or python3-scipy, libgeos-dev and a C compiler already there.
set -eu
cd "$(dirname "$0")"
baselines="$PWD/.baselines"
mkdir -p "$baselines"
/usr/bin/python3 -c 'import scipy' 2>/dev/null && command -v geos-config >/dev/null && command -v cc >/dev/null ||
    apt-get install -y --no-install-recommends python3-scipy libgeos-dev gcc libc6-dev >/dev/null
[ -d "$baselines/node_modules/delaunator" ] ||
    npm install --silent --no-audit --no-fund --prefix "$baselines" delaunator@5.1.0
cc -O2 -o "$baselines/geos_overlay" Baselines/geos_overlay.c -lgeos_c
dotnet build -c Release --nologo -v quiet
exec dotnet bin/Release/net10.0/RecipeRunner.Benchmarks.dll "$baselines" "$@"
