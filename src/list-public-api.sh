#!/usr/bin/env bash
# Writes the public surface of RecipeRunner.Model that is not shipped yet into PublicAPI.Unshipped.txt, from what the
# analyzer says of it. Run after a change to the surface; the difference shows in review.
set -euo pipefail
cd "$(dirname "$0")/RecipeRunner.Model"
printf '#nullable enable\n' > PublicAPI.Unshipped.txt
{ dotnet build -c Release --no-incremental 2>&1 || true; } \
  | sed -nE "s/.*error RS0016: Symbol '(.*)' is not part of the declared public API.*/\1/p" \
  | LC_ALL=C sort -u > api.tmp
cat api.tmp >> PublicAPI.Unshipped.txt
rm api.tmp
dotnet build -c Release
