using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>Where a record file holds what: columns by name, or by number from 1 where there is no header.</summary>
public sealed record RecordForm : ISettingValue
{
    private RecordForm(RecordFormKind kind, TimeColumns time) => (Kind, Time) = (kind, time);

    /// <summary>Which of the three forms it is.</summary>
    public RecordFormKind Kind { get; }

    /// <summary>The column or columns of the time.</summary>
    public TimeColumns Time { get; }

    /// <summary>For a wide form: the gauges to take, or those that a file without header holds; empty for all.</summary>
    public ImmutableArray<string> Gauges { get; private init; } = [];

    /// <summary>For a long form: the column of the gauge's id.</summary>
    public FileColumn? Gauge { get; private init; }

    /// <summary>The column of the value.</summary>
    public FileColumn? Value { get; private init; }

    /// <summary>The column that says of how many steps, ending here, the value is the total.</summary>
    public FileColumn? Over { get; private init; }

    /// <summary>The column of marks.</summary>
    public FileColumn? Flag { get; private init; }

    /// <summary>What the marks say.</summary>
    public ImmutableArray<Flag> Flags { get; private init; } = [];

    /// <summary>A row a step, a column a gauge.</summary>
    /// <param name="time">The column of the time, or the columns of its parts.</param>
    /// <param name="gauges">
    /// The gauges to take, where the file holds other columns too; in a file without header, the gauges of all columns but the
    /// time's, in order.
    /// </param>
    public static RecordForm Wide(TimeColumns time, IReadOnlyList<string>? gauges = null) =>
        new(RecordFormKind.Wide, time) { Gauges = [.. gauges ?? []] };

    /// <summary>A row a gauge and step.</summary>
    /// <param name="gauge">The column of the gauge's id.</param>
    /// <param name="time">The column of the time, or the columns of its parts.</param>
    /// <param name="value">The column of the value.</param>
    /// <param name="over">The column that says of how many steps, ending here, the value is the total.</param>
    /// <param name="flag">The column of marks.</param>
    /// <param name="flags">What the marks say; a mark that none names is refused.</param>
    [SuppressMessage("Naming", "CA1720", Justification = "The trade's word for one value a row.")]
    public static RecordForm Long(
        FileColumn gauge,
        TimeColumns time,
        FileColumn value,
        FileColumn? over = null,
        FileColumn? flag = null,
        IReadOnlyList<Flag>? flags = null
    ) =>
        new(RecordFormKind.Long, time)
        {
            Gauge = gauge,
            Value = value,
            Over = over,
            Flag = flag,
            Flags = Meanings(flag, flags),
        };

    /// <summary>A file of one gauge, whose id is the file's name without its ending; a row a step.</summary>
    /// <param name="time">The column of the time, or the columns of its parts.</param>
    /// <param name="value">The column of the value.</param>
    /// <param name="over">The column that says of how many steps, ending here, the value is the total.</param>
    /// <param name="flag">The column of marks.</param>
    /// <param name="flags">What the marks say; a mark that none names is refused.</param>
    public static RecordForm OneGauge(
        TimeColumns time,
        FileColumn value,
        FileColumn? over = null,
        FileColumn? flag = null,
        IReadOnlyList<Flag>? flags = null
    ) =>
        new(RecordFormKind.OneGauge, time)
        {
            Value = value,
            Over = over,
            Flag = flag,
            Flags = Meanings(flag, flags),
        };

    /// <inheritdoc/>
    public string ToSettingText()
    {
        List<string> parts = [$"time {Time}"];
        Add("gauge", Gauge?.ToString());
        Add("value", Value?.ToString());
        Add("over", Over?.ToString());
        Add("flag", Flag?.ToString());
        Add("gauges", Gauges.IsEmpty ? null : string.Join(" ", Gauges));
        Add("flags", Flags.IsEmpty ? null : string.Join(", ", Flags));
        var word = Kind switch
        {
            RecordFormKind.Wide => "wide",
            RecordFormKind.Long => "long",
            _ => "one gauge a file",
        };
        return $"{word}: {string.Join("; ", parts)}";

        void Add(string name, string? text)
        {
            if (text is not null)
            {
                parts.Add($"{name} {text}");
            }
        }
    }

    /// <inheritdoc/>
    public override string ToString() => ToSettingText();

    private static ImmutableArray<Flag> Meanings(FileColumn? flag, IReadOnlyList<Flag>? flags) =>
        (flag is null) == (flags is null)
            ? [.. flags ?? []]
            : throw new RefusedException(
                Finding.Error(
                    "RR0265",
                    Place.Of("form of record"),
                    flag is null
                        ? "It says what marks mean, but not which column holds them."
                        : "It names a column of marks, but not what they mean.",
                    "Give both, such as   flag: \"quality\", flags: [Flag.Failed(\"X\"), Flag.Good(\"A\")]"
                )
            );
}

/// <summary>The forms of a record file.</summary>
public enum RecordFormKind
{
    /// <summary>A row a step, a column a gauge.</summary>
    Wide,

    /// <summary>A row a gauge and step.</summary>
    [SuppressMessage("Naming", "CA1720", Justification = "The trade's word for one value a row.")]
    Long,

    /// <summary>A file a gauge, a row a step.</summary>
    OneGauge,
}
