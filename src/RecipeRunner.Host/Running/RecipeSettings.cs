using System.Collections.Immutable;
using System.Globalization;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Running;

/// <summary>The settings of a recipe: what the person gave, and what the recipe asked for.</summary>
/// <param name="given">Values by name.</param>
internal sealed class RecipeSettings(ImmutableSortedDictionary<string, string> given)
{
    private readonly Dictionary<string, (object Value, SettingUsed Used)> used = new(StringComparer.Ordinal);
    private readonly List<SettingUsed> order = [];

    /// <summary>Settings in the order in which the recipe first asked.</summary>
    public ImmutableArray<SettingUsed> Used => [.. order];

    public T Use<T>(string name, T @default)
        where T : notnull
    {
        if (used.TryGetValue(name, out var known))
        {
            return known.Value is T same
                ? same
                : throw Refuse(
                    name,
                    $"The recipe asks for the setting '{name}' once as {known.Value.GetType().Name} and once as {typeof(T).Name}.",
                    "Ask for a setting once and keep it in a variable."
                );
        }

        var value = given.TryGetValue(name, out var text) ? Read<T>(name, text) : @default;
        var entry = new SettingUsed(name, Text(value), text is null);
        used.Add(name, (value, entry));
        order.Add(entry);
        return value;
    }

    /// <summary>Refuses values that the recipe never asked for.</summary>
    public void ThrowWhereUnknown()
    {
        var unknown = given.Keys.Where(name => !used.ContainsKey(name)).ToArray();
        if (unknown.Length == 0)
        {
            return;
        }

        var known =
            order.Count == 0
                ? "This recipe has no settings."
                : $"Its settings are {string.Join(", ", order.Select(s => $"{s.Name} ({s.Value})"))}.";
        throw new RefusedException([
            .. unknown.Select(name =>
                Refusal(
                    name,
                    $"The recipe has no setting '{name}'.",
                    $"{NearWords.Mend(name, used.Keys)} {known}".Trim()
                )
            ),
        ]);
    }

    private static T Read<T>(string name, string text)
        where T : notnull
    {
        object? value = null;
        if (typeof(T) == typeof(string))
        {
            value = text;
        }
        else if (typeof(T) == typeof(int))
        {
            value = int.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var whole)
                ? whole
                : null;
        }
        else if (typeof(T) == typeof(double))
        {
            value =
                double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out var number)
                && double.IsFinite(number)
                    ? number
                    : null;
        }
        else if (typeof(T) == typeof(bool))
        {
            value = text switch
            {
                "yes" or "true" => true,
                "no" or "false" => false,
                _ => null,
            };
        }
        else
        {
            throw Refuse(
                name,
                $"A setting cannot be of type {typeof(T).Name}.",
                "Settings are text, whole numbers, numbers or yes/no."
            );
        }

        return value is T fit
            ? fit
            : throw Refuse(name, $"'{text}' is not {Expected<T>()}.", $"Give it as --set {name}=VALUE.");
    }

    private static string Expected<T>() =>
        typeof(T) == typeof(int) ? "a whole number"
        : typeof(T) == typeof(double) ? "a number with a decimal point"
        : "yes or no";

    private static string Text(object value) =>
        value switch
        {
            double number => number.ToString("R", CultureInfo.InvariantCulture),
            bool flag => flag ? "yes" : "no",
            _ => Convert.ToString(value, CultureInfo.InvariantCulture)!,
        };

    private static RefusedException Refuse(string name, string what, string mend) => new(Refusal(name, what, mend));

    private static Finding Refusal(string name, string what, string mend) =>
        Finding.Error("RR0111", Place.Of($"setting {name}"), what, mend);
}
