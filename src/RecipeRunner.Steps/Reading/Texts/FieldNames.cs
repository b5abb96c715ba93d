using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Texts;

/// <summary>Finds columns by name.</summary>
internal static class FieldNames
{
    /// <summary>The index of a column: by its exact name, or else by its name in other case where only one fits.</summary>
    /// <exception cref="RefusedException">There is none, or more than one; near names are offered.</exception>
    public static int Find(string file, IReadOnlyList<string> names, string wanted)
    {
        var exact = Enumerable
            .Range(0, names.Count)
            .Where(i => string.Equals(names[i], wanted, StringComparison.Ordinal))
            .ToArray();
        if (exact.Length == 1)
        {
            return exact[0];
        }

        var alike = Enumerable
            .Range(0, names.Count)
            .Where(i => string.Equals(names[i], wanted, StringComparison.OrdinalIgnoreCase))
            .ToArray();
        return alike.Length == 1
            ? alike[0]
            : throw new RefusedException(
                Finding.Error(
                    "RR0206",
                    new Place(file),
                    $"There is no column '{wanted}'.",
                    $"{NearWords.Mend(wanted, names)} Its columns are {string.Join(", ", names)}.".TrimStart()
                )
            );
    }
}
