using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>What a definition says, in degrees and metres, whatever words and units it says it in.</summary>
internal sealed record SystemDefinition
{
    /// <summary>The name in the definition.</summary>
    public required string Name { get; init; }

    /// <summary>The datum.</summary>
    public required DatumFrame Datum { get; init; }

    /// <summary>The figure of the datum.</summary>
    public required Ellipsoid Ellipsoid { get; init; }

    /// <summary>Degrees from Greenwich to the meridian from which longitudes count, east positive.</summary>
    public required double MeridianDegrees { get; init; }

    /// <summary>Degrees in one of the definition's angles: 1, or 0.9 for grads.</summary>
    public required double DegreesPerUnit { get; init; }

    /// <summary>The projection; null for a geographic system.</summary>
    public PlaneForm? Form { get; init; }

    /// <summary>The name of the unit of coordinates.</summary>
    public required string UnitName { get; init; }

    /// <summary>Metres in the unit of coordinates; 1 for a geographic system.</summary>
    public double MetresPerUnit { get; init; } = 1;

    /// <summary>True where the definition says that its first axis points east and its second north.</summary>
    public bool SaysEastNorth { get; init; }

    /// <summary>The registry's code that the definition claims, such as <c>EPSG:32633</c>; empty where it claims none.</summary>
    public string ClaimedCode { get; init; } = "";

    /// <summary>Angles or lengths.</summary>
    public ReferenceSystemKind Kind => Form is null ? ReferenceSystemKind.Geographic : ReferenceSystemKind.Projected;

    /// <summary>True where both give the same coordinates: parameters compared, names not.</summary>
    public bool IsLike(SystemDefinition other)
    {
        if (Kind != other.Kind || Datum.Key != other.Datum.Key || !Ellipsoid.IsLike(other.Ellipsoid))
        {
            return false;
        }

        return Form is not null && other.Form is not null
            ? Form.IsLike(other.Form) && Math.Abs((MetresPerUnit / other.MetresPerUnit) - 1) < 2e-9
            : Math.Abs(MeridianDegrees - other.MeridianDegrees) < 1e-8
                && Math.Abs(DegreesPerUnit - other.DegreesPerUnit) < 1e-12;
    }
}
