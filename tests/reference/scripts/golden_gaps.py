"""Thiessen weights of the gauges that remain when others fall silent, for sic97/ and nc1948/.
Run after golden_thiessen.py, from the folder that holds sic97/ and nc1948/:   python3 scripts/golden_gaps.py
Each set of remaining gauges is tessellated anew by two methods of thiessen_lib.py; the first is written."""
import csv, os, random, sys
import numpy as np, scipy, shapely
from shapely.geometry import box, Polygon, MultiPolygon
sys.path.insert(0, os.path.dirname(__file__))
from thiessen_lib import areas_qhull, areas_halfplane_one, maxdiff

WMIN = 1e-9          # rows with a smaller weight are dropped
f = lambda x: "%.13g" % x


def rows(path):
    with open(path, newline="") as fh:
        return list(csv.DictReader(fh))


def weigh(xy, live, geoms):
    """by geometry: gauge index -> weight, and the largest difference between the two methods"""
    part = xy[live]
    first = areas_qhull(part, geoms)
    second = [areas_halfplane_one(part, g) for g in geoms]
    worst = max(maxdiff(a, b, g.area) for a, b, g in zip(first, second, geoms))
    return [{live[k]: v / g.area for k, v in sorted(a.items()) if v / g.area > WMIN} for a, g in zip(first, geoms)], worst


log = open("checks_gaps.txt", "w")
log.write("numpy %s, scipy %s, shapely %s, GEOS %s\n" % (np.__version__, scipy.__version__, shapely.__version__, ".".join(map(str, shapely.geos.geos_version))))

# ------------------------------------------------------------------ sic97: every k-th gauge silent, beginning with the offset-th
st = rows("sic97/stations.csv")
xy = np.array([[float(r["x_m"]), float(r["y_m"])] for r in st])
bx = rows("sic97/boxes.csv")
geoms = [box(*(float(r[c]) for c in ("xmin", "ymin", "xmax", "ymax"))) for r in bx]
worst = 0.0
with open("sic97/gap_weights.csv", "w", newline="") as fh:
    w = csv.writer(fh, lineterminator="\n"); w.writerow(["every", "offset", "zone", "id", "weight"]); n = 0
    for every, offset in ((2, 0), (2, 1), (3, 0), (3, 2), (5, 1), (5, 4), (7, 0), (7, 3)):
        live = [i for i in range(len(st)) if i % every != offset]
        found, d = weigh(xy, live, geoms); worst = max(worst, d)
        for r, a in zip(bx, found):
            for k, v in a.items():
                w.writerow([every, offset, r["box"], st[k]["id"], f(v)]); n += 1
log.write("sic97 gaps: %d rows, largest weight difference Qhull+GEOS vs half-plane %.3g\n" % (n, worst))

# ------------------------------------------------------------------ nc1948, EPSG:32119 noshift: 200 random sets, 5 % to 95 % silent
ga = rows("nc1948/gauges_projected.csv")
xy = np.array([[float(r["x_32119"]), float(r["y_32119"])] for r in ga])
parts = {}
for r in rows("nc1948/counties_vertices.csv"):
    assert r["ring"] == "0"
    parts.setdefault(r["fips"], {}).setdefault(r["part"], []).append((float(r["x_32119_noshift"]), float(r["y_32119_noshift"])))
county = {k: MultiPolygon([Polygon(q) for q in p.values()]) for k, p in parts.items()}
fips = sorted(county)
rng = random.Random(1948)
worst = 0.0
with open("nc1948/gap_sets.csv", "w", newline="") as fs, open("nc1948/gap_weights.csv", "w", newline="") as fw:
    ws = csv.writer(fs, lineterminator="\n"); ws.writerow(["set", "reports"])
    ww = csv.writer(fw, lineterminator="\n"); ww.writerow(["set", "fips", "gauge", "weight"]); n = 0
    for s in range(200):
        silent = set(rng.sample(range(len(ga)), round(len(ga) * (0.05 + 0.9 * s / 199))))
        live = [i for i in range(len(ga)) if i not in silent]
        ws.writerow([s, "".join("0" if i in silent else "1" for i in range(len(ga)))])
        chosen = [fips[(4 * s + j * 25) % 100] for j in range(4)]
        found, d = weigh(xy, live, [county[c] for c in chosen]); worst = max(worst, d)
        for c, a in zip(chosen, found):
            for k, v in a.items():
                ww.writerow([s, c, ga[k]["gauge"], f(v)]); n += 1
log.write("nc1948 gaps: %d rows, largest weight difference Qhull+GEOS vs half-plane %.3g\n" % (n, worst))
log.close()
