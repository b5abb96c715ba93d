using System.Collections.Immutable;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Carries basins to another reference system. Vertices are projected, edges stay straight in the grid; coordinates are metres
/// on the lattice of 2^-16 m, in the order of the grid's axes, whatever its own unit.
/// </summary>
/// <param name="Basins">The basins.</param>
/// <param name="Grid">The system wanted.</param>
/// <param name="Densify">The longest edge wanted in the grid, in metres above zero; null to put no vertices in.</param>
/// <param name="Datum">What is accepted between two datums.</param>
[Step("Project basins", Word = "project", Source = "IOGP 373-7-2")]
public sealed record ProjectBasinsStep(BasinLayer Basins, ReferenceSystem Grid, double? Densify, DatumChoice Datum)
    : Step<BasinLayer>
{
    /// <inheritdoc/>
    /// <exception cref="RefusedException">
    /// RR0320: no accepted way leads between the datums. RR0330, RR0333: a vertex is at no place of its system. RR0332: a basin
    /// reaches far outside the grid's area. RR0342, RR0343: a basin has no valid shape in the grid. RR0352: densify is of no use.
    /// </exception>
    public override BasinLayer Execute(StepContext context)
    {
        ArgumentNullException.ThrowIfNull(context);
        RequireUsefulDensify();
        var transform = GridTransform.Between(Basins.ReferenceSystem, Grid, Datum);
        var degrees = ToDegrees(transform, context);
        DatumReport.Report(transform, context, Basins.Source);
        if (transform.Target.Projection is not null && !Basins.Basins.IsEmpty)
        {
            ScaleDistortion
                .Over(transform.Target, degrees.SelectMany(places => places))
                .Report(context, transform.To, Basins.Source, "the basins");
        }

        return new BasinLayer(Project(transform, degrees, context), transform.To, Basins.Source, Basins.Columns);
    }

    private void RequireUsefulDensify()
    {
        if (Densify is { } longest && !(longest > 0 && double.IsFinite(longest)))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0352",
                    Place.Of("densify"),
                    FormattableString.Invariant($"The longest edge wanted is {longest} m; it has to be above zero."),
                    "Give a length in metres, such as densify: 1000"
                )
            );
        }

        if (Densify is not null && Grid.Kind == ReferenceSystemKind.Geographic)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0352",
                    Place.Of("densify"),
                    $"The longest edge is given in metres, and {Grid.Label} has degrees.",
                    "Leave densify out, or choose a projected system."
                )
            );
        }
    }

    private Location[][] ToDegrees(GridTransform transform, StepContext context)
    {
        var source = new AreaWatch(transform.Source, Basins.Source);
        var target = new AreaWatch(transform.Target, Basins.Source);
        var degrees = new Location[Basins.Basins.Length][];
        for (var i = 0; i < degrees.Length; i++)
        {
            var vertices = Basins.Basins[i].Shape.Rings.SelectMany(ring => ring.Vertices).ToArray();
            degrees[i] = new Location[vertices.Length];
            transform.ToDegrees(vertices, degrees[i], PlaceOf(Basins.Basins[i]));
            source.See(PlaceOf(Basins.Basins[i]).Item, degrees[i]);
            target.See(PlaceOf(Basins.Basins[i]).Item, degrees[i]);
        }

        source.ThrowIfFar();
        target.ThrowIfFar();
        target.Report(context);
        return degrees;
    }

    private ImmutableArray<Basin> Project(GridTransform transform, Location[][] degrees, StepContext context)
    {
        var edges = new EdgeWatch(Basins.Source);
        var rings = new RingProjection(transform, Densify, edges);
        var regions = new RegionProjection(rings, transform.Target.Projection is not null, context);
        var projected = ImmutableArray.CreateBuilder<Basin>(degrees.Length);
        for (var i = 0; i < degrees.Length; i++)
        {
            context.Cancellation.ThrowIfCancellationRequested();
            var basin = Basins.Basins[i];
            projected.Add(basin with { Shape = regions.Project(basin.Shape, degrees[i], PlaceOf(basin)) });
            context.Progress((i + 1.0) / degrees.Length);
        }

        edges.Report(context);
        return projected.MoveToImmutable();
    }

    private Place PlaceOf(Basin basin) => new(Basins.Source, Item: $"basin {basin.Id}");
}

/// <summary>What a recipe writes to project basins.</summary>
public static class ProjectBasinsVerb
{
    /// <summary>The basins in another reference system, such as a working grid.</summary>
    /// <param name="basins">The basins.</param>
    /// <param name="grid">The system wanted: <c>Crs("EPSG:…")</c>.</param>
    /// <param name="densify">
    /// The longest edge wanted in the grid, in metres above zero: vertices are put on longer edges before projecting, so that
    /// long borders keep their course. None are put in where left out.
    /// </param>
    /// <param name="datum">What is accepted between two datums; only published null transformations where left out.</param>
    public static BasinLayer To(
        this BasinLayer basins,
        ReferenceSystem grid,
        double? densify = null,
        DatumChoice? datum = null
    )
    {
        ArgumentNullException.ThrowIfNull(basins);
        return basins.Run(new ProjectBasinsStep(basins, grid, densify, datum ?? DatumChoice.Published));
    }
}
