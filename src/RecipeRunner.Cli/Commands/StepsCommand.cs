using System.ComponentModel;
using RecipeRunner.Cli.Printing;
using RecipeRunner.Host.Catalogue;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;
using Spectre.Console.Cli;

namespace RecipeRunner.Cli.Commands;

/// <summary>Lists what a recipe can say.</summary>
internal sealed class StepsCommand(Screen screen) : Command<StepsCommand.Options>
{
    /// <summary>What a person may say with the command.</summary>
    public sealed class Options : CommandSettings
    {
        [CommandArgument(0, "[NAME]")]
        [Description("A verb, such as MeanRain. Without it, all are listed.")]
        public string? Name { get; init; }
    }

    public override int Execute(CommandContext context, Options settings, CancellationToken cancellationToken)
    {
        var catalogue = VerbCatalogue.Of(Kitchen.Language);
        return ErrorPrinter.Guard(
            screen,
            details: false,
            () =>
            {
                if (settings.Name is null)
                {
                    PrintAll(catalogue);
                }
                else
                {
                    PrintOne(catalogue, settings.Name);
                }
            },
            () => { }
        );
    }

    private void PrintAll(VerbCatalogue catalogue)
    {
        foreach (var room in catalogue.Verbs.GroupBy(verb => verb.Room, StringComparer.Ordinal))
        {
            screen.Line(room.Key);
            foreach (var verb in room.DistinctBy(verb => verb.Name, StringComparer.Ordinal))
            {
                screen.Line($"  {verb.Name, -14} {FirstSentence(verb.Summary)}");
            }

            screen.Line();
        }

        screen.Line("recipe-runner steps NAME shows one with what it takes and an example.");
    }

    private void PrintOne(VerbCatalogue catalogue, string name)
    {
        var verbs = catalogue
            .Verbs.Where(verb => string.Equals(verb.Name, name, StringComparison.OrdinalIgnoreCase))
            .ToArray();
        if (verbs.Length == 0)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0130",
                    Place.Of(name),
                    "There is no verb of this name.",
                    $"{NearWords.Mend(name, catalogue.Verbs.Select(verb => verb.Name))} `recipe-runner steps` lists them.".TrimStart()
                )
            );
        }

        foreach (var verb in verbs)
        {
            PrintVerb(verb);
        }
    }

    private void PrintVerb(VerbEntry verb)
    {
        screen.Line(verb.Signature);
        screen.Line();
        screen.Line($"  {verb.Summary}");
        screen.Line();
        foreach (var parameter in verb.Parameters)
        {
            screen.Line($"  {parameter.Name, -12} {parameter.Meaning}");
            if (!parameter.Choices.IsEmpty)
            {
                screen.Line($"  {"", -12} {string.Join(", ", parameter.Choices)}");
            }
        }

        if (verb.Source.Length > 0)
        {
            screen.Line($"  {"source", -12} {verb.Source}");
        }

        if (verb.Example.Length > 0)
        {
            screen.Line();
            screen.Line($"  {verb.Example}");
        }

        screen.Line();
    }

    private static string FirstSentence(string text)
    {
        var end = text.IndexOf(". ", StringComparison.Ordinal);
        return end < 0 ? text : text[..(end + 1)];
    }
}
