using RecipeRunner.Steps.Reading.Records;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Peeking;

/// <summary>What the columns of a table look like as a record, judged from all of its cells.</summary>
/// <param name="Time">The column of the time, from 0.</param>
/// <param name="Gauge">The column of the gauge's id; -1 where there is a column a gauge.</param>
/// <param name="Values">The columns of values.</param>
internal sealed record PeekForm(int Time, int Gauge, int[] Values)
{
    /// <summary>The form in words.</summary>
    public string Words => Gauge < 0 ? "wide: time, then a column a gauge" : "long: gauge, time, value";

    /// <summary>The form of a table; null where it is no record.</summary>
    /// <param name="columns">Its columns.</param>
    public static PeekForm? Of(PeekColumn[] columns)
    {
        var time = Array.FindIndex(columns, column => LooksLikeTime(column.First));
        if (time < 0 || columns.Length < 2)
        {
            return null;
        }

        var gauge =
            columns.Length == 3 && time == 1
                ? 0
                : Array.FindIndex(columns, column => column != columns[time] && !column.IsNumeric && column.Repeats);
        var values = Enumerable
            .Range(0, columns.Length)
            .Where(column => column != time && column != gauge && columns[column].IsNumeric)
            .ToArray();
        if (values.Length == 0)
        {
            return null;
        }

        var isWide = gauge < 0 && (time == 0 || values.Length == columns.Length - 1);
        return gauge >= 0
                ? new PeekForm(
                    time,
                    gauge,
                    [Array.Find(values, column => columns[column].HasNumbers) is > 0 and var value ? value : values[0]]
                )
            : isWide ? new PeekForm(time, -1, values)
            : null;
    }

    /// <summary>How a recipe says it; empty where it need not.</summary>
    /// <param name="columns">The table's columns.</param>
    /// <param name="hasHeader">True where they have names.</param>
    public string Said(PeekColumn[] columns, bool hasHeader)
    {
        string Column(int column) =>
            hasHeader ? $"\"{columns[column].Name}\"" : FormattableString.Invariant($"{column + 1}");
        if (Gauge >= 0)
        {
            return hasHeader && columns.Length == 3 && (Gauge, Time) == (0, 1)
                ? ""
                : $"form: RecordForm.Long(gauge: {Column(Gauge)}, time: {Column(Time)}, value: {Column(Values[0])})";
        }

        if (!hasHeader)
        {
            return $"form: RecordForm.Wide(time: {Column(Time)}, gauges: [\"…\"])";
        }

        return Time == 0 && Values.Length == columns.Length - 1
            ? ""
            : $"form: RecordForm.Wide(time: {Column(Time)}, gauges: [{string.Join(", ", Values.Take(3).Select(Column))}{(Values.Length > 3 ? ", …" : "")}])";
    }

    /// <summary>True for a date, month or date and time; digits alone only where they are a date of recent centuries.</summary>
    public static bool LooksLikeTime(string text) =>
        TimeText.TryRead(text, out var time)
        && time.Detail != TimeDetail.Year
        && (!PlainNumber.TryRead(text, out _) || time.Time.Year is >= 1700 and <= 2200);
}
