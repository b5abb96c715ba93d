using System.Text;
using RecipeRunner.Host.Signing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Sealing;

/// <summary>
/// Checks a study's seal byte by byte: a bag of RFC 8493 whose manifests are exactly those that sealing its files would write.
/// </summary>
internal static class SealCheck
{
    /// <summary>What is wrong with a study's seal, the first cause first; nothing where it is whole.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="cancellation">Stops the check.</param>
    public static IReadOnlyList<Finding> Of(string folder, CancellationToken cancellation)
    {
        var problems = Structure(folder).ToList();
        if (problems.Count > 0)
        {
            return problems;
        }

        problems.AddRange(Declaration(folder));
        problems.AddRange(Compared(folder, "tagmanifest-sha256.txt", [.. Bag.TagFiles], cancellation));
        problems.AddRange(Compared(folder, "manifest-sha256.txt", Bag.Payload(folder), cancellation));
        return problems.Count > 0 ? problems : Signature(folder, cancellation);
    }

    /// <summary>What is wrong with the words of <c>bag-info.txt</c>, which no manifest of the payload covers.</summary>
    /// <param name="folder">The study's folder.</param>
    /// <param name="title">The study's title.</param>
    /// <param name="tool">The tool that made it, with its version.</param>
    public static IReadOnlyList<Finding> OfInfo(string folder, string title, string tool) =>
        string.Equals(Text(folder, "bag-info.txt"), Bag.Info(folder, title, tool), StringComparison.Ordinal)
            ? []
            :
            [
                Finding.Error(
                    "RR0830",
                    new Place("bag-info.txt"),
                    "It does not say what a seal of this study says: the tool, the title, and the size of the payload."
                ),
            ];

    /// <summary>A signature is not needed, but one that lies there must be of this seal.</summary>
    private static IReadOnlyList<Finding> Signature(string folder, CancellationToken cancellation)
    {
        try
        {
            SealSignature.Check(folder, signers: null, cancellation);
            return [];
        }
        catch (RefusedException refused)
        {
            return refused.Problems;
        }
    }

    private static IEnumerable<Finding> Structure(string folder)
    {
        foreach (var link in Links(folder))
        {
            yield return Finding.Error(
                "RR0807",
                new Place(link),
                "This is a link; a study holds files and folders alone.",
                "Put the file itself in its place, or take the study from where it came again."
            );
        }

        string[] needed = [.. Bag.TagFiles, "tagmanifest-sha256.txt", "data/audit.json"];
        foreach (var missing in needed.Where(name => !File.Exists(Path.Combine(folder, name))))
        {
            yield return Finding.Error("RR0801", new Place(missing), "A study has this file; it is not there.");
        }

        var allowed = needed
            .Append(SealSignature.FileName)
            .Select(name => name.Split('/')[0])
            .ToHashSet(StringComparer.Ordinal);
        foreach (
            var strange in Directory
                .EnumerateFileSystemEntries(folder)
                .Select(entry => Path.GetFileName(entry))
                .Where(name => !allowed.Contains(name))
                .Order(StringComparer.Ordinal)
        )
        {
            yield return Finding.Error("RR0806", new Place(strange), "This is no part of the study.");
        }
    }

    private static IEnumerable<string> Links(string folder) =>
        Directory
            .EnumerateFileSystemEntries(
                folder,
                "*",
                new EnumerationOptions { RecurseSubdirectories = true, AttributesToSkip = FileAttributes.None }
            )
            .Where(entry => new FileInfo(entry).LinkTarget is not null)
            .Select(entry => Path.GetRelativePath(folder, entry))
            .Order(StringComparer.Ordinal);

    private static IEnumerable<Finding> Declaration(string folder)
    {
        if (!string.Equals(Text(folder, "bagit.txt"), Bag.Declaration, StringComparison.Ordinal))
        {
            yield return Finding.Error(
                "RR0802",
                new Place("bagit.txt"),
                "It does not say BagIt 1.0 with UTF-8 tag files."
            );
        }
    }

    /// <summary>A file's text, byte for byte: a byte order mark counts.</summary>
    private static string Text(string folder, string file) =>
        Encoding.UTF8.GetString(File.ReadAllBytes(Path.Combine(folder, file)));

    /// <summary>Compares a manifest with the one that the files would have now.</summary>
    private static IEnumerable<Finding> Compared(
        string folder,
        string manifest,
        string[] files,
        CancellationToken cancellation
    )
    {
        var (held, made) = (Text(folder, manifest), Bag.Manifest(folder, files, cancellation));
        if (string.Equals(held, made, StringComparison.Ordinal))
        {
            return [];
        }

        var (listed, found) = (Lines(held), Lines(made));
        var differing = found
            .Keys.Union(listed.Keys, StringComparer.Ordinal)
            .Order(StringComparer.Ordinal)
            .Select(path => Difference(manifest, path, listed.GetValueOrDefault(path), found.GetValueOrDefault(path)))
            .OfType<Finding>()
            .ToArray();
        return differing.Length > 0
            ? differing
            :
            [
                Finding.Error(
                    "RR0803",
                    new Place(manifest),
                    "Its lines are not written or ordered as a seal writes them."
                ),
            ];
    }

    private static Finding? Difference(string manifest, string path, string? listed, string? found) =>
        string.Equals(listed, found, StringComparison.Ordinal) ? null
        : found is null ? Finding.Error("RR0805", new Place(path), $"{manifest} lists it; it is not there.")
        : listed is null ? Finding.Error("RR0806", new Place(path), $"{manifest} does not list it.")
        : Finding.Error(
            "RR0804",
            new Place(path),
            $"Its bytes have changed since it was sealed: {manifest} holds {listed}, it has {found}."
        );

    private static Dictionary<string, string> Lines(string manifest)
    {
        var lines = new Dictionary<string, string>(StringComparer.Ordinal);
        foreach (var line in manifest.Split('\n').Where(line => line.Length > 0))
        {
            var gap = line.IndexOf("  ", StringComparison.Ordinal);
            lines[gap < 0 ? line : line[(gap + 2)..]] = gap < 0 ? "" : line[..gap];
        }

        return lines;
    }
}
