using System.Diagnostics;
using System.Globalization;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Summarising;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints how a run goes: the title, a line a step, and at the end what a person wants to know.</summary>
internal sealed class RunPrinter(Screen screen, bool quiet) : IRunObserver
{
    private const int WordWidth = 11;
    private const int FileWidth = 15;
    private readonly Stopwatch sinceStep = Stopwatch.StartNew();
    private readonly Stopwatch sinceShown = Stopwatch.StartNew();

    public void Titled(string title)
    {
        if (!quiet)
        {
            screen.Line(title);
        }
    }

    public void Progressed(string word, double share)
    {
        if (quiet || sinceStep.ElapsedMilliseconds < 500 || sinceShown.ElapsedMilliseconds < 100)
        {
            return;
        }

        sinceShown.Restart();
        var left = share > 0.02 ? sinceStep.Elapsed.TotalSeconds * (1 - share) / share : (double?)null;
        screen.Status(ProgressLine.Of(word.PadRight(WordWidth), share, left));
    }

    public void Finished(JournalEntry entry)
    {
        sinceStep.Restart();
        if (quiet)
        {
            return;
        }

        var file = entry.FilesRead.FirstOrDefault() ?? entry.FilesWritten.FirstOrDefault() ?? "";
        var named = file.Length == 0 ? "" : Path.GetFileName(file).PadRight(FileWidth - 1) + " ";
        screen.Line($"  {entry.Word.PadRight(WordWidth)}{named}{entry.Output.Describe()}");
        foreach (var (name, value) in entry.Statements)
        {
            screen.Line($"  {"", -WordWidth}{name}: {value}");
        }
    }

    /// <summary>The run failed or was stopped: takes a passing line away.</summary>
    public void Interrupted() => screen.ClearStatus();

    /// <summary>The run is done.</summary>
    public void Ended(RunOutcome outcome)
    {
        if (quiet)
        {
            screen.Line(outcome.StudyFolder);
            return;
        }

        screen.Line();
        PrintFindings(outcome.Record);
        foreach (var (name, text) in StudyFacts.Of(outcome.Record))
        {
            screen.Line($"{name, -11}{text}");
        }

        var seconds = outcome.Elapsed.TotalSeconds.ToString("0.0", CultureInfo.InvariantCulture);
        screen.Line(
            string.Create(
                CultureInfo.InvariantCulture,
                $"study      {outcome.StudyFolder} ({outcome.FileCount} files, sealed), {seconds} s"
            )
        );
        screen.Line($"look       {Path.Combine(outcome.StudyFolder, "data", "summary.html")}");
    }

    private void PrintFindings(StudyRecord record)
    {
        var findings = record.Findings;
        if (findings.IsEmpty)
        {
            screen.Line("no findings");
            screen.Line();
            return;
        }

        var counts = findings.GroupBy(finding => finding.Severity).OrderByDescending(group => group.Key);
        screen.Line(
            string.Join(
                ", ",
                counts.Select(group =>
                    string.Create(
                        CultureInfo.InvariantCulture,
                        $"{group.Count()} {SeverityWord.Of(group.Key)}{(group.Count() == 1 ? "" : "s")}"
                    )
                )
            )
        );
        foreach (var finding in findings)
        {
            FindingPrinter.Print(screen, finding);
        }

        screen.Line();
    }
}
