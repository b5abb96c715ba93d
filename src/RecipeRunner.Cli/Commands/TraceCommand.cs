using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Tracing;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Shows how one areal value came about, so that it can be checked by hand.</summary>
internal sealed class TraceCommand(Screen screen) : Command<TraceCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<STUDY>")]
        [Description("The study's folder.")]
        public required string Study { get; init; }

        [CommandArgument(1, "<BASIN-OR-TABLE>")]
        [Description("The basin's id; or, with three words, a table's name.")]
        public required string Basin { get; init; }

        [CommandArgument(2, "<TIME-OR-ROW>")]
        [Description(
            "The step of time as the tables name it, such as 2024-01-14; or a row of the table: its line in the file, or its first cell."
        )]
        public required string Time { get; init; }

        [CommandArgument(3, "[COLUMN]")]
        [Description("A column of the table.")]
        public string? Column { get; init; }

        [CommandOption("--data <DIR>")]
        [Description("The folder that has all of the study's inputs, where the study lists some without holding them.")]
        public string? Data { get; init; }

        [CommandOption("--step <NUMBER>")]
        [Description("The step that gave the series, where the study has several. Default: the first.")]
        public int? Step { get; init; }

        [CommandOption("--csv")]
        [Description("Print the hand-check table as CSV.")]
        public bool Csv { get; init; }

        [CommandOption("--json")]
        [Description("Print all as JSON.")]
        public bool Json { get; init; }

        [CommandOption("--details")]
        [Description("Show stack traces with errors.")]
        public bool Details { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken)
    {
        var observer = new QuietObserver(screen);
        return ErrorPrinter.Guard(
            screen,
            settings.Details,
            () =>
            {
                using var replay = StudyReplay.Of(
                    new RerunRequest(settings.Study, settings.Data),
                    Kitchen.Language,
                    observer,
                    cancellationToken
                );
                var cell = settings.Column is { } column
                    ? new TableTrace(replay).Of(settings.Basin, settings.Time, column)
                    : null;
                var areal = cell is null ? (settings.Basin, settings.Time, settings.Step) : cell.Areal;
                if (areal is not { } value)
                {
                    TraceText.Of(cell!).ToList().ForEach(screen.Line);
                    return;
                }

                var trace = new StudyTrace(replay, cancellationToken).Of(value.Item1, value.Item2, value.Item3);
                foreach (var line in Lines(trace, settings))
                {
                    screen.Line(line);
                }
            },
            screen.ClearStatus
        );
    }

    private static IEnumerable<string> Lines(ValueTrace trace, Options settings) =>
        settings.Json ? [TraceDocument.Json(trace)]
        : settings.Csv ? TraceDocument.Csv(trace)
        : TraceText.Of(trace);
}
