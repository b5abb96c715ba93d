using System.Collections.Frozen;
using System.Globalization;
using System.IO.Compression;
using System.Text;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>A place that the registry's software projected: what a code must give to be trusted.</summary>
/// <param name="Degrees">Longitude from Greenwich and latitude, on the system's own datum.</param>
/// <param name="Plane">What it becomes, in the system's own unit.</param>
internal readonly record struct ControlPoint(Location Degrees, Location Plane);

/// <summary>A system as the registry has it.</summary>
/// <param name="Code">The code, such as <c>EPSG:32633</c>.</param>
/// <param name="Name">Its name; for a deprecated one with what has taken its place.</param>
/// <param name="Method">The name of its projection method; empty for a geographic or a deprecated system.</param>
/// <param name="Area">Where it is meant to be used.</param>
/// <param name="Wkt">Its definition in GDAL's dialect of WKT 1; empty where WKT 1 cannot hold it, and for a deprecated system.</param>
/// <param name="Controls">Three places, or none.</param>
/// <param name="Alias">Its name in ESRI's dialect; empty where none is known.</param>
internal sealed record SystemEntry(
    string Code,
    string Name,
    string Method,
    AreaOfUse Area,
    string Wkt,
    ControlPoint[] Controls,
    string Alias
)
{
    /// <summary>True where the registry has withdrawn it, often because something in it is wrong.</summary>
    public bool IsDeprecated => Method.Length == 0 && Wkt.Length == 0;

    /// <summary>What <see cref="Wkt"/> says.</summary>
    /// <exception cref="RefusedException">RR0311: it is not understood.</exception>
    public SystemDefinition ReadDefinition() =>
        new DefinitionReader(Place.Of(Code), UtmZone.Suggest(Area)).Read(WktReader.Read(Wkt, Code));
}

/// <summary>A datum as the registry has it.</summary>
/// <param name="Code">Its number.</param>
/// <param name="Name">Its name.</param>
/// <param name="Frame">The number of the datum that it becomes once longitudes count from Greenwich; mostly its own.</param>
/// <param name="Crs">Code and name of the geographic system that people call it by.</param>
/// <param name="Aliases">Its names in both dialects of WKT 1.</param>
internal sealed record DatumEntry(string Code, string Name, string Frame, string Crs, string[] Aliases);

/// <summary>How an operation between two datums is defined.</summary>
internal enum OperationKind
{
    /// <summary>All parameters zero, ellipsoids of one shape: coordinates stay.</summary>
    Null,

    /// <summary>Three to ten parameters.</summary>
    Shift,

    /// <summary>A grid of corrections in a file.</summary>
    Grid,
}

/// <summary>An operation between two datums as the registry has it.</summary>
/// <param name="Code">Its code, such as <c>EPSG:1188</c>.</param>
/// <param name="Name">Its name.</param>
/// <param name="Source">The number of the datum it starts from.</param>
/// <param name="Target">The number of the datum it leads to.</param>
/// <param name="AccuracyMetres">As the registry states it.</param>
/// <param name="Kind">How it is defined.</param>
/// <param name="FurthestMetres">How far it moves places of its area; null where unknown.</param>
/// <param name="Area">Where it is meant to be used.</param>
internal sealed record OperationEntry(
    string Code,
    string Name,
    string Source,
    string Target,
    double AccuracyMetres,
    OperationKind Kind,
    double? FurthestMetres,
    AreaOfUse Area
);

/// <summary>
/// The embedded extract of the EPSG Geodetic Parameter Dataset v10.076 (owned by IOGP, used under its terms of use, see
/// generate.py beside this file, which made it with PROJ 9.1.1).
/// </summary>
internal static class RegistryTable
{
    private const string Resource = "RecipeRunner.Steps.Referencing.registry.tsv.br";

    private static readonly Lazy<Sections> All = new(Load);

    /// <summary>Systems by number, such as <c>32633</c>.</summary>
    public static FrozenDictionary<string, SystemEntry> Systems => All.Value.Systems;

    /// <summary>Datums by number.</summary>
    public static FrozenDictionary<string, DatumEntry> Datums => All.Value.Datums;

    /// <summary>Operations in ascending order of their numbers.</summary>
    public static OperationEntry[] Operations => All.Value.Operations;

    private static Sections Load()
    {
        using var packed =
            typeof(RegistryTable).Assembly.GetManifestResourceStream(Resource)
            ?? throw new InvalidOperationException($"The resource {Resource} is not in the assembly.");
        using var text = new StreamReader(new BrotliStream(packed, CompressionMode.Decompress), Encoding.UTF8);
        var systems = new Dictionary<string, SystemEntry>(StringComparer.Ordinal);
        var datums = new Dictionary<string, DatumEntry>(StringComparer.Ordinal);
        var operations = new List<OperationEntry>();
        while (text.ReadLine() is { } line)
        {
            var fields = line.Split('\t');
            switch (fields[0])
            {
                case "S":
                    systems.Add(fields[1], System(fields));
                    break;
                case "D":
                    datums.Add(fields[1], new(fields[1], fields[2], fields[3], fields[4], fields[5].Split('|')));
                    break;
                case "O":
                    operations.Add(Operation(fields));
                    break;
                default:
                    throw new InvalidOperationException($"The embedded table has a line of unknown kind {fields[0]}.");
            }
        }

        return new Sections(
            systems.ToFrozenDictionary(StringComparer.Ordinal),
            datums.ToFrozenDictionary(StringComparer.Ordinal),
            [.. operations]
        );
    }

    private static SystemEntry System(string[] fields) =>
        new("EPSG:" + fields[1], fields[2], fields[3], Area(fields[4]), fields[5], Controls(fields[6]), fields[7]);

    private static OperationEntry Operation(string[] fields) =>
        new(
            "EPSG:" + fields[1],
            fields[2],
            fields[3],
            fields[4],
            Number(fields[5]),
            Enum.Parse<OperationKind>(fields[6], ignoreCase: true),
            fields[7].Length > 0 ? Number(fields[7]) : null,
            Area(fields[8])
        );

    private static AreaOfUse Area(string text)
    {
        var sides = Numbers(text);
        return new AreaOfUse(sides[0], sides[1], sides[2], sides[3]);
    }

    private static ControlPoint[] Controls(string text) =>
        [
            .. text.Split(';', StringSplitOptions.RemoveEmptyEntries)
                .Select(Numbers)
                .Select(four => new ControlPoint(new(four[0], four[1]), new(four[2], four[3]))),
        ];

    private static double[] Numbers(string text) => [.. text.Split(',').Select(Number)];

    private static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);

    private sealed record Sections(
        FrozenDictionary<string, SystemEntry> Systems,
        FrozenDictionary<string, DatumEntry> Datums,
        OperationEntry[] Operations
    );
}
