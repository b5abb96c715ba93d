"""Makes registry.tsv.br, the table of reference systems that this room embeds.

    /usr/bin/python3 generate.py [registry.tsv.br]

Made with Debian 12: python3 3.11.2, python3-pyproj 3.4.1-1+b1, python3-brotli 1.0.9-2+deb12u1, libproj25 and proj-data 9.1.1-1
(EPSG dataset v10.076 of 2022-08-31). No grid files, no network. The same versions give the same bytes.

The facts are those of the EPSG Geodetic Parameter Dataset, owned by the International Association of Oil & Gas
Producers (IOGP), used under its terms of use (https://epsg.org/terms-of-use.html): the data may be used and passed on,
they carry no warranty, and what is altered or left out may not be attributed to the dataset. This table is an extract:
current systems (of deprecated ones, which may be faulty, only the names), areas of use reduced to rectangles, WKT 1 written and control points computed by PROJ (MIT).

Lines, tab separated, the first field saying which:
  S code name method area wkt controls alias a system; method is empty for a geographic one, wkt as well for a deprecated
                                             one; area is west,south,east,north in degrees (east < west across 180); wkt is
                                             empty where WKT 1 cannot hold it;
                                             controls are lon,lat,x,y;... degrees from Greenwich on the system's own datum,
                                             then what PROJ gives in the system's own unit, east or west axis first as PROJ
                                             orders them for drawing; alias is its name in ESRI's dialect where the
                                             registry's software knows one
  D code name frame crs aliases              a datum; frame is the datum that it becomes once its longitudes are counted
                                             from Greenwich; crs the geographic system that people call it by; aliases as
                                             both WKT dialects write it
  O code name source target accuracy kind shift area
                                             an operation between two datums; kind null (all parameters zero), shift
                                             (three to ten parameters) or grid; shift is the furthest that it moves a
                                             place, in metres, over nine places of its area
"""
import itertools
import math
import sqlite3
import sys
import warnings

import brotli
from pyproj import CRS, Geod, Transformer, datadir, network
from pyproj.enums import WktVersion
from pyproj.exceptions import ProjError

warnings.simplefilter("ignore")
network.set_network_enabled(False)
registry = sqlite3.connect(f"file:{datadir.get_data_dir()}/proj.db?mode=ro", uri=True)


def rows(sql, *args):
    """What a query gives, with codes (which the database keeps as whole numbers) as text."""
    found = registry.execute(sql, args).fetchall()
    return [tuple(str(value) if isinstance(value, int) else value for value in row) for row in found]


def number(value):
    return "%.15g" % value


def wkt(crs, version=WktVersion.WKT1_GDAL):
    return crs.to_wkt(version) or ""


def degrees_east_of_greenwich(crs):
    meridian = crs.prime_meridian
    return math.degrees(meridian.longitude * meridian.unit_conversion_factor)


def spread(area, fractions):
    """Places in an area: fractions of its width and height, away from the poles, to a thousandth of a degree."""
    west, south, east, north = area
    east += 360 if east < west else 0
    south, north = max(south, -89), min(north, 89)
    return [
        (round((west + (east - west) * i + 180) % 360 - 180, 3), round(south + (north - south) * j, 3))
        for i, j in fractions
    ]


def controls(crs, area):
    base = crs.geodetic_crs
    degree = math.degrees(base.axis_info[0].unit_conversion_factor)
    try:
        transform = Transformer.from_crs(base, crs, always_xy=True)
    except ProjError:  # a method that PROJ itself does not have: no controls, so the code stays unusable
        return ""
    found = []
    for lon, lat in spread(area, ((0.18, 0.31), (0.55, 0.82), (0.86, 0.12))):
        x, y = transform.transform((lon - degrees_east_of_greenwich(base)) / degree, lat / degree)
        if math.isfinite(x) and math.isfinite(y):
            found.append("%s,%s,%.4f,%.4f" % (number(lon), number(lat), x, y))
    return ";".join(found)


SYSTEMS = {
    "projected_crs": "select code, deprecated from projected_crs where auth_name = 'EPSG' order by cast(code as int)",
    "geodetic_crs": """select code, deprecated from geodetic_crs
        where auth_name = 'EPSG' and type = 'geographic 2D' order by cast(code as int)""",
}


def systems():
    for table, query in SYSTEMS.items():
        for code, deprecated in rows(query):
            crs = CRS.from_epsg(code)
            area = crs.area_of_use.bounds
            projected = table == "projected_crs"
            current = deprecated == "0"
            text = wkt(crs) if current else ""
            yield (
                "S",
                code,
                crs.name if current else f"{crs.name}, deprecated{replacement(table, code)}",
                crs.coordinate_operation.method_name if projected and current else "",
                ",".join(map(number, area)),
                text,
                controls(crs, area) if projected and text else "",
                esri_name(table, code) if current else "",
            )


def replacement(table, code):
    found = rows(
        """select replacement_code from deprecation where table_name = ? and deprecated_auth_name = 'EPSG'
           and deprecated_code = ? and replacement_auth_name = 'EPSG' order by cast(replacement_code as int)""",
        table,
        code,
    )
    return " in favour of " + " or ".join("EPSG:" + new for (new,) in found) if found else ""


def esri_name(table, code):
    found = rows(
        """select alt_name from alias_name where table_name = ? and auth_name = 'EPSG' and source = 'ESRI' and code = ?
           order by alt_name""",
        table,
        code,
    )
    return found[0][0] if found else ""


