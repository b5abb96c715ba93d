using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace RecipeRunner.Host.Scripting;

/// <summary>
/// Resolves <c>#load</c> within the recipe's folder and remembers what was loaded. Paths are relative to the file that
/// loads; rooted paths, paths that climb out of the folder, and links are not found.
/// </summary>
internal sealed class LoadedTexts(string folder) : SourceReferenceResolver
{
    private readonly SortedDictionary<string, string> loaded = new(StringComparer.Ordinal);

    /// <summary>The loaded files: name relative to the recipe's folder with forward slashes, and text.</summary>
    public ImmutableArray<(string Name, string Text)> All => [.. loaded.Select(pair => (pair.Key, pair.Value))];

    public override string? NormalizePath(string path, string? baseFilePath) => ResolveReference(path, baseFilePath);

    /// <summary>The name relative to the recipe's folder; null where there is no such file within it.</summary>
    public override string? ResolveReference(string path, string? baseFilePath)
    {
        if (Path.IsPathRooted(path) || path.Contains('\\', StringComparison.Ordinal))
        {
            return null;
        }

        var from = Path.GetDirectoryName(baseFilePath ?? "") ?? "";
        var full = Path.GetFullPath(Path.Combine(folder, from, path));
        var name = Path.GetRelativePath(folder, full);
        return name.StartsWith("..", StringComparison.Ordinal) || !IsPlainFile(full) ? null : name.Replace('\\', '/');
    }

    public override Stream OpenRead(string resolvedPath)
    {
        var bytes = File.ReadAllBytes(Path.Combine(folder, resolvedPath));
        loaded[resolvedPath] = System.Text.Encoding.UTF8.GetString(bytes);
        return new MemoryStream(bytes, writable: false);
    }

    public override bool Equals(object? other) => ReferenceEquals(this, other);

    public override int GetHashCode() => System.Runtime.CompilerServices.RuntimeHelpers.GetHashCode(this);

    private bool IsPlainFile(string full)
    {
        for (var path = full; path.Length > folder.Length; path = Path.GetDirectoryName(path)!)
        {
            if (new FileInfo(path).LinkTarget is not null)
            {
                return false;
            }
        }

        return File.Exists(full);
    }
}
