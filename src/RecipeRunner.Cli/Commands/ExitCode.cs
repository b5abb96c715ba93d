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

    /// <summary>Stopped by the person. Nothing was written.</summary>
    public const int Cancelled = 130;
}
