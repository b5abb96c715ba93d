using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Steps.Peeking;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Shows what is in a data file.</summary>
internal sealed class PeekCommand(Screen screen) : Command<PeekCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<FILE>")]
        [Description("A shapefile, GeoJSON, CSV or GHCN-Daily file, plain or packed (.gz).")]
        public required string File { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken) =>
        ErrorPrinter.Guard(
            screen,
            details: false,
            () =>
            {
                foreach (var (name, text) in Peek.At(settings.File, cancellationToken))
                {
                    screen.Line($"  {name, -12} {text}");
                }
            },
            () => { }
        );
}
