using System.Text.RegularExpressions;

namespace RecipeRunner.Host.Rerunning;

/// <summary>
/// Files that tell of a study: audit, crate, page. Where the last bits of a result differ, so do its digest and perhaps its size, and
/// with them these files; apart from that they must say the same.
/// </summary>
internal static partial class TellingFile
{
    /// <summary>True where two versions of a file differ in nothing but digests and sizes of files.</summary>
    public static bool SaySame(HeldStudy held, HeldStudy made, string file)
    {
        var (was, now) = (Path.Combine(held.Payload, file), Path.Combine(made.Payload, file));
        return File.Exists(was)
            && File.Exists(now)
            && string.Equals(Masked(File.ReadAllText(was)), Masked(File.ReadAllText(now)), StringComparison.Ordinal);
    }

    private static string Masked(string text) => Size().Replace(Digest().Replace(text, "#"), "");

    [GeneratedRegex("[0-9a-f]{64}", RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 10_000)]
    private static partial Regex Digest();

    /// <summary>A size in bytes as the audit, the crate and the page write it; on the page it stands before a digest.</summary>
    [GeneratedRegex(
        "(\"bytes\": \\d+)|(\"contentSize\": \"\\d+\")|(<td class=\"n\">[\\d,]+</td><td>(?=#))",
        RegexOptions.CultureInvariant | RegexOptions.ExplicitCapture,
        matchTimeoutMilliseconds: 10_000
    )]
    private static partial Regex Size();
}
