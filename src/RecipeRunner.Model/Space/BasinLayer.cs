using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Space;

/// <summary>Basins in one reference system, with the columns that steps have added to them.</summary>
public sealed class BasinLayer : Artifact, IMapLayer
{
    /// <summary>Creates the layer.</summary>
    /// <param name="basins">Basins with distinct ids, in the order in which they are to be reported.</param>
    /// <param name="referenceSystem">The system of all coordinates.</param>
    /// <param name="source">The file or step it came from, as people would name it.</param>
    /// <param name="columns">Further columns, each with a cell a basin in the same order.</param>
    public BasinLayer(
        ImmutableArray<Basin> basins,
        ReferenceSystem referenceSystem,
        string source,
        ImmutableArray<Column> columns = default
    )
    {
        Basins = basins;
        ReferenceSystem = referenceSystem;
        Source = source;
        Columns = columns.IsDefault ? [] : columns;
    }

    /// <summary>The basins.</summary>
    public ImmutableArray<Basin> Basins { get; }

    /// <inheritdoc/>
    public ReferenceSystem ReferenceSystem { get; }

    /// <summary>The file or step it came from.</summary>
    public string Source { get; }

    /// <summary>Columns beyond id, name and area; a cell a basin.</summary>
    public ImmutableArray<Column> Columns { get; }

    /// <summary>The rectangle about all basins.</summary>
    public Bounds Bounds => Basins.Aggregate(Bounds.Empty, (bounds, basin) => bounds.With(basin.Shape.Bounds));

    /// <summary>The same basins with further columns; a column of a name already there takes its place.</summary>
    /// <param name="added">Columns with a cell a basin, in the order of <see cref="Basins"/>.</param>
    public BasinLayer WithColumns(IEnumerable<Column> added)
    {
        var fresh = added.ToImmutableArray();
        var kept = Columns.Where(old =>
            !fresh.Any(column => string.Equals(column.Name, old.Name, StringComparison.Ordinal))
        );
        return new BasinLayer(Basins, ReferenceSystem, Source, [.. kept, .. fresh]);
    }

    /// <inheritdoc/>
    public FeatureTable ToFeatures()
    {
        var ids = Column.OfText("basin", "Basin id", Basins.Select(basin => basin.Id));
        var names = Column.OfText("name", "Basin name", Basins.Select(basin => basin.Name));
        var measured =
            ReferenceSystem.Kind == ReferenceSystemKind.Projected
                ?
                [
                    Column.OfNumbers(
                        "area_km2",
                        "km²",
                        6,
                        "Area in the working grid",
                        Basins.Select(basin => (double?)basin.Shape.Area / 1e6)
                    ),
                ]
                : ImmutableArray<Column>.Empty;
        return new FeatureTable(
            GeometryKind.Region,
            [.. Basins.Select(basin => new Shape(basin.Shape))],
            new Table([ids, names, .. measured, .. Columns])
        );
    }

    /// <inheritdoc/>
    public override string Describe()
    {
        var count = Counted.Of(Basins.Length, "basin");
        return ReferenceSystem.Kind == ReferenceSystemKind.Projected
            ? string.Create(
                CultureInfo.InvariantCulture,
                $"{count}, {Basins.Sum(basin => basin.Shape.Area) / 1e6:N0} km², {ReferenceSystem.Label}"
            )
            : $"{count}, {ReferenceSystem.Label}";
    }

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(ReferenceSystem.Wkt);
        writer.Write(Basins.Length);
        foreach (var basin in Basins)
        {
            writer.Write(basin.Id);
            writer.Write(basin.Name);
            writer.Write(basin.Shape);
        }

        writer.Write(new Table(Columns));
    }
}
