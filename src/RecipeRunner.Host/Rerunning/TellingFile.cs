using System.Text.RegularExpressions;
using RecipeRunner.Host.Sealing;

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

    /// <summary>True for two versions of the crate that differ in nothing but when the runs were.</summary>
    public static bool SameButForDates(HeldStudy held, HeldStudy made, string file) =>
        string.Equals(file, StudyWriter.CrateName, StringComparison.Ordinal)
        && string.Equals(
            Dateless(File.ReadAllText(Path.Combine(held.Payload, file))),
            Dateless(File.ReadAllText(Path.Combine(made.Payload, file))),
            StringComparison.Ordinal
        );

    private static string Masked(string text) => Dateless(Size().Replace(Digest().Replace(text, "#"), ""));

    private static string Dateless(string text) => Date().Replace(text, "\"${date}\": \"-\"");

    /// <summary>The dates of a run as the crate writes them; a date of any other form is no run's and is compared.</summary>
    [GeneratedRegex(
        "\"(?<date>datePublished|startTime|endTime)\": \"[0-9]{4}-[0-9]{2}-[0-9]{2}(T[0-9]{2}:[0-9]{2}:[0-9]{2}Z)?\"",
        RegexOptions.CultureInvariant | RegexOptions.ExplicitCapture,
        matchTimeoutMilliseconds: 10_000
    )]
    private static partial Regex Date();

    [GeneratedRegex("[0-9a-f]{64}", RegexOptions.CultureInvariant, matchTimeoutMilliseconds: 10_000)]
    private static partial Regex Digest();

    /// <summary>A size in bytes as the audit, the crate and the page write it; on the page it stands before a digest.</summary>
    [GeneratedRegex(
        "(\"bytes\":\\d+)|(\"contentSize\": \"\\d+\")|(<td class=\"n\">[\\d,]+</td><td>(?=#))",
        RegexOptions.CultureInvariant | RegexOptions.ExplicitCapture,
        matchTimeoutMilliseconds: 10_000
    )]
    private static partial Regex Size();
}
