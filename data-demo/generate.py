#!/usr/bin/env python3
"""Makes the demo data of Recipe Runner: an invented region, its gauges, and invented rain of two years, of sixty, and by the hour.

Nothing here was measured. Same script, same bytes (Python 3.11, pyproj 3.4.1, pyshp 2.3.1 and shapely 1.8.5 of
Debian 12). Run it in its own folder:  apt-get install python3-pyproj python3-pyshp python3-shapely; python3 generate.py
"""
import csv
import datetime
import gzip
import io
import math
import random

import shapefile
from pyproj import Transformer
from shapely.geometry import Polygon

GRID = "EPSG:25833"
PRJ = (
    'PROJCS["ETRS_1989_UTM_Zone_33N",GEOGCS["GCS_ETRS_1989",DATUM["D_ETRS_1989",SPHEROID["GRS_1980",6378137.0,298.257222101]],'
    'PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],'
    'PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",15.0],PARAMETER["Scale_Factor",0.9996],'
    'PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]'
)

# Corners of the basins' outlines, km east and north of (390, 5620) km.
CORNERS = {
    "a": (0, 12), "b": (16, 2), "c": (34, 0), "d": (52, 6), "e": (64, 18), "f": (62, 36), "g": (50, 50), "h": (32, 56),
    "i": (12, 50), "j": (-2, 34), "m": (22, 22), "n": (38, 20), "o": (44, 34), "p": (24, 38),
    "q": (26, 6), "r": (33, 8), "s": (32, 15), "t": (25, 14),
    "u": (70, 40), "v": (77, 42), "w": (75, 50), "x": (68, 48),
}
# Rings run counter-clockwise; neighbours share sides, so that the outlines tile.
BASINS = [
    ("B-1", "Upper Quell", [["a", "b", "m", "p", "j"]]),
    ("B-2", "Lower Quell", [["b", "c", "d", "n", "m"]]),
    ("B-3", "Aschbach", [["d", "e", "f", "o", "n"]]),
    ("B-4", "Märzgraben", [["m", "n", "o", "p"]]),
    ("B-5", "Nordmoor", [["p", "o", "f", "g", "h", "i", "j"], ["u", "v", "w", "x"]]),
    ("B-6", "Quell at Steinfurt", [["q", "r", "s", "t"]]),
]
ROUGHNESS = 0.16
LEVELS = 6


def side(start, end):
    """A winding line between two corners, the same from either end."""
    if start > end:
        return list(reversed(side(end, start)))
    rng = random.Random(f"side {start}{end}")
    points = [CORNERS[start], CORNERS[end]]
    for level in range(LEVELS):
        finer = []
        for (ax, ay), (bx, by) in zip(points, points[1:]):
            shift = rng.uniform(-1, 1) * ROUGHNESS * 0.9 ** level
            finer += [(ax, ay), ((ax + bx) / 2 - (by - ay) * shift, (ay + by) / 2 + (bx - ax) * shift)]
        points = finer + [points[-1]]
    return points


def ring(corners):
    line = []
    for start, end in zip(corners, corners[1:] + corners[:1]):
        line += side(start, end)[:-1]
    return [(round(390000 + 1000 * x, 2), round(5620000 + 1000 * y, 2)) for x, y in line]


def write_basins():
    writer = shapefile.Writer("basins", shapeType=shapefile.POLYGON, encoding="utf-8")
    writer.field("BASIN_ID", "C", 8)
    writer.field("NAME", "C", 40)
    for key, name, parts in BASINS:
        rings = [ring(part) for part in parts]
        assert all(Polygon(r).is_valid for r in rings), key
        # Outer rings run clockwise in a shapefile, the first vertex repeated.
        writer.poly([list(reversed(r + r[:1])) for r in rings])
        writer.record(key, name)
    writer.close()
    with open("basins.dbf", "r+b") as handle:
        handle.seek(1)
        handle.write(bytes([125, 1, 1]))  # the header's date, fixed
    with open("basins.prj", "w", encoding="ascii", newline="") as handle:
        handle.write(PRJ)
    with open("basins.cpg", "w", encoding="ascii", newline="") as handle:
        handle.write("UTF-8")


