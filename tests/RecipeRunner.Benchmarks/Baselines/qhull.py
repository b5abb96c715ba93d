"""Triangulates with Qhull through SciPy each time a line comes in; answers with milliseconds and triangles."""

import sys
import time

import numpy
from scipy.spatial import Delaunay

points = numpy.fromfile(sys.argv[1]).reshape(-1, 2)
print("ready", flush=True)
for _ in sys.stdin:
    start = time.perf_counter()
    result = Delaunay(points)
    elapsed = (time.perf_counter() - start) * 1000
    print(elapsed, len(result.simplices), flush=True)
