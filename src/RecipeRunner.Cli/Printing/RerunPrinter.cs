using RecipeRunner.Host.Rerunning;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints a rerun: one verdict on the first line, then the reasons.</summary>
internal static class RerunPrinter
{
    /// <summary>The verdict and the reasons.</summary>
    /// <param name="screen">The terminal.</param>
    /// <param name="report">The report.</param>
    /// <param name="study">The study as the person named it.</param>
    public static void Print(Screen screen, RerunReport report, string study)
    {
        screen.Line($"{RerunWords.Verdict(report), -14} {RerunWords.Sentence(report, study)}");
        foreach (var (word, text) in RerunWords.Reasons(report))
        {
            screen.Line($"  {word, -8} {text}");
        }
    }
}
