using System.Runtime.CompilerServices;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>What a cell says: a depth in millimetres and what is known of it. Accumulated means that it is in the gauge's next value.</summary>
internal readonly record struct Cell(double Depth, RecordStatus Status);

/// <summary>Reads the cells of values: a depth, a mark, or a problem; a blank cell is missing.</summary>
internal sealed class CellReader(string file, RainUnit unit, RecordMarks marks)
{
    /// <summary>Millimetres that are no depth but a filling for missing values, such as 9.96921E+36; sums of less stay finite.</summary>
    private const double Absurd = 1e16;

    private readonly bool isNeverMark = !marks.HasDepths;

    /// <summary>Reads a cell.</summary>
    /// <param name="cell">The text.</param>
    /// <param name="place">Line and column.</param>
    /// <param name="gauge">The gauge.</param>
    /// <param name="hours">How long the step is.</param>
    /// <param name="problems">Takes what is wrong.</param>
    /// <returns>What it says; missing where wrong.</returns>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Cell Read(
        ReadOnlySpan<char> cell,
        (int Line, int Column) place,
        string gauge,
        double hours,
        Problems problems
    ) =>
        PlainNumber.TryRead(cell, out var number) && (isNeverMark || marks.Of(number) is null)
            ? new Cell(unit.ToMillimetres(number, hours), RecordStatus.Observed)
            : ReadAny(cell.Trim(), place, gauge, hours, problems);

    private Cell ReadAny(
        ReadOnlySpan<char> text,
        (int Line, int Column) place,
        string gauge,
        double hours,
        Problems problems
    )
    {
        if (text.IsEmpty)
        {
            return default;
        }

        if (marks.Of(text) is { } marked)
        {
            return new Cell(0, marked);
        }

        var number = text;
        var status = RecordStatus.Observed;
        if (!NumberText.TryRead(number, out var value))
        {
            number = WithoutSuffix(text);
            status = RecordStatus.Estimated;
            if (number.Length == text.Length || !NumberText.TryRead(number, out value))
            {
                AddNotDepth(text.ToString(), place, gauge, problems);
                return default;
            }
        }
        else if (marks.Of(value) is { } meant)
        {
            return new Cell(0, meant);
        }

        if (value < 0)
        {
            problems.Add(
                "RR0251",
                new Place(file, place.Line, place.Column, $"gauge {gauge}"),
                $"'{text}' is less than zero; rain is not.",
                $"If it marks a missing value, add   missing: [\"{text}\"]"
            );
            return default;
        }

        var millimetres = unit.ToMillimetres(value + 0.0, hours);
        if (!(millimetres < Absurd))
        {
            AddNotDepth(text.ToString(), place, gauge, problems);
            return default;
        }

        return new Cell(millimetres, status);
    }

    private ReadOnlySpan<char> WithoutSuffix(ReadOnlySpan<char> text)
    {
        foreach (var suffix in marks.Suffixes)
        {
            if (suffix.Length > 0 && text.EndsWith(suffix, StringComparison.Ordinal))
            {
                return text[..^suffix.Length].TrimEnd();
            }
        }

        return text;
    }

    private void AddNotDepth(string text, (int Line, int Column) place, string gauge, Problems problems)
    {
        var letters = text.AsSpan().TrimStart("0123456789.").ToString();
        var mend =
            text is "T" or "t" or "Tr" or "tr" or "TR"
                ? $"If it marks a trace, too little to measure, add   trace: [\"{text}\"]"
            : letters.Length < text.Length && letters.All(char.IsAsciiLetter)
                ? $"If the letters mark an estimated value, add   estimated: [\"{letters}\"]"
            : text.Any(char.IsAsciiLetter) || NumberText.TryRead(text, out _)
                ? $"If it marks a missing value, add   missing: [\"{text}\"]"
            : NumberText.Mend(text);
        problems.Add(
            "RR0250",
            new Place(file, place.Line, place.Column, $"gauge {gauge}"),
            $"'{text}' is not a depth.",
            mend
        );
    }
}
