using System.Collections.Immutable;
using Microsoft.CodeAnalysis;

namespace RecipeRunner.Host.Scripting;

/// <summary>A file that a recipe loads.</summary>
/// <param name="Name">Relative to the recipe's folder, with forward slashes.</param>
/// <param name="Bytes">The file, byte for byte.</param>
/// <param name="Text">Its text.</param>
public sealed record LoadedText(string Name, ImmutableArray<byte> Bytes, string Text);

/// <summary>
/// Resolves <c>#load</c> within the recipe's folder and remembers what was loaded. Paths are relative to the file that
/// loads; rooted paths, paths that climb out of the folder, and links are not found.
/// </summary>
internal sealed class LoadedTexts(string folder) : SourceReferenceResolver
{
    private readonly SortedDictionary<string, LoadedText> loaded = new(StringComparer.Ordinal);

    /// <summary>The loaded files, in ordinal order of their names.</summary>
    public ImmutableArray<LoadedText> All => [.. loaded.Values];

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
        loaded[resolvedPath] = new LoadedText(resolvedPath, [.. bytes], RecipeText.Decode(bytes, resolvedPath));
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
