using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Sealing;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>The commands, each with an example.</summary>
internal static class CommandList
{
    public static void Describe(IConfigurator config, Screen screen)
    {
        config.SetApplicationName("recipe-runner");
        config.SetApplicationVersion(ToolVersion.Text);
        config.PropagateExceptions();
        config.UseStrictParsing();
        config.Settings.Registrar.RegisterInstance(screen);
        config
            .AddCommand<RunCommand>("run")
            .WithDescription(
                "Run a recipe over data and leave a sealed study. Exit code 0 done, 1 failed, 2 wrong usage, 130 cancelled."
            )
            .WithExample("run", "recipes/monthly-totals.csx", "--data", "data-demo");
        config
            .AddCommand<CheckCommand>("check")
            .WithDescription("Compile a recipe without running it, and report every problem.")
            .WithExample("check", "recipes/monthly-totals.csx");
        config
            .AddCommand<RerunCommand>("rerun")
            .WithDescription(
                "Check a study's seal, run its recipe again on its own data, and compare. Exit code 0 identical, 4 same values, 5 differs, 6 cannot rerun."
            )
            .WithExample("rerun", "monthly-totals.study");
        config
            .AddCommand<TraceCommand>("trace")
            .WithDescription(
                "Show how one areal value came about: gauges, weights, products, then the steps and the lines of the input files behind it."
            )
            .WithExample("trace", "monthly-totals.study", "B-2", "2024-01-14");
        config
            .AddCommand<CompareCommand>("compare")
            .WithDescription(
                "Say what changed from one study to another: inputs, settings, recipe, gauges, basins, weights, and why areal values did."
            )
            .WithExample("compare", "before.study", "after.study", "--table", "changes.csv");
        config
            .AddCommand<StepsCommand>("steps")
            .WithDescription("List what a recipe can say, or show one verb or step with an example.")
            .WithExample("steps", "MeanRain");
        config
            .AddCommand<PeekCommand>("peek")
            .WithDescription(
                "Show what is in a data file: columns, reference system, extent, time span, gaps, suspicious values."
            )
            .WithExample("peek", "data-demo/daily.csv");
    }
}
