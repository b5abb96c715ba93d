"""Tessellates the reporting gauges of each step anew (Qhull through SciPy), overlays cells and basins (GEOS through
Shapely) and weighs, each time a line comes in; answers with milliseconds and the sum of all means. Basins are made
beforehand. A file of rings is a sequence of: number of points, then x and y of each, the first repeated at the end."""

import sys
import time

import numpy
from scipy.spatial import Voronoi
from shapely.geometry import Polygon
from shapely.strtree import STRtree

points = numpy.fromfile(sys.argv[1]).reshape(-1, 2)
values = numpy.fromfile(sys.argv[2])
record = numpy.fromfile(sys.argv[3]).reshape(2, -1, len(points))
basins = []
place = 0
while place < len(values):
    count = int(values[place])
    basins.append(Polygon(values[place + 1 : place + 1 + 2 * count].reshape(-1, 2)))
    place += 1 + 2 * count
angles = numpy.arange(8) * numpy.pi / 4 + 0.1
far = points.mean(0) + 4e7 * numpy.c_[numpy.cos(angles), numpy.sin(angles)]


def means(depths, live):
    voronoi = Voronoi(numpy.vstack([points[live], far]))
    cells = [Polygon(voronoi.vertices[voronoi.regions[voronoi.point_region[i]]]) for i in range(len(live))]
    depth = {id(cell): depths[site] for cell, site in zip(cells, live)}
    tree = STRtree(cells)
    for basin in basins:
        pieces = [(cell.intersection(basin).area, depth[id(cell)]) for cell in tree.query(basin)]
        yield sum(area * value for area, value in pieces) / basin.area


print("ready", flush=True)
for _ in sys.stdin:
    start = time.perf_counter()
    total = sum(sum(means(depths, numpy.flatnonzero(reports))) for depths, reports in zip(*record))
    print((time.perf_counter() - start) * 1000, repr(float(total)), flush=True)
