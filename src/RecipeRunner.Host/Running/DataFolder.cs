using System.Collections.Immutable;
using System.IO.Enumeration;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Running;

/// <summary>The folder in which a recipe finds its data. Names in a recipe are relative to it and cannot leave it.</summary>
public sealed class DataFolder
{
    private readonly string path;

    private DataFolder(string path) => this.path = path;

    /// <summary>The folder's own full path.</summary>
    internal string Root => path;

    /// <summary>The data folder at a path.</summary>
    /// <exception cref="RefusedException">There is no such folder.</exception>
    public static DataFolder At(string path) =>
        Directory.Exists(path)
            ? new DataFolder(Path.GetFullPath(path))
            : throw new RefusedException(
                Finding.Error(
                    "RR0121",
                    new Place(path),
                    "There is no such data folder.",
                    "Name the folder that holds the recipe's data files with --data."
                )
            );

    /// <summary>True where the folder holds a plain file of this name.</summary>
    public bool Exists(string name) => IsWithin(name) && File.Exists(Path.Combine(path, name));

    /// <summary>The full path of a file.</summary>
    /// <param name="name">Relative, with forward slashes.</param>
    /// <exception cref="RefusedException">The name leaves the folder, or there is no such file.</exception>
    public string PathOf(string name)
    {
        RequireWithin(name);
        return Exists(name) ? Path.Combine(path, name) : throw Missing(name);
    }

    /// <summary>The files that a name means: the one of that name, or all that fit its last part where that holds * or ?.</summary>
    /// <param name="pattern">Relative, with forward slashes; * stands for any letters, ? for one. Case counts.</param>
    /// <returns>Names in ordinal order, at least one. Links, folders and hidden files (<c>.name</c>) do not fit a pattern.</returns>
    /// <exception cref="RefusedException">The name leaves the folder, or nothing fits.</exception>
    public ImmutableArray<string> Find(string pattern)
    {
        RequireWithin(pattern);
        var slash = pattern.LastIndexOf('/');
        var (folder, last) = (pattern[..(slash + 1)], pattern[(slash + 1)..]);
        if (folder.AsSpan().ContainsAny('*', '?'))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0123",
                    new Place(pattern),
                    "Only the last part of a name may hold * or ?.",
                    "Name the folder in full, such as rain/2024/*.csv."
                )
            );
        }

        if (!last.AsSpan().ContainsAny('*', '?'))
        {
            return [pattern];
        }

        var within = Path.Combine(path, folder);
        var names = Directory.Exists(within)
            ? Directory
                .EnumerateFiles(within)
                .Select(file => Path.GetFileName(file))
                .Where(name => name[0] != '.' && FileSystemName.MatchesSimpleExpression(last, name, ignoreCase: false))
                .Select(name => folder + name)
                .Where(Exists)
                .Order(StringComparer.Ordinal)
                .ToImmutableArray()
            : [];
        return names.IsEmpty ? throw Missing(pattern) : names;
    }

    private void RequireWithin(string name)
    {
        if (!IsWithin(name))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0122",
                    new Place(name),
                    "This name leads out of the data folder, or through a link.",
                    "Name files below the data folder, with forward slashes, such as rain/daily.csv; move the file there if it lies elsewhere."
                )
            );
        }
    }

    private bool IsWithin(string name)
    {
        var plain =
            name.Length > 0
            && !Path.IsPathRooted(name)
            && !name.Contains('\\', StringComparison.Ordinal)
            && !name.Contains('\0', StringComparison.Ordinal)
            && !name.Split('/').Any(part => part is "" or "." or "..");
        return plain && !PassesLink(name);
    }

    private bool PassesLink(string name)
    {
        var at = path;
        foreach (var part in name.Split('/'))
        {
            at = Path.Combine(at, part);
            if (new FileInfo(at).LinkTarget is not null)
            {
                return true;
            }
        }

        return false;
    }

    private RefusedException Missing(string name)
    {
        var files = Directory
            .EnumerateFiles(path, "*", SearchOption.AllDirectories)
            .Take(10_000)
            .Select(file => Path.GetRelativePath(path, file).Replace('\\', '/'))
            .Order(StringComparer.Ordinal)
            .ToArray();
        var mend = NearWords.Mend(name, files);
        var listed =
            files.Length == 0
                ? "It is empty."
                : $"It holds {string.Join(", ", files.Take(12))}{(files.Length > 12 ? ", …" : "")}.";
        return new RefusedException(
            Finding.Error(
                "RR0120",
                new Place(name),
                "There is no such file in the data folder.",
                $"{mend} {listed} Another folder is named with --data.".TrimStart()
            )
        );
    }
}
