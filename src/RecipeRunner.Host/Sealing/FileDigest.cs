using System.Security.Cryptography;
using RecipeRunner.Host.Running;

namespace RecipeRunner.Host.Sealing;

/// <summary>Digests files with SHA-256 (FIPS 180-4).</summary>
internal static class FileDigest
{
    /// <summary>What the seal says of a file below a folder.</summary>
    public static FileRecord Of(string folder, string path)
    {
        using var stream = File.OpenRead(Path.Combine(folder, path));
        return new FileRecord(path, stream.Length, Convert.ToHexStringLower(SHA256.HashData(stream)));
    }

    /// <summary>All files below a folder, in ordinal order of their paths.</summary>
    public static IEnumerable<string> PathsBelow(string folder) =>
        Directory
            .EnumerateFiles(folder, "*", SearchOption.AllDirectories)
            .Select(file => Path.GetRelativePath(folder, file).Replace('\\', '/'))
            .Order(StringComparer.Ordinal);
}
