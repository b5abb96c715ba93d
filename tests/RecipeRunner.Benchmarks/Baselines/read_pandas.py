"""Reads the wide file with pandas, once for each line on standard input: milliseconds and the sum of all depths."""
import gc
import sys
import time

import pandas

print("ready", flush=True)
for _ in sys.stdin:
    gc.collect()
    start = time.perf_counter()
    frame = pandas.read_csv(sys.argv[1], index_col=0, parse_dates=True)
    total = float(frame.to_numpy().sum())
    print((time.perf_counter() - start) * 1000, repr(total), flush=True)
    del frame
