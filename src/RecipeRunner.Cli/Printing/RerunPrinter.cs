using System.Globalization;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Signing;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints a rerun: one verdict on the first line, then the reasons.</summary>
internal sealed class RerunPrinter(Screen screen) : IRunObserver
{
    private const int WordWidth = 11;

    /// <inheritdoc/>
    public void Titled(string title) { }

    /// <inheritdoc/>
    public void Progressed(string word, double share) =>
        screen.Status(ProgressLine.Of(word.PadRight(WordWidth), share, null));

    /// <inheritdoc/>
    public void Finished(JournalEntry entry) { }

    /// <summary>The verdict and the reasons.</summary>
    /// <param name="report">The report.</param>
    /// <param name="study">The study as the person named it.</param>
    public void Print(RerunReport report, string study)
    {
        screen.Line(FirstLine(report, study));
        foreach (var problem in report.Problems)
        {
            screen.Line($"  {problem.Code}  {problem.Where}: {problem.What} {problem.Mend}".TrimEnd());
        }

        if (report.Verdict != Verdict.CannotRerun)
        {
            screen.Line($"  signed   {Words(report.Signer)}");
        }

        if (report.FirstStep is { } step)
        {
            screen.Line(Text($"  first    step {step.Number}, {step.Title} ({step.Line})"));
        }

        if (report.LargestWithin is { } within)
        {
            screen.Line($"  largest  {Words(within)}");
        }

        foreach (var worst in report.Worst)
        {
            screen.Line($"  worst    {Words(worst)}");
        }

        foreach (var file in report.DifferingFiles)
        {
            screen.Line($"  bytes    {file} differs");
        }

        if (report.DifferingFiles.Length > 0)
        {
            screen.Line(
                Text($"  same     {report.StepsAlike} steps, {report.Files.Same} of {report.Files.Compared} files")
            );
        }
    }

    private static string FirstLine(RerunReport report, string study) =>
        report.Verdict switch
        {
            Verdict.Identical => Text($"IDENTICAL      {study} reruns to the same {report.Files.Compared} files"),
            Verdict.SameValues => Text(
                $"SAME VALUES    {study} reruns to the same numbers within {RerunReport.Tolerance:0e-0} of each"
            ),
            Verdict.Differs => Text(
                $"DIFFERS        {study} does not rerun to what it holds; {report.BeyondCount} values differ"
            ),
            _ => $"CANNOT RERUN   {study}",
        };

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
