using System.Collections;
using System.Collections.Immutable;
using System.Globalization;
using System.Runtime.CompilerServices;

namespace RecipeRunner.Steps.Reading;

/// <summary>A column of a text table: by the name in its header, or by number from 1.</summary>
public sealed record FileColumn
{
    private FileColumn(string name, int number) => (Name, Number) = (name, number);

    /// <summary>The name in the header; empty where the column is given by number.</summary>
    public string Name { get; }

    /// <summary>The number from 1; 0 where the column is given by name.</summary>
    public int Number { get; }

    /// <summary>A column by name.</summary>
    public static implicit operator FileColumn(string name) => new(name, 0);

    /// <summary>A column by number from 1.</summary>
    public static implicit operator FileColumn(int number) => new("", number);

    /// <inheritdoc/>
    public override string ToString() => Number > 0 ? Number.ToString(CultureInfo.InvariantCulture) : Name;
}

/// <summary>
/// The column that holds the time, or several that hold its parts in the order year, month, day, hour, minute, or date and
/// time of day: <c>"date"</c>, <c>1</c>, <c>["year", "month", "day"]</c>.
/// </summary>
[CollectionBuilder(typeof(TimeColumns), nameof(Of))]
public sealed class TimeColumns : IEnumerable<FileColumn>
{
    private TimeColumns(ImmutableArray<FileColumn> columns) => Columns = columns;

    /// <summary>The columns, the largest part first.</summary>
    public ImmutableArray<FileColumn> Columns { get; }

    /// <summary>One column by name.</summary>
    public static implicit operator TimeColumns(string name) => new([name]);

    /// <summary>One column by number from 1.</summary>
    public static implicit operator TimeColumns(int number) => new([number]);

    /// <summary>Columns of parts.</summary>
    /// <param name="columns">The columns, the largest part first.</param>
    public static TimeColumns Of(ReadOnlySpan<FileColumn> columns) => new([.. columns]);

    /// <inheritdoc/>
    public IEnumerator<FileColumn> GetEnumerator() => Columns.AsEnumerable().GetEnumerator();

    IEnumerator IEnumerable.GetEnumerator() => GetEnumerator();

    /// <inheritdoc/>
    public override string ToString() => string.Join(" ", Columns);
}
