using System.Globalization;
using RecipeRunner.Host.Rerunning;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints a rerun: one verdict on the first line, then the reasons.</summary>
internal sealed class RerunPrinter(Screen screen)
{
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
                $"DIFFERS        {study} does not rerun to what it holds; {report.BeyondCount} value{(report.BeyondCount == 1 ? " differs" : "s differ")}"
            ),
            _ => $"CANNOT RERUN   {study}",
        };

    private static string Words(ValueDifference value) =>
        Text(
            $"{value.File}, {value.Row}, {value.Column}: holds {value.Was ?? "nothing"}, reruns to {value.Is ?? "nothing"}"
        );

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
