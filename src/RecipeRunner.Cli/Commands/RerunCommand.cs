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

        [CommandOption("--report <FILE>")]
        [Description("Write the findings as one page for people to attach. The file may not exist yet.")]
        public string? Report { get; init; }

        [CommandOption("--json")]
        [Description("Print the findings as JSON.")]
        public bool Json { get; init; }

        [CommandOption("--details")]
        [Description("Show stack traces with errors.")]
        public bool Details { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken)
    {
        var code = ExitCode.Failed;
        var guarded = ErrorPrinter.Guard(
            screen,
            settings.Details,
            () =>
            {
                NewFile.Require(settings.Report);
                var report = StudyRerun.Of(
                    new RerunRequest(settings.Study, settings.Data, settings.Signers),
                    Kitchen.Language,
                    new OutputReader(),
                    new QuietObserver(screen),
                    cancellationToken
                );
                Print(report, settings);
                NewFile.Write(settings.Report, () => RerunDocument.Page(report, settings.Study));
                code = ExitCode.Of(report.Verdict);
            },
            screen.ClearStatus
        );
        return guarded == ExitCode.Done ? code : guarded;
    }

    private void Print(RerunReport report, Options settings)
    {
        if (settings.Json)
        {
            screen.Line(RerunDocument.Json(report, settings.Study));
        }
        else
        {
            RerunPrinter.Print(screen, report, settings.Study);
        }
    }
}
