using System.Collections.Immutable;
using System.IO.Enumeration;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Running;

/// <summary>The sources that a recipe states, and which input files each speaks of.</summary>
internal sealed class StatedSources
{
    private readonly List<(string File, string Text, string? Licence)> stated = [];

    /// <summary>Takes a statement in.</summary>
    /// <exception cref="RefusedException">It says nothing.</exception>
    public void Add(string file, string text, string? licence)
    {
        if (string.IsNullOrWhiteSpace(text) || licence is { } words && string.IsNullOrWhiteSpace(words))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0114",
                    new Place(file),
                    "A source is stated without words.",
                    "Say who made the data and where they were had; leave the licence out where it is unknown."
                )
            );
        }

        stated.Add((file, text, licence));
    }

    /// <summary>The sources with the files that each speaks of.</summary>
    /// <param name="inputs">The files that the run read.</param>
    /// <exception cref="RefusedException">A source speaks of no file that the run read.</exception>
    public ImmutableArray<DataSource> Of(ImmutableArray<FileRecord> inputs)
    {
        var sources = stated.ConvertAll(source => new DataSource(
            source.File,
            source.Text,
            source.Licence,
            [.. inputs.Where(input => Fits(source.File, input.Name)).Select(input => input.Path)]
        ));
        var idle = sources.Where(source => source.Inputs.IsEmpty).ToArray();
        return idle.Length == 0
            ? [.. sources]
            : throw new RefusedException([.. idle.Select(source => NeverRead(source.File, inputs))]);
    }

    private static bool Fits(string pattern, string name)
    {
        var (patternFolder, nameFolder) = (pattern.LastIndexOf('/') + 1, name.LastIndexOf('/') + 1);
        return MemoryExtensions.Equals(
                pattern.AsSpan(0, patternFolder),
                name.AsSpan(0, nameFolder),
                StringComparison.Ordinal
            )
            && FileSystemName.MatchesSimpleExpression(
                pattern.AsSpan(patternFolder),
                name.AsSpan(nameFolder),
                ignoreCase: false
            );
    }

    private static Finding NeverRead(string file, ImmutableArray<FileRecord> inputs)
    {
        var names = inputs.Select(input => input.Name).ToArray();
        var read = names.Length == 0 ? "The recipe reads no file." : $"It reads {string.Join(", ", names)}.";
        return Finding.Error(
            "RR0115",
            new Place(file),
            "The recipe states the source of a file that it never reads.",
            $"{NearWords.Mend(file, names)} {read}".Trim()
        );
    }
}
