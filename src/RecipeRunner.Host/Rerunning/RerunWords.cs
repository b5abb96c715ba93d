using System.Globalization;
using RecipeRunner.Host.Signing;

namespace RecipeRunner.Host.Rerunning;

/// <summary>A rerun in words: the verdict first, then a line a reason.</summary>
public static class RerunWords
{
    /// <summary>The verdict, in capitals.</summary>
    public static string Verdict(RerunReport report) =>
        report.Verdict switch
        {
            Rerunning.Verdict.Identical => "IDENTICAL",
            Rerunning.Verdict.SameValues => "SAME VALUES",
            Rerunning.Verdict.Differs => "DIFFERS",
            _ => "CANNOT RERUN",
        };

    /// <summary>What the verdict says of a study.</summary>
    /// <param name="report">The report.</param>
    /// <param name="study">The study as the person named it.</param>
    public static string Sentence(RerunReport report, string study) =>
        report.Verdict switch
        {
            Rerunning.Verdict.Identical => Text($"{study} reruns to the same {report.Files.Compared} files"),
            Rerunning.Verdict.SameValues => Text(
                $"{study} reruns to the same numbers within {RerunReport.Tolerance:0e-0} of each"
            ),
            Rerunning.Verdict.Differs => Text(
                $"{study} does not rerun to what it holds; {report.BeyondCount} value{(report.BeyondCount == 1 ? " differs" : "s differ")}"
            ),
            _ => study,
        };

    /// <summary>The reasons: what each is about, and what there is to say.</summary>
    public static IEnumerable<(string Word, string Text)> Reasons(RerunReport report)
    {
        foreach (var problem in report.Problems)
        {
            yield return (problem.Code, $"{problem.Where}: {problem.What} {problem.Mend}".TrimEnd());
        }

        if (report.Verdict != Rerunning.Verdict.CannotRerun)
        {
            yield return ("signed", Words(report.Signer));
        }

        if (report.FirstStep is { } step)
        {
            yield return ("first", Text($"step {step.Number}, {step.Title} ({step.Line})"));
        }

        if (report.LargestWithin is { } within)
        {
            yield return ("largest", Words(within));
        }

        foreach (var worst in report.Worst)
        {
            yield return ("worst", Words(worst));
        }

        foreach (var file in report.DifferingFiles)
        {
            yield return ("bytes", $"{file} differs");
        }

        if (report.DifferingFiles.Length > 0)
        {
            yield return (
                "same",
                Text($"{report.StepsAlike} steps, {report.Files.Same} of {report.Files.Compared} files")
            );
        }
    }

    private static string Words(Signer? signer) =>
        signer is null ? "not signed"
        : signer.Identity is null ? $"by {signer.KeyType} {signer.Fingerprint}; whose key that is was not checked"
        : $"by {signer.Identity}, {signer.KeyType} {signer.Fingerprint}";

    private static string Words(ValueDifference value) =>
        Text(
            $"{value.File}, {value.Row}, {value.Column}: holds {value.Was ?? "nothing"}, reruns to {value.Is ?? "nothing"}"
        );

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
