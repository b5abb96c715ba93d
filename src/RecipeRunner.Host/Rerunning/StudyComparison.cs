using RecipeRunner.Host.Sealing;

namespace RecipeRunner.Host.Rerunning;

/// <summary>Compares a study with its rerun: files by their bytes, steps by their digests, and where those differ, value by value.</summary>
internal static class StudyComparison
{
    /// <summary>The run's own clock and machine: outside every comparison.</summary>
    private const string Circumstances = "run.json";

    /// <summary>Files that name the version of the tool; where versions differ, these say nothing.</summary>
    private static readonly string[] NamingTheTool =
    [
        "audit.json",
        "audit.schema.json",
        "ro-crate-metadata.json",
        "summary.html",
    ];

    /// <summary>The report.</summary>
    public static RerunReport Of(HeldStudy held, HeldStudy made, IOutputReader reader)
    {
        var sameTool = string.Equals(held.Tool, made.Tool, StringComparison.Ordinal);
        var files = FilesOf(held)
            .Union(FilesOf(made), StringComparer.Ordinal)
            .Where(file => sameTool || !NamingTheTool.Contains(file, StringComparer.Ordinal))
            .Order(StringComparer.Ordinal)
            .ToArray();
        var differing = files.Where(file => !SameBytes(held, made, file)).ToArray();
        var values = new ValueComparison(reader);
        foreach (var file in differing.Where(IsResult))
        {
            values.Compare(file, held.Payload, made.Payload);
        }

        var first = FirstParting(held, made, sameTool);
        return new RerunReport
        {
            Verdict = VerdictOf(held, made, differing, values),
            Title = held.Title,
            MadeWith = held.Tool,
            FirstStep = first,
            StepsAlike = first is null ? held.Steps.Length : first.Number - 1,
            Files = (files.Length - differing.Length, files.Length),
            DifferingFiles = [.. differing],
            LargestWithin = values.LargestWithin,
            Worst = values.Worst,
            BeyondCount = values.BeyondCount,
        };
    }

    private static Verdict VerdictOf(HeldStudy held, HeldStudy made, string[] differing, ValueComparison values)
    {
        var told = differing.Where(file => !IsResult(file)).All(file => TellingFile.SaySame(held, made, file));
        return differing.Length == 0 ? Verdict.Identical
            : told && values.BeyondCount == 0 ? Verdict.SameValues
            : Verdict.Differs;
    }

    private static bool IsResult(string file) =>
        file.StartsWith("layers/", StringComparison.Ordinal) || file.StartsWith("tables/", StringComparison.Ordinal);

    private static IEnumerable<string> FilesOf(HeldStudy study) =>
        FileDigest
            .PathsBelow(study.Payload)
            .Where(file => !string.Equals(file, Circumstances, StringComparison.Ordinal));

    private static bool SameBytes(HeldStudy held, HeldStudy made, string file)
    {
        var (was, now) = (Path.Combine(held.Payload, file), Path.Combine(made.Payload, file));
        return File.Exists(was)
            && File.Exists(now)
            && (
                string.Equals(
                    FileDigest.Of(held.Payload, file).Sha256,
                    FileDigest.Of(made.Payload, file).Sha256,
                    StringComparison.Ordinal
                ) || TellingFile.SameButForDates(held, made, file)
            );
    }

    /// <summary>The first step of the study that the rerun did not repeat: in all that the audit says, or where versions differ, in what it gave.</summary>
    private static HeldStep? FirstParting(HeldStudy held, HeldStudy made, bool sameTool)
    {
        for (var i = 0; i < held.Steps.Length; i++)
        {
            var alike =
                i < made.Steps.Length
                && (
                    sameTool
                        ? string.Equals(held.Steps[i].Text, made.Steps[i].Text, StringComparison.Ordinal)
                        : string.Equals(held.Steps[i].Digest, made.Steps[i].Digest, StringComparison.Ordinal)
                );
            if (!alike)
            {
                return held.Steps[i];
            }
        }

        return made.Steps.Length > held.Steps.Length ? made.Steps[held.Steps.Length] : null;
    }
}
