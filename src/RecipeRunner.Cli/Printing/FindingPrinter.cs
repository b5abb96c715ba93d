using RecipeRunner.Host.Summarising;
using RecipeRunner.Model.Steps;
using Spectre.Console;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints a finding: severity, where, what, and what to do.</summary>
internal static class FindingPrinter
{
    public static void Print(Screen screen, Finding finding)
    {
        var colour = finding.Severity == Severity.Notice ? Color.Default : Color.Yellow;
        var where = finding.Where.ToString();
        screen.Line(
            $"  {SeverityWord.Of(finding.Severity), -8} ",
            colour,
            $"{finding.Code} {(where.Length > 0 ? where + ": " : "")}{finding.What}"
        );
        if (finding.Mend.Length > 0)
        {
            screen.Line($"           {finding.Mend}");
        }
    }
}
