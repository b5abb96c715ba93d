using System.Collections.Immutable;
using System.Text;

namespace RecipeRunner.Host.Sealing;

/// <summary>Seals a folder as a bag: BagIt 1.0 (RFC 8493), payload in <c>data</c>, SHA-256 manifests.</summary>
internal static class Bag
{
    /// <summary>What <c>bagit.txt</c> says, whole.</summary>
    public const string Declaration = "BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n";

    /// <summary>The tag files that the tag manifest lists, in its order.</summary>
    public static readonly ImmutableArray<string> TagFiles = ["bag-info.txt", "bagit.txt", "manifest-sha256.txt"];

    private static readonly UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false);

    /// <summary>Writes the bag's own files around the payload that is there.</summary>
    /// <returns>The number of files in the bag.</returns>
    public static int Seal(string folder, string title, CancellationToken cancellation)
    {
        Write(folder, "bagit.txt", Declaration);
        Write(
            folder,
            "bag-info.txt",
            $"External-Description: {Plain(title)}\nBag-Software-Agent: Recipe Runner {ToolVersion.Text}\n"
        );
        var payload = Payload(folder);
        Write(folder, "manifest-sha256.txt", Manifest(folder, payload, cancellation));
        Write(folder, "tagmanifest-sha256.txt", Manifest(folder, TagFiles, cancellation));
        return payload.Length + TagFiles.Length + 1;
    }

    /// <summary>The payload files of a bag, in ordinal order.</summary>
    public static string[] Payload(string folder) =>
        [.. FileDigest.PathsBelow(Path.Combine(folder, "data")).Select(path => "data/" + path)];

    /// <summary>The lines of a manifest of files, as the seal writes them.</summary>
    public static string Manifest(string folder, IEnumerable<string> paths, CancellationToken cancellation)
    {
        var lines = new StringBuilder();
        foreach (var path in paths)
        {
            cancellation.ThrowIfCancellationRequested();
            lines.Append(FileDigest.Of(folder, path).Sha256).Append("  ").Append(Encoded(path)).Append('\n');
        }

        return lines.ToString();
    }

    /// <summary>RFC 8493, section 2.1.3: line ends and the percent sign in paths are percent-encoded.</summary>
    private static string Encoded(string path) =>
        path.Replace("%", "%25", StringComparison.Ordinal)
            .Replace("\r", "%0D", StringComparison.Ordinal)
            .Replace("\n", "%0A", StringComparison.Ordinal);

    private static string Plain(string title) => title.ReplaceLineEndings(" ");

    private static void Write(string folder, string name, string text) =>
        File.WriteAllText(Path.Combine(folder, name), text, Utf8);
}