# id, km east, km north, metres above sea level; stand well outside the basins.
GAUGES = [
    ("Q-01", 4, 16, 620), ("Q-02", 14, 8, 540), ("Q-03", 10, 30, 480), ("Q-04", 20, 28, 410), ("Q-05", 26, 11, 450),
    ("Q-06", 37, 5, 390), ("Q-07", 30, 18, 360), ("Q-08", 44, 12, 340), ("Q-09", 55, 15, 310), ("Q-10", 60, 27, 280),
    ("Q-11", 47, 26, 300), ("Q-12", 52, 38, 250), ("Q-13", 34, 29, 330), ("Q-14", 28, 42, 290), ("Q-15", 14, 42, 380),
    ("Q-16", 4, 37, 430), ("Q-17", 38, 48, 240), ("Q-18", 22, 51, 260), ("Q-19", 46, 45, 230), ("Q-20", 72, 45, 210),
    ("Q-21", -14, 22, 700), ("Q-22", 88, 20, 190),
]


def write_gauges():
    to_degrees = Transformer.from_crs(GRID, "EPSG:4326", always_xy=True)
    rows = []
    for key, x, y, height in GAUGES:
        lon, lat = to_degrees.transform(390000 + 1000 * x + 137.5, 5620000 + 1000 * y - 88.25)
        rows.append([key, f"{lon:.6f}", f"{lat:.6f}", height])
    write_csv("gauges.csv", ["gauge", "lon", "lat", "elev_m"], rows)
    twin = ["Q-23", rows[6][1], rows[6][2], rows[6][3]]
    write_csv("awkward/gauges-coincident.csv", ["gauge", "lon", "lat", "elev_m"], rows + [twin])


def weather(days, seed="weather"):
    """Depths in tenths of mm: wet and dry spells, storms with a middle and a reach, more rain on high ground."""
    rng = random.Random(seed)
    wet = False
    for day in days:
        season = math.cos(2 * math.pi * (day.timetuple().tm_yday - 200) / 365.25)  # most in July
        wet = rng.random() < (0.68 if wet else 0.22 + 0.05 * season)
        if not wet:
            yield [0] * len(GAUGES)
            continue
        middle = (rng.uniform(-20, 95), rng.uniform(-15, 70))
        reach = rng.uniform(18, 40) if season > 0.3 and rng.random() < 0.5 else rng.uniform(50, 140)
        strength = rng.gammavariate(0.9, 6.5 + 3.5 * season)
        row = []
        for _, x, y, height in GAUGES:
            near = math.exp(-((x - middle[0]) ** 2 + (y - middle[1]) ** 2) / (2 * reach * reach))
            depth = strength * near * (0.8 + height / 1500) * rng.lognormvariate(0, 0.25)
            row.append(int(round(10 * depth)) if depth >= 0.1 else 0)
        yield row


def silences(days):
    """Days on which each gauge reports nothing: odd days, longer failures, one gauge opened late, one closed early."""
    rng = random.Random("silences")
    silent = {key: {d for d in days if rng.random() < 0.012} for key, *_ in GAUGES}
    for key in silent:
        for _ in range(rng.choice([0, 1, 1, 2])):
            start = rng.randrange(len(days))
            silent[key] |= set(days[start:start + rng.randint(5, 45)])
    silent["Q-13"] |= {d for d in days if d < datetime.date(2023, 6, 12)}
    silent["Q-18"] |= {d for d in days if d > datetime.date(2024, 7, 3)}
    storm = datetime.date(2024, 1, 9)
    silent["Q-14"] |= {storm + datetime.timedelta(n) for n in range(9)}
    return silent


def write_records():
    first, last = datetime.date(2022, 10, 1), datetime.date(2024, 9, 30)
    days = [first + datetime.timedelta(n) for n in range((last - first).days + 1)]
    silent = silences(days)
    rows = []
    for day, depths in zip(days, weather(days)):
        cells = ["" if day in silent[key] else f"{depth / 10:.1f}" for (key, *_), depth in zip(GAUGES, depths)]
        rows.append([day.isoformat()] + cells)
    write_csv("daily.csv", ["date"] + [key for key, *_ in GAUGES], rows)


