"""Multiplies a sparse matrix of weights with all depths (SciPy, CSR @ dense, a row a gauge) each time a line comes in;
answers with milliseconds and the sum of all means."""

import sys
import time

import numpy
from scipy.sparse import csr_matrix

values = numpy.fromfile(sys.argv[1])
count = int(values[0])
starts = values[1 : 1 + count].astype(int)
size = starts[-1]
sites = values[1 + count : 1 + count + size].astype(int)
gauges = 400
weights = csr_matrix((values[1 + count + size :], sites, starts), shape=(count - 1, gauges))
depths = numpy.ascontiguousarray(numpy.fromfile(sys.argv[2]).reshape(2, -1, gauges)[0].T)
print("ready", flush=True)
for _ in sys.stdin:
    start = time.perf_counter()
    result = weights @ depths
    elapsed = (time.perf_counter() - start) * 1000
    print(elapsed, repr(float(result.sum())), flush=True)
