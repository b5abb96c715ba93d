using System.Collections.Immutable;
using NetTopologySuite.Geometries;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading;

/// <summary>One feature as its file holds it.</summary>
/// <param name="Number">Its number in the file, from 1.</param>
/// <param name="Geometry">Its geometry, not yet checked; null where it has none.</param>
/// <param name="Values">Its attributes as text, in the file's order; empty text where blank.</param>
internal sealed record FileFeature(int Number, Geometry? Geometry, ImmutableArray<string> Values);

/// <summary>A file of features.</summary>
/// <param name="Name">The file's name.</param>
/// <param name="Fields">Names of the attributes.</param>
/// <param name="Features">The features, in the file's order.</param>
/// <param name="ReferenceSystem">The system that the file says it is in; null where it says nothing.</param>
/// <param name="SystemRefusal">Why what the file says cannot be used; null where it can.</param>
internal sealed record FeatureFile(
    string Name,
    ImmutableArray<string> Fields,
    ImmutableArray<FileFeature> Features,
    ReferenceSystem? ReferenceSystem,
    RefusedException? SystemRefusal
)
{
    /// <summary>Reads a shapefile or GeoJSON file, told apart by its ending.</summary>
    /// <exception cref="RefusedException">The ending is another, or the file is damaged.</exception>
    public static FeatureFile Read(StepContext context, string name) =>
        Path.GetExtension(name).ToLowerInvariant() switch
        {
            ".shp" => ShapefileSource.Read(context, name),
            ".geojson" or ".json" => GeoJsonSource.Read(context, name),
            _ => throw new RefusedException(
                Finding.Error(
                    "RR0205",
                    new Place(name),
                    "This is not a kind of layer file that is read.",
                    "Give a shapefile (.shp) or GeoJSON (.geojson)."
                )
            ),
        };

    /// <summary>The system of the coordinates: what the recipe says, else what the file says.</summary>
    /// <param name="given">What the recipe says; null for nothing.</param>
    /// <exception cref="RefusedException">Neither says anything.</exception>
    public ReferenceSystem SystemOr(ReferenceSystem? given) =>
        given ?? ReferenceSystem ?? throw SystemRefusal ?? MissingSystem.Refusal(Name, Extent);

    /// <summary>The index of a field.</summary>
    /// <exception cref="RefusedException">There is none of that name.</exception>
    public int FieldOf(string field) => FieldNames.Find(Name, Fields, field);

    /// <summary>The rectangle about all coordinates, as the file holds them.</summary>
    public Bounds Extent =>
        Features
            .Select(feature => feature.Geometry)
            .Where(geometry => geometry is { IsEmpty: false })
            .Select(geometry => geometry!.EnvelopeInternal)
            .Aggregate(Bounds.Empty, (bounds, box) => bounds.With(new Bounds(box.MinX, box.MinY, box.MaxX, box.MaxY)));

    /// <summary>Reads what the file says of its system; a refusal waits until it is known whether the recipe says it instead.</summary>
    public static (ReferenceSystem? System, RefusedException? Refusal) ReadSystem(Func<ReferenceSystem?> read)
    {
        try
        {
            return (read(), null);
        }
        catch (RefusedException refusal)
        {
            return (null, refusal);
        }
    }
}
