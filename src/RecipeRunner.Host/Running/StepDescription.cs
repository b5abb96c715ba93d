using System.Collections;
using System.Collections.Immutable;
using System.Globalization;
using System.Reflection;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>Reads from a step itself what the journal says of it: its names, its inputs, its settings.</summary>
internal sealed class StepDescription
{
    private readonly object step;

    public StepDescription(object step)
    {
        this.step = step;
        var type = step.GetType();
        Attribute = type.GetCustomAttribute<StepAttribute>() ?? new StepAttribute(type.Name);
        var members = type.GetProperties(BindingFlags.Public | BindingFlags.Instance)
            .Where(property => property.GetIndexParameters().Length == 0)
            .OrderBy(property => property.MetadataToken)
            .Select(property => (property.Name, Value: property.GetValue(step)))
            .ToArray();
        Inputs =
        [
            .. members.SelectMany(member => ArtifactsIn(member.Value).Select(artifact => (member.Name, artifact))),
        ];
        Settings =
        [
            .. members
                .Where(member => member.Value is not null && !ArtifactsIn(member.Value).Any())
                .Select(member => (member.Name, TextOf(member.Value!))),
        ];
    }

    public StepAttribute Attribute { get; }

    public ImmutableArray<(string Name, Artifact Artifact)> Inputs { get; }

    public ImmutableArray<(string Name, string Text)> Settings { get; }

    public string TypeName => step.GetType().FullName!;

    public string Library
    {
        get
        {
            var name = step.GetType().Assembly.GetName();
            return $"{name.Name} {name.Version!.ToString(3)}";
        }
    }

    private static IEnumerable<Artifact> ArtifactsIn(object? value) =>
        value switch
        {
            Artifact artifact => [artifact],
            string => [],
            IEnumerable items => items.OfType<Artifact>(),
            _ => [],
        };

    private static string TextOf(object value) =>
        value switch
        {
            ISettingValue setting => setting.ToSettingText(),
            string text => text,
            double number => number.ToString("R", CultureInfo.InvariantCulture),
            bool flag => flag ? "yes" : "no",
            Enum choice => choice.ToString(),
            IFormattable other => other.ToString(null, CultureInfo.InvariantCulture),
            IEnumerable items => string.Join(", ", items.Cast<object>().Select(TextOf)),
            _ => throw new InvalidOperationException(
                $"A setting of type {value.GetType().FullName} cannot be journalled: it must be a number, text, an enum or an {nameof(ISettingValue)}."
            ),
        };
}
