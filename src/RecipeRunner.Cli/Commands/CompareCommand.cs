using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Comparing;
using RecipeRunner.Host.Rerunning;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Says what changed from one study to another, and why areal values did.</summary>
internal sealed class CompareCommand(Screen screen) : Command<CompareCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<FIRST>")]
        [Description("The first study's folder.")]
        public required string First { get; init; }

        [CommandArgument(1, "<SECOND>")]
        [Description("The second study's folder.")]
        public required string Second { get; init; }

        [CommandOption("--table <FILE>")]
        [Description(
            "Write every changed areal value as CSV, with the parts of its change. The file may not exist yet."
        )]
        public string? Table { get; init; }

        [CommandOption("--page <FILE>")]
        [Description("Write all that changed as one page for people. The file may not exist yet.")]
        public string? Page { get; init; }

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
                NewFile.Require(settings.Table, settings.Page);
                using var was = StudyReplay.Of(
                    new RerunRequest(settings.First),
                    Kitchen.Language,
                    observer,
                    cancellationToken
                );
                using var now = StudyReplay.Of(
                    new RerunRequest(settings.Second),
                    Kitchen.Language,
                    observer,
                    cancellationToken
                );
                var difference = TwoStudies.Compare(was, now);
                foreach (var line in DifferenceText.Of(difference, settings.First, settings.Second))
                {
                    screen.Line(line);
                }

                NewFile.Write(
                    settings.Table,
                    () => string.Concat(DifferenceTable.Csv(difference).Select(line => line + "\n"))
                );
                NewFile.Write(settings.Page, () => DifferencePage.Of(difference, settings.First, settings.Second));
            },
            screen.ClearStatus
        );
    }
}
