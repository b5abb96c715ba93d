using System.Collections.Frozen;
using System.Globalization;

namespace RecipeRunner.Steps.Referencing;

/// <summary>What longitudes and latitudes are fixed to, whichever meridian they count from.</summary>
/// <param name="Key">The registry's number of the datum counted from Greenwich; the plain name where the registry has none.</param>
/// <param name="Name">The name for people.</param>
internal sealed record DatumFrame(string Key, string Name)
{
    private static readonly Lazy<FrozenDictionary<string, DatumFrame>> ByName = new(Collect);

    /// <summary>True where the registry has the datum.</summary>
    public bool IsKnown => RegistryTable.Datums.ContainsKey(Key);

    /// <summary>The datum of the registry's number, such as <c>6326</c>.</summary>
    public static DatumFrame Of(string number)
    {
        var datum = RegistryTable.Datums[RegistryTable.Datums[number].Frame];
        return new DatumFrame(datum.Code, datum.Name);
    }

    /// <summary>
    /// The datum that a definition means: by its name in either dialect, else by its number, else one that is like no other.
    /// </summary>
    /// <param name="name">As the definition writes it.</param>
    /// <param name="number">The registry's number in the definition; empty where it has none.</param>
    public static DatumFrame Named(string name, string number)
    {
        if (ByName.Value.TryGetValue(Plain(name), out var known))
        {
            return known;
        }

        return RegistryTable.Datums.ContainsKey(number) ? Of(number) : new DatumFrame(Plain(name), name);
    }

    /// <summary>A name that two datums share means the one whose geographic system has the lowest number: the older one.</summary>
    private static FrozenDictionary<string, DatumFrame> Collect() =>
        RegistryTable
            .Datums.Values.OrderBy(datum => int.Parse(datum.Crs.Split(':', ' ')[1], CultureInfo.InvariantCulture))
            .SelectMany(datum => datum.Aliases.Append(datum.Name).Select(name => (Name: Plain(name), datum.Code)))
            .DistinctBy(pair => pair.Name, StringComparer.Ordinal)
            .ToFrozenDictionary(pair => pair.Name, pair => Of(pair.Code), StringComparer.Ordinal);

    /// <summary>Letters, digits and plus signs (CH1903+ is not CH1903) alone, without the D_ of ESRI's dialect.</summary>
    private static string Plain(string name)
    {
        var bare = name.StartsWith("D_", StringComparison.OrdinalIgnoreCase) ? name[2..] : name;
        return string.Concat(bare.Where(letter => char.IsLetterOrDigit(letter) || letter == '+')).ToLowerInvariant();
    }
}
