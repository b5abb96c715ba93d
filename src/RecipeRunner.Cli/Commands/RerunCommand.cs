using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Rerunning;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Reruns a study from itself and says whether it holds.</summary>
internal sealed class RerunCommand(Screen screen) : Command<RerunCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<STUDY>")]
        [Description("The study's folder.")]
        public required string Study { get; init; }

        [CommandOption("--data <DIR>")]
        [Description("The folder that has all of the study's inputs, where the study lists some without holding them.")]
        public string? Data { get; init; }

        [CommandOption("--signers <FILE>")]
        [Description("A list of allowed signers, as ssh-keygen reads it; one of them must have signed the study.")]
        public string? Signers { get; init; }

        [CommandOption("--details")]
        [Description("Show stack traces with errors.")]
        public bool Details { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken)
    {
        var printer = new RerunPrinter(screen);
        var code = ExitCode.Failed;
        var guarded = ErrorPrinter.Guard(
            screen,
            settings.Details,
            () =>
            {
                var report = StudyRerun.Of(
                    new RerunRequest(settings.Study, settings.Data, settings.Signers),
                    Kitchen.Language,
                    new OutputReader(),
                    printer,
                    cancellationToken
                );
                printer.Print(report, settings.Study);
                code = ExitCode.Of(report.Verdict);
            },
            screen.ClearStatus
        );
        return guarded == ExitCode.Done ? code : guarded;
    }
}
