using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Sealing;

/// <summary>The files that steps write into a study.</summary>
internal sealed class OutputFiles(string payload)
{
    private readonly SortedSet<string> paths = new(StringComparer.Ordinal);

    public Stream Create(string path)
    {
        if (!IsPlain(path))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0601",
                    new Place(path),
                    "A study's files are named layers/… or tables/…, with letters, digits, hyphens, underscores and dots.",
                    "Give the layer or table a plain name, such as \"thiessen-cells\"."
                )
            );
        }

        if (paths.Any(known => string.Equals(known, path, StringComparison.OrdinalIgnoreCase)))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0602",
                    new Place(path),
                    "The study holds a file of this name already.",
                    "Give each layer and table of a study a name of its own; names that differ only by case count as one."
                )
            );
        }

        var full = Path.Combine(payload, path);
        Directory.CreateDirectory(Path.GetDirectoryName(full)!);
        paths.Add(path);
        return new FileStream(full, FileMode.CreateNew, FileAccess.ReadWrite, FileShare.None, 1 << 16);
    }

    public ImmutableArray<FileRecord> Records() => [.. paths.Select(path => FileDigest.Of(payload, path))];

    private static bool IsPlain(string path)
    {
        var parts = path.Split('/');
        return parts is ["layers" or "tables", _]
            && parts[1].Length is > 0 and <= 100
            && parts[1][0] != '.'
            && parts[1].All(letter => char.IsAsciiLetterOrDigit(letter) || letter is '-' or '_' or '.');
    }
}
