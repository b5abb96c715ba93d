using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Model.Space;

/// <summary>Whether coordinates are angles on an ellipsoid or lengths in a plane.</summary>
public enum ReferenceSystemKind
{
    /// <summary>Longitude and latitude in degrees. Areas and distances are refused here.</summary>
    Geographic,

    /// <summary>East and north as lengths. Held in metres, whatever the system's own unit.</summary>
    Projected,
}

/// <summary>A coordinate reference system as a recipe names it: facts only, no transformation.</summary>
public sealed record ReferenceSystem : ISettingValue
{
    /// <summary>The registry's code, such as <c>EPSG:32633</c>; empty for a system known by its definition alone.</summary>
    public required string Code { get; init; }

    /// <summary>The registry's or the file's name.</summary>
    public required string Name { get; init; }

    /// <summary>Angles or lengths.</summary>
    public required ReferenceSystemKind Kind { get; init; }

    /// <summary>The name of the geodetic datum.</summary>
    public required string Datum { get; init; }

    /// <summary>The name of the unit in which files in this system hold their coordinates.</summary>
    public required string UnitName { get; init; }

    /// <summary>Metres in one unit of a projected system; 1 for a geographic one.</summary>
    public required double MetresPerUnit { get; init; }

    /// <summary>The definition as WKT 1 text in the dialect of the OGC 01-009 family that shapefile readers understand.</summary>
    public required string Wkt { get; init; }

    /// <summary>The code, or the name where there is no code.</summary>
    public string Label => Code.Length > 0 ? Code : string.Create(CultureInfo.InvariantCulture, $"\"{Name}\"");

    /// <summary>True where both name the same system: same code, or same definition where either has no code.</summary>
    public bool IsSameAs(ReferenceSystem other) =>
        Code.Length > 0 && other.Code.Length > 0
            ? string.Equals(Code, other.Code, StringComparison.Ordinal)
            : string.Equals(Wkt, other.Wkt, StringComparison.Ordinal);

    /// <inheritdoc/>
    public string ToSettingText() => Label;

    /// <inheritdoc/>
    public override string ToString() => Label;
}
