using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Reads the cells of a record: a depth, or missing, or a problem.</summary>
internal sealed class DepthReader(string file, RainUnit unit, ImmutableArray<string> missing)
{
    private readonly double[] missingNumbers =
    [
        .. missing
            .Select(text => NumberText.TryRead(text, out var number) ? number : double.NegativeInfinity)
            .Where(double.IsFinite),
    ];

    /// <summary>Reads a cell.</summary>
    /// <param name="cell">The text.</param>
    /// <param name="line">Its line.</param>
    /// <param name="column">Its column, from 1.</param>
    /// <param name="gauge">The gauge.</param>
    /// <param name="hours">How long the step is.</param>
    /// <param name="problems">Takes what is wrong.</param>
    /// <returns>Millimetres; null where missing or wrong.</returns>
    public double? Read(ReadOnlySpan<char> cell, int line, int column, string gauge, double hours, Problems problems)
    {
        var text = cell.Trim();
        if (text.IsEmpty)
        {
            return null;
        }

        if (!NumberText.TryRead(text, out var depth))
        {
            return IsMarker(text) ? null : Refuse(text.ToString(), line, column, gauge, problems);
        }

        if (IsMissingNumber(depth))
        {
            return null;
        }

        if (depth < 0)
        {
            problems.Add(
                "RR0251",
                new Place(file, line, column, $"gauge {gauge}"),
                $"'{text}' is less than zero; rain is not.",
                $"If it marks a missing value, add   missing: [\"{text}\"]"
            );
            return null;
        }

        return unit.ToMillimetres(depth + 0.0, hours);
    }

    private bool IsMissingNumber(double depth)
    {
        foreach (var number in missingNumbers)
        {
            if (number == depth)
            {
                return true;
            }
        }

        return false;
    }

    private bool IsMarker(ReadOnlySpan<char> text)
    {
        foreach (var marker in missing)
        {
            if (text.SequenceEqual(marker))
            {
                return true;
            }
        }

        return false;
    }

    private double? Refuse(string text, int line, int column, string gauge, Problems problems)
    {
        var mend =
            text is "T" or "t" or "Tr" or "tr" ? "If it marks a trace, too little to measure, write 0 in its place."
            : text.Any(char.IsAsciiLetter) ? $"If it marks a missing value, add   missing: [\"{text}\"]"
            : NumberText.Mend(text);
        problems.Add("RR0250", new Place(file, line, column, $"gauge {gauge}"), $"'{text}' is not a depth.", mend);
        return null;
    }
}
