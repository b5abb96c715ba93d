using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>Reads marks beside values, and says what becomes of a value that is marked.</summary>
internal sealed class FlagReader
{
    private readonly string file;
    private readonly Dictionary<string, RecordStatus> meanings = new(StringComparer.Ordinal);

    /// <summary>Takes the meanings.</summary>
    /// <exception cref="RefusedException">One mark is to mean two things.</exception>
    public FlagReader(string file, IEnumerable<Flag> flags)
    {
        this.file = file;
        var problems = new Problems();
        foreach (var (mark, meaning) in flags.SelectMany(flag => flag.Marks.Select(mark => (mark, flag.Meaning))))
        {
            if (!meanings.TryAdd(mark, meaning) && meanings[mark] != meaning)
            {
                problems.Add(
                    "RR0263",
                    Place.Of("marks of values"),
                    $"The flag '{mark}' is declared to mean two things: {meanings[mark].Word()} and {meaning.Word()}.",
                    "Give each mark one meaning."
                );
            }
        }

        problems.ThrowIfAny();
    }

    /// <summary>The value as its mark leaves it.</summary>
    /// <param name="cell">The value.</param>
    /// <param name="flag">The mark; blank for none.</param>
    /// <param name="place">Line, and column of the mark.</param>
    /// <param name="gauge">The gauge.</param>
    /// <param name="problems">Takes what is wrong.</param>
    public Cell Apply(Cell cell, ReadOnlySpan<char> flag, (int Line, int Column) place, string gauge, Problems problems)
    {
        if (flag.IsEmpty)
        {
            return cell;
        }

        if (!meanings.GetAlternateLookup<ReadOnlySpan<char>>().TryGetValue(flag, out var meaning))
        {
            problems.Add(
                "RR0269",
                new Place(file, place.Line, place.Column, $"gauge {gauge}"),
                $"The form does not say what the flag '{flag}' means; it knows {Listing.Of(meanings.Keys)}.",
                $"Add it to flags, such as   Flag.Failed(\"{flag}\")   or   Flag.Good(\"{flag}\")"
            );
            return cell;
        }

        var isDepthLost = meaning is RecordStatus.Trace or RecordStatus.Accumulated && cell.Depth > 0;
        if (isDepthLost)
        {
            problems.Add(
                "RR0284",
                new Place(file, place.Line, place.Column, $"gauge {gauge}"),
                string.Create(
                    System.Globalization.CultureInfo.InvariantCulture,
                    $"The flag '{flag}' says {meaning.Word()}, yet the value is {cell.Depth:0.###} mm."
                ),
                "Does the flag mean something else, or is the unit wrong?"
            );
            return cell;
        }

        return meaning switch
        {
            RecordStatus.Observed => cell,
            RecordStatus.Missing => default,
            RecordStatus.Trace or RecordStatus.Accumulated => new Cell(0, meaning),
            _ => cell.Status == RecordStatus.Missing ? cell : cell with { Status = meaning },
        };
    }
}
