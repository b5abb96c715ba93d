using System.Collections.Immutable;
using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Running;
using Spectre.Console;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Runs a recipe.</summary>
internal sealed class RunCommand(Screen screen) : Command<RunCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "<RECIPE>")]
        [Description("The recipe file, .csx.")]
        public required string Recipe { get; init; }

        [CommandOption("--data <DIR>")]
        [Description("The folder that the recipe's file names are relative to. Default: the recipe's own.")]
        public string? Data { get; init; }

        [CommandOption("--into <DIR>")]
        [Description("The study folder to leave. Default: the recipe's name with .study, in the current folder.")]
        public string? Into { get; init; }

        [CommandOption("--set <NAME=VALUE>")]
        [Description("Give one of the recipe's settings a value. May be repeated.")]
        public string[] Set { get; init; } = [];

        [CommandOption("--replace")]
        [Description("Put the new study in the place of one that lies there, once it is complete.")]
        public bool Replace { get; init; }

        [CommandOption("--inputs <HOW>")]
        [Description(
            "copied: the study holds its inputs (default). listed: large ones are named by digest and size alone."
        )]
        public string Inputs { get; init; } = "copied";

        [CommandOption("--listed-above <MB>")]
        [Description(
            "With --inputs listed: the size in megabytes above which inputs are listed; 0 lists all. Default: 100."
        )]
        public int? ListedAbove { get; init; }

        [CommandOption("--sign <KEY>")]
        [Description("Sign the study with this SSH key, by OpenSSH's ssh-keygen.")]
        public string? Sign { get; init; }

        [CommandOption("--quiet")]
        [Description("Print the study's path alone.")]
        public bool Quiet { get; init; }

        [CommandOption("--details")]
        [Description("Show stack traces with errors.")]
        public bool Details { get; init; }

        public override ValidationResult Validate()
        {
            if (Inputs is not ("copied" or "listed"))
            {
                return ValidationResult.Error($"--inputs {Inputs}: say copied or listed.");
            }

            if (ListedAbove is { } above && (above < 0 || Inputs is "copied"))
            {
                return ValidationResult.Error("--listed-above: give a size from 0 up, together with --inputs listed.");
            }

            var odd = Set.FirstOrDefault(text => text.IndexOf('=', StringComparison.Ordinal) < 1);
            if (odd is not null)
            {
                return ValidationResult.Error($"--set {odd}: give a name and a value, such as --set year=2023.");
            }

            var twin = Set.GroupBy(NameOf, StringComparer.Ordinal).FirstOrDefault(group => group.Skip(1).Any());
            return twin is null
                ? ValidationResult.Success()
                : ValidationResult.Error($"--set gives {twin.Key} more than once.");
        }

        public long? ListInputsAbove => Inputs is "listed" ? (ListedAbove ?? 100) * 1_000_000L : null;

        public ImmutableSortedDictionary<string, string> Settings =>
            Set.ToImmutableSortedDictionary(
                NameOf,
                text => text[(text.IndexOf('=', StringComparison.Ordinal) + 1)..],
                StringComparer.Ordinal
            );

        private static string NameOf(string text) => text[..text.IndexOf('=', StringComparison.Ordinal)];
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken)
    {
        var request = new RunRequest(
            settings.Recipe,
            settings.Data,
            settings.Into,
            settings.Settings,
            settings.Replace,
            settings.ListInputsAbove,
            settings.Sign
        );
        var printer = new RunPrinter(screen, settings.Quiet);
        return ErrorPrinter.Guard(
            screen,
            settings.Details,
            () =>
            {
                var outcome = RecipeRun.Execute(request, Kitchen.Language, printer, cancellationToken);
                printer.Ended(outcome);
            },
            printer.Interrupted
        );
    }
}
