using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Reads what the nodes of WKT 1 mean, in GDAL's dialect or ESRI's. Words that it does not know are refused.</summary>
/// <param name="where">The place, for messages.</param>
/// <param name="mend">What to do where the definition is not understood.</param>
internal sealed class DefinitionReader(Place where, string mend)
{
    private const double RadiansPerDegree = Math.PI / 180;

    /// <summary>What to do where the definition in a file is not understood.</summary>
    public const string MendOfFile = "Say the system in the recipe by its code: crs: Crs(\"EPSG:…\")";

    private static readonly string[] ProjectedWords =
    [
        "GEOGCS",
        "PROJECTION",
        "PARAMETER",
        "UNIT",
        "AXIS",
        "AUTHORITY",
        "EXTENSION",
    ];

    private static readonly string[] GeographicWords = ["DATUM", "PRIMEM", "UNIT", "AXIS", "AUTHORITY"];

    /// <summary>TOWGS84 and EXTENSION hint at shifts to WGS 84; datums follow the registry instead.</summary>
    private static readonly string[] DatumWords = ["SPHEROID", "TOWGS84", "EXTENSION", "AUTHORITY"];

    /// <summary>The meaning of a PROJCS, a GEOGCS, or a COMPD_CS that holds either.</summary>
    /// <exception cref="RefusedException">Something is missing or not understood.</exception>
    public SystemDefinition Read(WktNode root) =>
        root.Keyword switch
        {
            "PROJCS" => ReadProjected(root),
            "GEOGCS" => ReadGeographic(root),
            "COMPD_CS" => Read(
                root.Child("PROJCS") ?? root.Child("GEOGCS") ?? throw Refuse("names no horizontal system")
            ),
            "LOCAL_CS" => throw Refuse("is for a local plane without a place on the Earth"),
            _ => throw Refuse($"opens with {root.Keyword}, where PROJCS or GEOGCS of WKT 1 is expected"),
        };

    private SystemDefinition ReadProjected(WktNode node)
    {
        ExpectOnly(node, ProjectedWords);
        var unit = Number(Child(node, "UNIT"), 0);
        if (unit <= 0)
        {
            throw Refuse("has a unit of length that is not above zero");
        }

        var geographic = ReadGeographic(Child(node, "GEOGCS"));
        return geographic with
        {
            Name = node.Name,
            Form = ReadForm(node, geographic, unit),
            UnitName = Child(node, "UNIT").Name,
            MetresPerUnit = unit,
            SaysEastNorth = SaysEastNorth(node),
            ClaimedCode = CodeOf(node),
        };
    }

    private PlaneForm ReadForm(WktNode node, SystemDefinition geographic, double metresPerUnit)
    {
        var method = Child(node, "PROJECTION").Name;
        if (!PlaneMethods.Knows(method))
        {
            throw Refuse($"uses the method {method}, which cannot be computed rightly here");
        }

        var parameters = new PlaneParameters(node, method, where, mend)
        {
            DegreesPerUnit = geographic.DegreesPerUnit,
            MeridianDegrees = geographic.MeridianDegrees,
            MetresPerUnit = metresPerUnit,
        };
        var form = IsWebMercator(node)
            ? PlaneMethods.WebMercator(parameters, geographic.Ellipsoid)
            : PlaneMethods.Rewrite(method, parameters, geographic.Ellipsoid);
        var turned = form.Method == PlaneMethod.Krovak && SaysEastNorth(node);
        return turned ? form with { Axes = PlaneAxes.EastNorth } : form;
    }

    /// <summary>GDAL's dialect writes web Mercator as Mercator, with an extension that says otherwise.</summary>
    private bool IsWebMercator(WktNode node)
    {
        if (node.Child("EXTENSION") is not { } extension)
        {
            return false;
        }

        var text = extension.Texts.Count == 2 ? extension.Texts[1] : "";
        return text.Contains("+proj=merc +a=6378137 +b=6378137 ", StringComparison.Ordinal)
            ? true
            : throw Refuse("has an extension that is not understood");
    }

    private SystemDefinition ReadGeographic(WktNode node)
    {
        ExpectOnly(node, GeographicWords);
        var datum = Child(node, "DATUM");
        ExpectOnly(datum, DatumWords);
        var spheroid = Child(datum, "SPHEROID");
        var unit = Number(Child(node, "UNIT"), 0) / RadiansPerDegree;
        if (unit <= 0)
        {
            throw Refuse("has a unit of angle that is not above zero");
        }

        return new SystemDefinition
        {
            Name = node.Name,
            Datum = DatumFrame.Named(datum.Name, NumberOf(datum)),
            Ellipsoid = new Ellipsoid(spheroid.Name, Number(spheroid, 0), Number(spheroid, 1)),
            MeridianDegrees = Number(Child(node, "PRIMEM"), 0),
            DegreesPerUnit = Rounded(unit),
            UnitName = Child(node, "UNIT").Name,
            ClaimedCode = CodeOf(node),
        };
    }

    /// <summary>Writers round pi / 180 to 15 digits or more; the angle that they mean is a round number of degrees.</summary>
    private static double Rounded(double degrees) => Math.Round(degrees, 12);

    private static bool SaysEastNorth(WktNode node)
    {
        var axes = node.ChildrenOf("AXIS").Select(axis => axis.Texts.Count == 2 ? axis.Texts[1] : "").ToArray();
        return axes is ["EAST", "NORTH"];
    }

    private static string CodeOf(WktNode node) => NumberOf(node) is { Length: > 0 } number ? "EPSG:" + number : "";

    private static string NumberOf(WktNode node) =>
        node.Child("AUTHORITY") is { Texts: ["EPSG", var number] } ? number : "";

    private WktNode Child(WktNode node, string keyword) =>
        node.Child(keyword) ?? throw Refuse($"has no {keyword} in its {node.Keyword}");

    private double Number(WktNode node, int index) =>
        node.Numbers.Count > index ? node.Numbers[index] : throw Refuse($"lacks a number in its {node.Keyword}");

    private void ExpectOnly(WktNode node, string[] words)
    {
        if (node.Children.FirstOrDefault(child => !words.Contains(child.Keyword, StringComparer.Ordinal)) is { } other)
        {
            throw Refuse($"holds a {other.Keyword} in its {node.Keyword}, which is not understood");
        }
    }

    private RefusedException Refuse(string why) =>
        new(Finding.Error("RR0311", where, $"The definition of the reference system {why}.", mend));
}
