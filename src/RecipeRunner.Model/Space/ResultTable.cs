using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Model.Space;

/// <summary>A table that a step worked out, with a heading for people.</summary>
public sealed class ResultTable : Artifact, IShownTable
{
    private readonly Table table;

    /// <summary>Creates the table.</summary>
    /// <param name="heading">What it answers, in a few words.</param>
    /// <param name="table">Columns with units and meanings.</param>
    public ResultTable(string heading, Table table)
    {
        Heading = heading;
        this.table = table;
    }

    /// <inheritdoc/>
    public string Heading { get; }

    /// <inheritdoc/>
    public Table ToTable() => table;

    /// <inheritdoc/>
    public override string Describe() => Counted.Of(table.RowCount, "row");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        writer.Write(Heading);
        writer.Write(table);
    }
}