GEOGRAPHIC = rows(
    """select c.code, c.name, d.code, d.name from geodetic_crs c join geodetic_datum d
       on d.auth_name = c.datum_auth_name and d.code = c.datum_code
       where c.auth_name = 'EPSG' and c.deprecated = 0 and c.type = 'geographic 2D' order by cast(c.code as int)"""
)
DATUM_OF = {crs: datum for crs, _, datum, _ in GEOGRAPHIC}


def frames():
    """Datums that differ from another only by the meridian from which longitudes count."""
    found = {}
    for source, target, amount, unit in rows(
        """select source_crs_code, target_crs_code, param1_value, param1_uom_code from other_transformation
           where auth_name = 'EPSG' and deprecated = 0 and method_code = 9601 order by cast(code as int)"""
    ):
        if source in found or source not in DATUM_OF or target not in DATUM_OF:
            continue
        factor = rows("select conv_factor from unit_of_measure where auth_name = 'EPSG' and code = ?", unit)[0][0]
        meridian = degrees_east_of_greenwich(CRS.from_epsg(source))
        turned = amount if factor is None else math.degrees(amount * factor)
        if unit == "9110":  # sexagesimal: degrees, then minutes and seconds as decimals
            whole = math.trunc(amount)
            rest = abs(amount - whole) * 100
            minutes = math.trunc(rest + 1e-9)
            turned = math.copysign(abs(whole) + minutes / 60 + (rest - minutes) * 100 / 3600, amount)
        if degrees_east_of_greenwich(CRS.from_epsg(target)) == 0 and meridian != 0 and abs(turned - meridian) < 1e-6:
            found[source] = target
    return {DATUM_OF[source]: DATUM_OF[target] for source, target in found.items()}


def quoted(text, word):
    start = text.find(word + '["')
    return "" if start < 0 else text[start + len(word) + 2 :].split('"', 1)[0]


def datums():
    frame = frames()
    written = set()
    for crs, crs_name, datum, name in sorted(GEOGRAPHIC, key=lambda row: ("(lon-lat)" in row[1], int(row[0]))):
        if datum in written:
            continue
        written.add(datum)
        definition = CRS.from_epsg(crs)
        aliases = {quoted(wkt(definition, version), "DATUM") for version in (WktVersion.WKT1_GDAL, WktVersion.WKT1_ESRI)}
        aliases |= {
            alias
            for (alias,) in rows(
                """select alt_name from alias_name where table_name = 'geodetic_datum' and auth_name = 'EPSG'
                   and source = 'ESRI' and code = ?""",
                datum,
            )
        }
        aliases.discard("")
        yield "D", datum, name, frame.get(datum, datum), "EPSG:%s %s" % (crs, crs_name), "|".join(sorted(aliases))


def area_of(code, table):
    return rows(
        """select e.west_lon, e.south_lat, e.east_lon, e.north_lat from usage u join extent e
           on e.auth_name = u.extent_auth_name and e.code = u.extent_code
           where u.object_table_name = ? and u.object_auth_name = 'EPSG' and u.object_code = ? order by u.code""",
        table,
        code,
    )[0]


def furthest(code, area):
    """How far an operation moves places, in metres on the ellipsoid of WGS 84."""
    transform = Transformer.from_pipeline("urn:ogc:def:coordinateOperation:EPSG::" + code)
    places = spread(area, itertools.product((0.05, 0.5, 0.95), repeat=2))
    lon, lat = [place[0] for place in places], [place[1] for place in places]
    moved_lat, moved_lon = transform.transform(lat, lon)
    return max(Geod(ellps="WGS84").inv(lon, lat, moved_lon, moved_lat)[2])


def operations():
    nulls = {
        code
        for (code,) in rows(
            """select code from helmert_transformation where auth_name = 'EPSG' and tx = 0 and ty = 0 and tz = 0
               and coalesce(rx, 0) = 0 and coalesce(ry, 0) = 0 and coalesce(rz, 0) = 0
               and coalesce(scale_difference, 0) = 0"""
        )
    }
    for table, code, name, source, target, accuracy in rows(
        """select table_name, code, name, source_crs_code, target_crs_code, accuracy from coordinate_operation_view
           where auth_name = 'EPSG' and deprecated = 0 and source_crs_auth_name = 'EPSG'
           and target_crs_auth_name = 'EPSG' and accuracy is not null
           and table_name in ('helmert_transformation', 'grid_transformation') order by cast(code as int)"""
    ):
        if source not in DATUM_OF or target not in DATUM_OF:
            continue
        area = area_of(code, table)
        one, other = CRS.from_epsg(source).ellipsoid, CRS.from_epsg(target).ellipsoid
        flattening = abs(1 / one.inverse_flattening - 1 / other.inverse_flattening)
        kind = "shift" if table == "helmert_transformation" else "grid"
        # Zero translations between ellipsoids of other shape still move latitudes; only where that is below a millimetre
        # may coordinates be taken over as they are.
        if code in nulls and flattening * one.semi_major_metre < 0.001:
            kind = "null"
        yield (
            "O",
            code,
            name,
            DATUM_OF[source],
            DATUM_OF[target],
            number(accuracy),
            kind,
            "%.0f" % furthest(code, area) if kind == "shift" else "",
            ",".join(map(number, area)),
        )


def main():
    lines = ["\t".join(fields) for fields in itertools.chain(systems(), datums(), operations())]
    target = sys.argv[1] if len(sys.argv) > 1 else "registry.tsv.br"
    with open(target, "wb") as file:
        file.write(brotli.compress(("\n".join(lines) + "\n").encode("utf-8"), quality=11, lgwin=24))


main()
