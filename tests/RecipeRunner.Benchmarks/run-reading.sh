#!/bin/sh
# Measures the reading of records and prints what READING.md holds: sh tests/RecipeRunner.Benchmarks/run-reading.sh
# Needs a Debian with apt-get (as root), or python3-pandas already there; 200 MB of disk, 2 GB of memory.
set -eu
cd "$(dirname "$0")"
baselines="$PWD/.baselines"
mkdir -p "$baselines"
/usr/bin/python3 -c 'import pandas' 2>/dev/null ||
    apt-get install -y --no-install-recommends python3-pandas >/dev/null
dotnet build -c Release --nologo -v quiet
dotnet bin/Release/net10.0/RecipeRunner.Benchmarks.dll "$baselines" reading
exec dotnet bin/Release/net10.0/RecipeRunner.Benchmarks.dll "$baselines" reading-memory
