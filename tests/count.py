"""Counts test results in the .trx files below a folder and prints one closing line; fails where no test ran."""
import pathlib
import sys
import xml.etree.ElementTree as tree

passed = failed = skipped = 0
for path in sorted(pathlib.Path(sys.argv[1]).rglob("*.trx")):
    counters = tree.parse(path).getroot().find(".//{*}ResultSummary/{*}Counters")
    passed += int(counters.get("passed"))
    failed += int(counters.get("failed")) + int(counters.get("error"))
    skipped += int(counters.get("total")) - int(counters.get("executed"))
print(f"{passed} passed, {failed} failed, {skipped} skipped")
sys.exit(1 if failed or not passed else 0)
