using System.Globalization;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// The reference systems that can be used: those of the EPSG registry (v10.076) whose projection is computed to within a
/// centimetre of the registry's software at control points, checked again when a system is first used.
/// </summary>
public static class ReferenceSystems
{
    private const string Prefix = "EPSG:";
    private const int MostNeighbours = 4;

    /// <summary>The system of a code.</summary>
    /// <param name="code">Such as <c>EPSG:32633</c>; case and blanks around it do not matter. Geographic or projected.</param>
    /// <exception cref="RefusedException">
    /// RR0301: the text is no code. RR0302: the registry's current systems have no such code; near ones are named.
    /// RR0303, RR0311: it is deprecated or its method is not computed here. RR0304: it misses its control points.
    /// </exception>
    public static ReferenceSystem Find(string code)
    {
        ArgumentNullException.ThrowIfNull(code);
        var number = NumberIn(code);
        return RegistryTable.Systems.TryGetValue(number, out var entry)
            ? KnownSystem.OfEntry(entry).Facts
            : throw new RefusedException(
                Finding.Error(
                    "RR0302",
                    Place.Of(Prefix + number),
                    $"There is no two-dimensional reference system {Prefix}{number} in the registry (EPSG v10.076).",
                    Neighbours(number)
                )
            );
    }

    private static string NumberIn(string code)
    {
        var bare = code.Trim();
        var number = bare.StartsWith(Prefix, StringComparison.OrdinalIgnoreCase) ? bare[Prefix.Length..].Trim() : "";
        return number.Length is > 0 and <= 6 && number.All(char.IsAsciiDigit)
            ? number
            : throw new RefusedException(
                Finding.Error(
                    "RR0301",
                    Place.Of($"Crs(\"{code}\")"),
                    $"\"{code}\" is no code of a reference system.",
                    bare.Length is > 0 and <= 6 && bare.All(char.IsAsciiDigit)
                        ? $"Say which registry it is from: Crs(\"{Prefix}{bare}\")"
                        : $"Write the registry and the number, such as Crs(\"{Prefix}32633\")"
                )
            );
    }

    /// <summary>Codes that differ by one digit, then those that follow or come before.</summary>
    private static string Neighbours(string number)
    {
        var asked = int.Parse(number, CultureInfo.InvariantCulture);
        var near = RegistryTable
            .Systems.Where(system => !system.Value.IsDeprecated)
            .Select(system => system.Key)
            .Select(key => (Key: key, Digits: Differing(key, number)))
            .OrderBy(other => other.Digits)
            .ThenBy(other => Math.Abs(int.Parse(other.Key, CultureInfo.InvariantCulture) - asked))
            .ThenBy(other => other.Key, StringComparer.Ordinal)
            .Take(MostNeighbours)
            .Select(other => $"{Prefix}{other.Key} ({RegistryTable.Systems[other.Key].Name})");
        return $"Near ones are {string.Join(", ", near)}.";
    }

    /// <summary>How many digits differ; all of them where the lengths differ.</summary>
    private static int Differing(string one, string other) =>
        one.Length == other.Length ? one.Zip(other).Count(pair => pair.First != pair.Second) : other.Length;
}
