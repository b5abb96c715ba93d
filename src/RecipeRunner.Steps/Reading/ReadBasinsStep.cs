using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Shapes;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Reads basin boundaries from a shapefile or GeoJSON file: polygons and multipolygons. Outlines that cross themselves
/// are repaired by rule with a finding, or refused.
/// </summary>
/// <param name="File">The file, relative to the data folder.</param>
/// <param name="Id">The column that holds each basin's unique id.</param>
/// <param name="Name">The column that holds names for people; the ids serve where not given.</param>
/// <param name="Crs">The reference system, where the file does not say it or says it wrongly.</param>
/// <example><code>var basins = ReadBasins("basins.shp", id: "BASIN_ID", name: "NAME");</code></example>
[Step("Read basins")]
public sealed record ReadBasinsStep(string File, string Id, string? Name, ReferenceSystem? Crs) : Step<BasinLayer>
{
    /// <inheritdoc/>
    public override BasinLayer Execute(StepContext context)
    {
        var file = FeatureFile.Read(context, File);
        var id = file.FieldOf(Id);
        var name = Name is null ? id : file.FieldOf(Name);
        var system = file.SystemOr(Crs);
        TellOfOverride(context, file);
        if (file.Features.IsEmpty)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0234",
                    new Place(File),
                    "It holds no features.",
                    "Was the layer exported with its selection empty?"
                )
            );
        }

        var problems = new Problems();
        RequireIds(file, id, problems);
        var basins = file
            .Features.Select(feature => BasinOf(feature, id, name, system, context, problems))
            .OfType<Basin>()
            .ToImmutableArray();
        problems.ThrowIfAny();
        return new BasinLayer(basins, system, File);
    }

    private void TellOfOverride(StepContext context, FeatureFile file)
    {
        if (Crs is not null && file.SystemRefusal is { } refusal)
        {
            context.Find(
                Finding.Caution(
                    "RR0235",
                    new Place(File),
                    $"What the file says of its system cannot be used; the recipe says {Crs.Label}, which is. {refusal.Problems[0].What}",
                    "Make sure that the recipe is right."
                )
            );
        }

        if (Crs is not null && file.ReferenceSystem is { } own && !own.IsSameAs(Crs))
        {
            context.Find(
                Finding.Caution(
                    "RR0235",
                    new Place(File),
                    $"The file says {own.Label}; the recipe says {Crs.Label}, which is used.",
                    "Drop crs: from the recipe unless the file is wrong."
                )
            );
        }
    }

    private void RequireIds(FeatureFile file, int id, Problems problems)
    {
        foreach (var blank in file.Features.Where(feature => feature.Values[id].Length == 0))
        {
            problems.Add("RR0236", Feature(blank), $"Its column {Id} is blank.", "Give each basin an id.");
        }

        foreach (
            var twins in file
                .Features.Where(feature => feature.Values[id].Length > 0)
                .GroupBy(feature => feature.Values[id], StringComparer.Ordinal)
                .Where(group => group.Skip(1).Any())
        )
        {
            var numbers = string.Join(
                " and ",
                twins.Select(feature => FormattableString.Invariant($"{feature.Number}"))
            );
            problems.Add(
                "RR0237",
                new Place(File, Item: $"basin {twins.Key}"),
                $"Features {numbers} have this id.",
                $"Ids are unique: name another column, or merge the parts into one feature."
            );
        }
    }

    private Basin? BasinOf(
        FileFeature feature,
        int id,
        int name,
        ReferenceSystem system,
        StepContext context,
        Problems problems
    )
    {
        context.Cancellation.ThrowIfCancellationRequested();
        var key = feature.Values[id];
        var place = key.Length > 0 ? new Place(File, Item: $"basin {key}") : Feature(feature);
        if (feature.Geometry is null || feature.Geometry.IsEmpty)
        {
            problems.Add("RR0238", place, "It has no geometry.", "Draw its outline, or take the feature out.");
            return null;
        }

        var box = feature.Geometry.EnvelopeInternal;
        if (
            !NativeUnits.IsPossible(box.MinX, box.MinY, system, place, problems)
            || !NativeUnits.IsPossible(box.MaxX, box.MaxY, system, place, problems)
        )
        {
            return null;
        }

        var shape = ShapeRepair.Settle(NativeUnits.ToModel(feature.Geometry, system), system, place, context, problems);
        return shape is null
            ? null
            : new Basin(key, feature.Values[name].Length > 0 ? feature.Values[name] : key, shape);
    }

    private Place Feature(FileFeature feature) =>
        new(File, Item: FormattableString.Invariant($"feature {feature.Number}"));
}
