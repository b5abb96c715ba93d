using RecipeRunner.Host.Rerunning;

namespace RecipeRunner.Cli.Commands;

/// <summary>What the process returns.</summary>
internal static class ExitCode
{
    /// <summary>Done.</summary>
    public const int Done = 0;

    /// <summary>Failed: the recipe or its data were refused. Nothing was written.</summary>
    public const int Failed = 1;

    /// <summary>The command was not understood.</summary>
    public const int WrongUsage = 2;

    /// <summary>A rerun gave the same numbers within the tolerance, though not the same bytes.</summary>
    public const int SameValues = 4;

    /// <summary>A rerun gave something else.</summary>
    public const int Differs = 5;

    /// <summary>A study could not be rerun.</summary>
    public const int CannotRerun = 6;

    /// <summary>Stopped by the person. Nothing was written.</summary>
    public const int Cancelled = 130;

    /// <summary>What a verdict returns.</summary>
    public static int Of(Verdict verdict) =>
        verdict switch
        {
            Verdict.Identical => Done,
            Verdict.SameValues => SameValues,
            Verdict.Differs => Differs,
            _ => CannotRerun,
        };
}
