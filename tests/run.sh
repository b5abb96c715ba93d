#!/usr/bin/env bash
# Installs what the tests need on a Debian machine with the .NET SDK, then builds and passes them all.
#   bash tests/run.sh
set -euo pipefail
cd "$(dirname "$0")/.."
export DOTNET_CLI_TELEMETRY_OPTOUT=1 DOTNET_NOLOGO=1

# General-purpose readers of the emitted layers, and a browser for the summary page.
need=(python3-fiona python3-pyproj python3-shapely chromium)
missing=()
for package in "${need[@]}"; do
  dpkg-query -W -f='${Status}' "$package" 2>/dev/null | grep -q 'ok installed' || missing+=("$package")
done
if [ ${#missing[@]} -gt 0 ]; then
  sudo=$([ "$(id -u)" -eq 0 ] || echo sudo)
  $sudo apt-get update -qq
  DEBIAN_FRONTEND=noninteractive $sudo apt-get install -y -qq "${missing[@]}" >/dev/null
fi

dotnet tool restore
dotnet csharpier check src tests
dotnet build -c Release

results=$(mktemp -d)
trap 'rm -rf "$results"' EXIT
status=0
dotnet test -c Release --no-build --logger trx --results-directory "$results" || status=$?

# The whole of the tool under a locale with decimal commas and another time zone.
LC_ALL=de_DE.UTF-8 LANG=de_DE.UTF-8 TZ=Pacific/Kiritimati \
  dotnet test tests/RecipeRunner.Steps.Tests -c Release --no-build --logger trx --results-directory "$results" || status=$?

python3 tests/count.py "$results"
exit $status
