using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Emitting;

/// <summary>Files that an emitting step wrote.</summary>
public sealed class EmittedFiles : Artifact
{
    private readonly int rows;

    internal EmittedFiles(ImmutableArray<string> paths, int rows, string rowWord)
    {
        Paths = paths;
        this.rows = rows;
        RowWord = rowWord;
    }

    /// <summary>The files, relative to the study's payload.</summary>
    public ImmutableArray<string> Paths { get; }

    private string RowWord { get; }

    /// <inheritdoc/>
    public override string Describe() => string.Create(CultureInfo.InvariantCulture, $"{rows:N0} {RowWord}");

    /// <inheritdoc/>
    protected override void WriteCanonical(CanonicalWriter writer)
    {
        foreach (var path in Paths)
        {
            writer.Write(path);
        }

        writer.Write(rows);
    }
}
