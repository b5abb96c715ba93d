using NodaTime;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Reading.Records;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>
/// Gathers the values of a GHCN-Daily file. A total of several days and the number of its days are two elements on the day on
/// which it was read, in any order.
/// </summary>
internal sealed class GhcnRows(string file, TimeStep step, IReadOnlySet<string>? wanted)
{
    private readonly LongRows rows = new(file, step);
    private readonly Dictionary<(int Gauge, LocalDate Date), Total> totals = [];
    private readonly HashSet<string>.AlternateLookup<ReadOnlySpan<char>>? known = (
        wanted is null ? null : new HashSet<string>(wanted, StringComparer.Ordinal)
    )?.GetAlternateLookup<ReadOnlySpan<char>>();

    /// <summary>The file.</summary>
    public string File => file;

    /// <summary>What is wrong with it.</summary>
    public Problems Problems { get; } = new();

    /// <summary>How many values were missing and are presumed zero.</summary>
    public int PresumedZero { get; private set; }

    /// <summary>How many values have a flag that says that there was nothing to measure, and yet a depth; they count as failed.</summary>
    public int Contradicting { get; private set; }

    /// <summary>True where nothing was taken in.</summary>
    public bool IsEmpty => rows.IsEmpty && totals.Count == 0;

    /// <summary>True where the recipe wants this station.</summary>
    public bool IsWanted(ReadOnlySpan<char> id) => known is null || known.Value.Contains(id);

    /// <summary>Notes what does not follow the format.</summary>
    /// <param name="line">Its line.</param>
    /// <param name="column">Its column, from 1.</param>
    /// <param name="what">What was found.</param>
    public void AddProblem(int line, int column, string what) =>
        Problems.Add(
            "RR0279",
            new Place(file, line, column),
            what,
            "The file does not follow the format; fetch it again."
        );

    /// <summary>Adds a value.</summary>
    /// <param name="id">The station.</param>
    /// <param name="date">The day.</param>
    /// <param name="element">One of the elements that are read.</param>
    /// <param name="value">The value with its flags.</param>
    /// <param name="place">Line and column.</param>
    public void Add(
        ReadOnlySpan<char> id,
        LocalDate date,
        ReadOnlySpan<char> element,
        GhcnValue value,
        (int Line, int Column) place
    )
    {
        var gauge = rows.GaugeOf(id);
        if (element is GhcnLayout.Daily)
        {
            rows.Add(gauge, date.AtMidnight(), CellOf(value, place, gauge), place, Problems);
        }
        else if (value.Value != GhcnLayout.Missing)
        {
            AddTotal(gauge, date, element is GhcnLayout.DayCount, value, place);
        }
    }

    /// <summary>What the file holds.</summary>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public RecordPart Finish()
    {
        foreach (var ((gauge, date), total) in totals)
        {
            if (total.Amount is { } amount)
            {
                AddSpan(gauge, date, amount, total);
            }
        }

        Problems.ThrowIfAny();
        return rows.Finish(Problems);
    }

    private void AddSpan(int gauge, LocalDate date, GhcnValue amount, Total total)
    {
        var usable =
            amount is { Quality: GhcnLayout.Blank, Value: >= 0 } && total.Days is { Quality: GhcnLayout.Blank };
        var days = total.Days is { Value: >= 1 } counted ? counted.Value : 1;
        double? depth = usable ? Millimetres(amount.Value) : null;
        rows.AddTotal(gauge, date.AtMidnight(), days, depth, (total.Line, total.Column), Problems);
    }

    private Cell CellOf(GhcnValue value, (int Line, int Column) place, int gauge)
    {
        if (value.Value == GhcnLayout.Missing)
        {
            return default;
        }

        if (value.Value < 0)
        {
            Problems.Add(
                "RR0279",
                new Place(file, place.Line, place.Column, $"gauge {rows.IdOf(gauge)}"),
                FormattableString.Invariant($"The value {value.Value} is less than zero; rain is not."),
                "The file does not follow the format; fetch it again."
            );
            return default;
        }

        var status = GhcnLayout.StatusOf(value.Measurement, value.Quality);
        if (status is RecordStatus.Trace or RecordStatus.Estimated && value.Value > 0)
        {
            Contradicting++;
            status = RecordStatus.Failed;
        }

        PresumedZero += status == RecordStatus.Estimated ? 1 : 0;
        return new Cell(Millimetres(value.Value), status);
    }

    private void AddTotal(int gauge, LocalDate date, bool isCount, GhcnValue value, (int Line, int Column) place)
    {
        var read = totals.GetValueOrDefault((gauge, date));
        if ((isCount ? read.Days : read.Amount) is not null)
        {
            Problems.Add(
                "RR0255",
                new Place(file, place.Line, place.Column, $"gauge {rows.IdOf(gauge)}"),
                FormattableString.Invariant(
                    $"It has a {(isCount ? GhcnLayout.DayCount : GhcnLayout.SeveralDays)} for {step.LabelText(date.AtMidnight())} at line {read.Line} already."
                ),
                "Take one of the two rows out."
            );
            return;
        }

        totals[(gauge, date)] = isCount
            ? read with
            {
                Days = value,
                Line = place.Line,
                Column = place.Column,
            }
            : read with
            {
                Amount = value,
                Line = place.Line,
                Column = place.Column,
            };
    }

    private static double Millimetres(int tenths) => RainUnit.TenthsOfMillimetre.ToMillimetres(tenths, 24);

    private readonly record struct Total(GhcnValue? Amount, GhcnValue? Days, int Line, int Column);
}
