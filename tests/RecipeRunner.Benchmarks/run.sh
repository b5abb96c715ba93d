#!/bin/sh
# Installs the baselines and prints the tables of README.md: sh tests/RecipeRunner.Benchmarks/run.sh [cells] [gaps]
# Needs node and npm, a Debian with apt-get (as root) or python3-scipy, python3-shapely, libgeos-dev and a C compiler
# already there.
set -eu
cd "$(dirname "$0")"
baselines="$PWD/.baselines"
mkdir -p "$baselines"
/usr/bin/python3 -c 'import scipy, shapely' 2>/dev/null && command -v geos-config >/dev/null && command -v cc >/dev/null ||
    apt-get install -y --no-install-recommends python3-scipy python3-shapely libgeos-dev gcc libc6-dev >/dev/null
[ -d "$baselines/node_modules/delaunator" ] ||
    npm install --silent --no-audit --no-fund --prefix "$baselines" delaunator@5.1.0
cc -O2 -o "$baselines/geos_overlay" Baselines/geos_overlay.c -lgeos_c
dotnet build -c Release --nologo -v quiet
[ $# -gt 0 ] || set -- cells gaps
for part in "$@"; do
    dotnet bin/Release/net10.0/RecipeRunner.Benchmarks.dll "$baselines" "$part"
done