# Years in which gauges of the long record opened and closed; those not named were there all the time.
OPENED = {"Q-04": 1978, "Q-08": 1969, "Q-10": 1991, "Q-13": 2023, "Q-17": 1983, "Q-20": 2001, "Q-22": 1972}
CLOSED = {"Q-02": 2009, "Q-15": 1994, "Q-18": 2024, "Q-21": 1987}
WEEKEND_READERS = {"Q-03": 1990, "Q-12": 1985, "Q-16": 1999}  # until then read on Mondays for three days at once


def long_silences(days):
    """Days without a reading over sixty years: openings, closures, bursts from days to months, odd days."""
    rng = random.Random("long silences")
    silent = {}
    for key, *_ in GAUGES:
        gone = {d for d in days if rng.random() < 0.008}
        gone |= {d for d in days if d.year < OPENED.get(key, 0) or d.year > CLOSED.get(key, 9999)}
        start = 0
        while start < len(days):
            start += int(rng.expovariate(1 / 900)) + 1
            gone |= set(days[start:start + int(rng.lognormvariate(2.2, 1.1))])
        silent[key] = gone
    return silent


def long_row(day, depths, silent):
    """One day of the long record: -9999 missing, T a trace, A caught but read later."""
    rng = random.Random(f"long {day.isoformat()}")
    cells = []
    for (key, *_), depth in zip(GAUGES, depths):
        trace = rng.random() < 0.04
        weekend = day.year < WEEKEND_READERS.get(key, 0) and day.weekday() in (5, 6)
        cells.append("-9999" if day in silent[key] else "A" if weekend else "T" if depth == 0 and trace else f"{depth / 10:.1f}")
    return cells


def write_long_record():
    first, last = datetime.date(1964, 10, 1), datetime.date(2024, 9, 30)
    days = [first + datetime.timedelta(n) for n in range((last - first).days + 1)]
    silent = long_silences(days)
    held = {key: 0 for key, *_ in GAUGES}
    text = io.StringIO()
    writer = csv.writer(text, lineterminator="\n")
    writer.writerow(["date"] + [key for key, *_ in GAUGES])
    for day, depths in zip(days, weather(days, "long weather")):
        cells = long_row(day, depths, silent)
        for i, (key, *_) in enumerate(GAUGES):
            if cells[i] == "A":
                held[key] += depths[i]
            elif held[key]:
                cells[i] = cells[i] if cells[i] == "-9999" else f"{(depths[i] + held[key]) / 10:.1f}"
                held[key] = 0
        writer.writerow([day.isoformat()] + cells)
    with open("daily-sixty-years.csv.gz", "wb") as handle:
        handle.write(gzip.compress(text.getvalue().encode("utf-8"), 9, mtime=0))


def write_hourly():
    """Three months of hours at one gauge, so that days of another ending can be made of them; times are the ends of hours."""
    rng = random.Random("hours")
    time, wet, rows = datetime.datetime(2024, 6, 1), False, []
    while time < datetime.datetime(2024, 9, 1):
        time += datetime.timedelta(hours=1)
        wet = rng.random() < (0.75 if wet else 0.03)
        depth = rng.gammavariate(0.7, 1.6) if wet else 0
        silent = datetime.datetime(2024, 7, 20, 3) < time <= datetime.datetime(2024, 7, 22, 18)
        rows.append([time.strftime("%Y-%m-%dT%H:%M"), "" if silent else f"{depth:.1f}"])
    write_csv("hourly-Q-19.csv", ["time", "Q-19"], rows)


def write_csv(name, head, rows):
    with open(name, "w", encoding="utf-8", newline="") as handle:
        writer = csv.writer(handle, lineterminator="\n")
        writer.writerow(head)
        writer.writerows(rows)


write_basins()
write_gauges()
write_records()
write_long_record()
write_hourly()
