using System.Collections.Immutable;
using System.Globalization;

namespace RecipeRunner.Host.Rerunning;

/// <summary>Compares two versions of emitted files value by value.</summary>
internal sealed class ValueComparison(IOutputReader reader)
{
    private const int MostListed = 10;

    private readonly List<ValueDifference> worst = [];

    /// <summary>The largest difference within the tolerance.</summary>
    public ValueDifference? LargestWithin { get; private set; }

    /// <summary>How many values differ beyond the tolerance.</summary>
    public int BeyondCount { get; private set; }

    /// <summary>The worst differences beyond the tolerance.</summary>
    public ImmutableArray<ValueDifference> Worst =>
        [.. worst.OrderByDescending(difference => difference.Difference).Take(MostListed)];

    /// <summary>Compares one file.</summary>
    /// <param name="file">Relative to both payloads.</param>
    /// <param name="held">The payload that a study holds.</param>
    /// <param name="made">The payload that the rerun made.</param>
    public void Compare(string file, string held, string made)
    {
        var (was, now) = (Read(held, file), Read(made, file));
        foreach (var (place, text) in was)
        {
            Note(file, place, text, now.GetValueOrDefault(place));
        }

        foreach (var (place, text) in now.Where(pair => !was.ContainsKey(pair.Key)))
        {
            Note(file, place, null, text);
        }
    }

    private Dictionary<(string Row, string Column), string> Read(string payload, string file)
    {
        var path = Path.Combine(payload, file);
        var values = new Dictionary<(string Row, string Column), string>();
        foreach (var value in File.Exists(path) ? reader.Read(path) : [])
        {
            values[(value.Row, value.Column)] = value.Text;
        }

        return values;
    }

    private void Note(string file, (string Row, string Column) place, string? was, string? now)
    {
        if (string.Equals(was, now, StringComparison.Ordinal))
        {
            return;
        }

        var difference = new ValueDifference(file, place.Row, place.Column, was, now, Between(was, now));
        if (difference.Difference <= RerunReport.Tolerance)
        {
            LargestWithin = difference.Difference >= (LargestWithin?.Difference ?? 0) ? difference : LargestWithin;
            return;
        }

        BeyondCount++;
        worst.Add(difference);
        if (worst.Count > 10 * MostListed)
        {
            worst.Sort((a, b) => b.Difference.CompareTo(a.Difference));
            worst.RemoveRange(MostListed, worst.Count - MostListed);
        }
    }

    private static double Between(string? was, string? now)
    {
        if (
            !double.TryParse(was, NumberStyles.Float, CultureInfo.InvariantCulture, out var a)
            || !double.TryParse(now, NumberStyles.Float, CultureInfo.InvariantCulture, out var b)
            || !double.IsFinite(a)
            || !double.IsFinite(b)
        )
        {
            return double.PositiveInfinity;
        }

        var larger = Math.Max(Math.Abs(a), Math.Abs(b));
        return larger == 0 ? 0 : Math.Abs(a - b) / larger;
    }
}
