using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Referencing;

namespace RecipeRunner.Steps.Tests.Referencing;

/// <summary>
/// Every code of the embedded table. Source: EPSG v10.076, control points by PROJ 9.1.1 through pyproj 3.4.1 (generate.py
/// beside the table).
/// </summary>
public sealed class RegistryTests
{
    private static readonly SystemEntry[] All =
    [
        .. RegistryTable.Systems.Values.OrderBy(entry => int.Parse(entry.Code[5..], CultureInfo.InvariantCulture)),
    ];

    [Fact]
    public void Every_code_is_usable_or_refused_for_a_known_reason()
    {
        var tally = All.GroupBy(Verdict, StringComparer.Ordinal).OrderBy(group => group.Key, StringComparer.Ordinal);

        string.Join('\n', tally.Select(group => $"{group.Key}: {group.Count()}"))
            .ShouldBe(
                """
                deprecated: refused RR0303: 443
                geographic: refused RR0303: 6
                geographic: usable: 539
                projected: refused RR0303 Bonne (South Orientated): 2
                projected: refused RR0303 Colombia Urban: 32
                projected: refused RR0303 Equal Earth: 3
                projected: refused RR0303 Equidistant Cylindrical: 1
                projected: refused RR0303 Guam Projection: 1
                projected: refused RR0303 Hyperbolic Cassini-Soldner: 1
                projected: refused RR0303 Krovak Modified: 2
                projected: refused RR0303 Krovak Modified (North Orientated): 2
                projected: refused RR0303 Laborde Oblique Mercator: 2
                projected: refused RR0303 Lambert Conic Conformal (2SP Belgium): 1
                projected: refused RR0303 Lambert Conic Conformal (2SP Michigan): 3
                projected: refused RR0303 Lambert Conic Conformal (West Orientated): 15
                projected: refused RR0303 Lambert Conic Near-Conformal: 1
                projected: refused RR0303 Lambert Cylindrical Equal Area: 1
                projected: refused RR0303 Modified Azimuthal Equidistant: 1
                projected: refused RR0303 New Zealand Map Grid: 1
                projected: refused RR0303 Polar Stereographic (variant A): 10
                projected: refused RR0303 Polar Stereographic (variant B): 26
                projected: refused RR0303 Polar Stereographic (variant C): 2
                projected: refused RR0303 Transverse Mercator 3D: 1
                projected: refused RR0303 Transverse Mercator Zoned Grid System: 2
                projected: refused RR0303 Tunisia Mining Grid: 1
                projected: refused RR0304 Cassini-Soldner: 3
                projected: usable: 5021
                """
            );
    }

    [Fact]
    public void Usable_codes_meet_their_control_points_within_a_centimetre_and_nearly_all_within_a_millimetre()
    {
        var misses = Usable()
            .SelectMany(system =>
                Entry(system).Controls.Select(control => (system.Facts.Code, Miss: system.Miss(control)))
            )
            .ToArray();

        misses.Length.ShouldBe(3 * 5021);
        misses.Max(one => one.Miss).ShouldBeLessThan(0.01);
        misses
            .Where(one => one.Miss > 0.001)
            .Select(one => one.Code)
            .Distinct(StringComparer.Ordinal)
            .ShouldBe(["EPSG:5629", "EPSG:9377", "EPSG:28232"]);
    }

    /// <summary>
    /// Control points lie at no special place; libraries fail at special ones. At the origin, on the central meridian, the
    /// parallels and the borders, a projection must be the mean of its neighbours on either side.
    /// </summary>
    [Fact]
    public void No_projection_has_a_seam_within_its_area()
    {
        var torn = Usable().Where(system => SpecialPlaces(system).Any(place => Tear(system, place) > 0.002));

        torn.Select(system => system.Facts.Code).ShouldBeEmpty();
    }

    [Fact]
    public void The_way_back_leads_to_every_control_point()
    {
        var degrees = new Location[1];
        foreach (var system in Usable())
        {
            foreach (var control in Entry(system).Controls)
            {
                var metres = new Location(
                    control.Plane.X * system.Facts.MetresPerUnit,
                    control.Plane.Y * system.Facts.MetresPerUnit
                );
                system.Projection!.ToDegrees([metres], degrees).ShouldBe(-1, system.Facts.Code);
                Ground.Metres(system, degrees[0], control.Degrees).ShouldBeLessThan(0.01, system.Facts.Code);
            }
        }
    }

    private static IEnumerable<KnownSystem> Usable() =>
        All.Where(entry => entry.Method.Length > 0 && Verdict(entry).EndsWith("usable", StringComparison.Ordinal))
            .Select(KnownSystem.OfEntry);

    private static SystemEntry Entry(KnownSystem system) => RegistryTable.Systems[system.Facts.Code[5..]];

    private static string Verdict(SystemEntry entry)
    {
        var kind =
            entry.IsDeprecated ? "deprecated"
            : entry.Method.Length == 0 ? "geographic"
            : "projected";
        try
        {
            KnownSystem.OfEntry(entry);
            return $"{kind}: usable";
        }
        catch (RefusedException refused)
        {
            return $"{kind}: refused {refused.Problems[0].Code} {entry.Method}".TrimEnd();
        }
    }

    private static IEnumerable<Location> SpecialPlaces(KnownSystem system)
    {
        var form = system.Definition.Form!;
        var area = system.Area;
        double[] longitudes = [form.Longitude, area.West, area.East, area.Centre.X];
        double[] latitudes =
        [
            form.Latitude,
            form.FirstParallel,
            form.SecondParallel,
            0,
            area.South,
            area.North,
            area.Centre.Y,
        ];
        return from longitude in longitudes
            from latitude in latitudes
            let place = new Location(longitude, Math.Clamp(latitude, -84, 84))
            where area.Outside(place) <= AreaWatch.FarthestDegrees && !IsOpposite(form, longitude)
            select place;
    }

    /// <summary>Where the map is cut on purpose.</summary>
    private static bool IsOpposite(PlaneForm form, double longitude) =>
        Math.Abs(Degrees.Wrap(longitude - form.Longitude, 0)) > 179.9;

    private static double Tear(KnownSystem system, Location at)
    {
        const double step = 1e-4;
        var here = system.Projection!.ToPlane(at);
        return new[] { new Location(step, 0), new Location(0, step) }.Max(by =>
        {
            var one = system.Projection.ToPlane(new Location(at.X + by.X, at.Y + by.Y));
            var other = system.Projection.ToPlane(new Location(at.X - by.X, at.Y - by.Y));
            var tear = here.DistanceTo(new Location((one.X + other.X) / 2, (one.Y + other.Y) / 2));
            return double.IsNaN(tear) ? double.PositiveInfinity : tear;
        });
    }
}
