using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>A system of the registry with the meaning of its definition.</summary>
internal sealed record RegistryDefinition(SystemEntry Entry, SystemDefinition Definition);

/// <summary>The meanings of all definitions of the registry that are understood, for matching by parameters.</summary>
internal static class RegistryDefinitions
{
    private static readonly Lazy<RegistryDefinition[]> All = new(() =>
        [.. RegistryTable.Systems.Values.Where(entry => entry.Wkt.Length > 0).Select(Read).OfType<RegistryDefinition>()]
    );

    private static readonly Lazy<Dictionary<string, Ellipsoid>> Figures = new(() =>
        All
            .Value.Where(one => one.Definition.Form is null)
            .GroupBy(one => one.Definition.Datum.Key, StringComparer.Ordinal)
            .ToDictionary(group => group.Key, group => group.First().Definition.Ellipsoid, StringComparer.Ordinal)
    );

    /// <summary>The systems that give the same coordinates as a definition.</summary>
    public static RegistryDefinition[] Like(SystemDefinition definition) =>
        [.. All.Value.Where(one => one.Definition.IsLike(definition))];

    /// <summary>The figure of a datum; null where the registry does not have the datum.</summary>
    public static Ellipsoid? FigureOf(DatumFrame datum) => Figures.Value.GetValueOrDefault(datum.Key);

    /// <summary>Null where the definition is not understood: nothing can match it, and whoever asks for its code is told why.</summary>
    private static RegistryDefinition? Read(SystemEntry entry)
    {
        try
        {
            return new(entry, entry.ReadDefinition());
        }
        catch (RefusedException)
        {
            return null;
        }
    }
}
