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
    public static void Seal(string folder, string title, CancellationToken cancellation)
    {
        Write(folder, "bagit.txt", Declaration);
        Write(folder, "bag-info.txt", Info(folder, title, $"Recipe Runner {ToolVersion.Text}"));
        Write(folder, "manifest-sha256.txt", Manifest(folder, Payload(folder), cancellation));
        Write(folder, "tagmanifest-sha256.txt", Manifest(folder, TagFiles, cancellation));
    }

    /// <summary>
    /// What <c>bag-info.txt</c> says, whole (RFC 8493, section 2.2.2). It has no Bagging-Date: the crate and <c>run.json</c> tell
    /// when the study was made.
    /// </summary>
    /// <param name="folder">The bag.</param>
    /// <param name="title">The study's title.</param>
    /// <param name="tool">The tool that made it, with its version.</param>
    public static string Info(string folder, string title, string tool)
    {
        var sizes = Payload(folder).Select(path => new FileInfo(Path.Combine(folder, path)).Length).ToArray();
        return FormattableString.Invariant(
            $"Bag-Software-Agent: {tool}\nExternal-Description: {Plain(title)}\nPayload-Oxum: {sizes.Sum()}.{sizes.Length}\n"
        );
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

    /// <summary>A label's value is one line, and readers may trim it.</summary>
    private static string Plain(string title) => title.ReplaceLineEndings(" ").Trim();

    private static void Write(string folder, string name, string text) =>
        File.WriteAllText(Path.Combine(folder, name), text, Utf8);
}
