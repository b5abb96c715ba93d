#!/usr/bin/env bash
# Installs what the tests need on a Debian machine with the .NET SDK, then builds and passes them all.
#   bash tests/run.sh
set -euo pipefail
cd "$(dirname "$0")/.."
export DOTNET_CLI_TELEMETRY_OPTOUT=1 DOTNET_NOLOGO=1

# General-purpose readers of the emitted layers, a browser for the summary page, a validator of JSON schemas, OpenSSH.
need=(python3-fiona python3-pyproj python3-shapely chromium python3-jsonschema openssh-client)
missing=()
command -v npm >/dev/null || missing+=(nodejs npm)
ldconfig -p | grep -q libicuuc || missing+=(libicu-dev)
for package in "${need[@]}"; do
  dpkg-query -W -f='${Status}' "$package" 2>/dev/null | grep -q 'ok installed' || missing+=("$package")
done
if [ ${#missing[@]} -gt 0 ]; then
  sudo=$([ "$(id -u)" -eq 0 ] || echo sudo)
  $sudo apt-get update -qq
  DEBIAN_FRONTEND=noninteractive $sudo apt-get install -y -qq "${missing[@]}" >/dev/null
fi

# Readers of RO-Crates and JSON-LD, pinned by tests/crate-reader/package-lock.json.
npm ci --prefix tests/crate-reader --ignore-scripts --no-audit --no-fund

dotnet tool restore
dotnet csharpier check src tests
dotnet build -c Release

results=$(mktemp -d)
trap 'rm -rf "$results"' EXIT
status=0
run() { # a test project, and a name for its results
  dotnet test "tests/$1" -c Release --no-build --results-directory "$results" --logger "trx;LogFileName=$2.trx" || status=$?
}
for project in Numerics Steps Host EndToEnd; do
  run "RecipeRunner.$project.Tests" "$project"
done

# Once more under a locale with decimal commas and a time zone far from here.
export LC_ALL=de_DE.UTF-8 LANG=de_DE.UTF-8 TZ=Pacific/Kiritimati
for project in Numerics Steps Host; do
  run "RecipeRunner.$project.Tests" "$project-de"
done
export LC_ALL=C.UTF-8 LANG=C.UTF-8

python3 tests/count.py "$results"
exit $status
