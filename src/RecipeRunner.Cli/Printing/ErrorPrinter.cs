using System.Collections.Immutable;
using RecipeRunner.Cli.Commands;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Model.Steps;
using Spectre.Console;

namespace RecipeRunner.Cli.Printing;

/// <summary>Prints what went wrong, with the recipe line, and says that nothing was written.</summary>
internal static class ErrorPrinter
{
    /// <summary>Does some work and turns what is refused into printed errors and an exit code.</summary>
    public static int Guard(Screen screen, bool details, Action work, Action interrupted)
    {
        try
        {
            work();
            return ExitCode.Done;
        }
        catch (RecipeException refused)
        {
            interrupted();
            Print(screen, refused.Problems);
            return Close(screen, details, refused);
        }
        catch (RefusedException refused)
        {
            interrupted();
            Print(screen, [.. refused.Problems.Select(problem => new RecipeProblem(problem, null, "", 0))]);
            return Close(screen, details, refused);
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException)
        {
            interrupted();
            return CloseOnDisk(screen, details, failure);
        }
        catch (Exception failure) when (failure is not OperationCanceledException)
        {
            interrupted();
            screen.Error(
                $"error RR0000: this is a fault of the tool: {failure.Message} ({failure.GetType().Name})",
                Color.Red
            );
            screen.Error("   Please report it with what --details shows.");
            return Close(screen, details, failure);
        }
    }

    private static int CloseOnDisk(Screen screen, bool details, Exception failure)
    {
        screen.Error($"error RR0704: {failure.Message}", Color.Red);
        screen.Error("   Check that the folders can be read and written, and that the disk has room.");
        return Close(screen, details, failure);
    }

    private static int Close(Screen screen, bool details, Exception failure)
    {
        screen.Error("nothing was written");
        if (details)
        {
            screen.Error(failure.ToString());
        }

        return ExitCode.Failed;
    }

    private static void Print(Screen screen, ImmutableArray<RecipeProblem> problems)
    {
        RecipeLine? shown = null;
        for (var i = 0; i < problems.Length; i++)
        {
            var problem = problems[i];
            PrintWhat(screen, problem);
            if (problem.Line != shown)
            {
                PrintSource(screen, problem);
            }

            shown = problem.Line;
            var mend = problem.Problem.Mend;
            var saidNext =
                i + 1 < problems.Length && string.Equals(problems[i + 1].Problem.Mend, mend, StringComparison.Ordinal);
            if (mend.Length > 0 && !saidNext)
            {
                screen.Error($"   {mend}");
            }
        }
    }

    private static void PrintWhat(Screen screen, RecipeProblem problem)
    {
        var line = problem.Line is { } at ? FormattableString.Invariant($"{at.File}({at.Line},{at.Column}): ") : "";
        var where = problem.Problem.Where.ToString();
        var place = where.Length > 0 ? where + ": " : "";
        screen.Error($"{line}error {problem.Problem.Code}: {place}{problem.Problem.What}", Color.Red);
    }

    private static void PrintSource(Screen screen, RecipeProblem problem)
    {
        if (problem.Line is not { } line || problem.Source.Length == 0)
        {
            return;
        }

        var number = FormattableString.Invariant($"{line.Line}").PadLeft(4);
        var source = problem.Source.Replace('\t', ' ');
        screen.Error($"{number} | {source}");
        if (line.Column > 0)
        {
            var length = Math.Clamp(problem.Length, 1, Math.Max(1, source.Length - line.Column + 1));
            screen.Error($"     | {new string(' ', line.Column - 1)}{new string('^', length)}");
        }
    }
}
