using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Running;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Compiles a recipe without running it.</summary>
internal sealed class CheckCommand(Screen screen) : Command<CheckCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<RECIPE>")]
        [Description("The recipe file, .csx.")]
        public required string Recipe { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken) =>
        ErrorPrinter.Guard(
            screen,
            details: false,
            () =>
            {
                RecipeRun.Check(settings.Recipe, Kitchen.Language, cancellationToken);
                screen.Line($"{settings.Recipe} compiles; it was not run");
            },
            () => { }
        );
}
