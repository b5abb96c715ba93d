namespace RecipeRunner.Model.Steps;

/// <summary>How much a finding matters.</summary>
public enum Severity
{
    /// <summary>Worth knowing.</summary>
    Notice,

    /// <summary>Usable, but look at it before relying on the result.</summary>
    Caution,

    /// <summary>Not usable: the run ends.</summary>
    Error,
}

/// <summary>A place in a file or a thing in a data set that a finding is about. Empty and zero members are unknown.</summary>
/// <param name="File">The file as the recipe names it.</param>
/// <param name="Line">The line, from 1; for tables the header is line 1.</param>
/// <param name="Column">The column, from 1.</param>
/// <param name="Item">The thing, such as <c>basin B-3, ring 2</c>.</param>
public sealed record Place(string File = "", int Line = 0, int Column = 0, string Item = "")
{
    /// <summary>A thing in no file.</summary>
    public static Place Of(string item) => new(Item: item);

    /// <inheritdoc/>
    public override string ToString()
    {
        var parts = new List<string>(4);
        if (File.Length > 0)
        {
            parts.Add(File);
        }

        if (Line > 0)
        {
            parts.Add(FormattableString.Invariant($"line {Line}"));
        }

        if (Column > 0)
        {
            parts.Add(FormattableString.Invariant($"column {Column}"));
        }

        if (Item.Length > 0)
        {
            parts.Add(Item);
        }

        return string.Join(", ", parts);
    }
}

/// <summary>Something a careful colleague would point out.</summary>
/// <param name="Severity">How much it matters.</param>
/// <param name="Code">A stable code, <c>RR0000</c> to <c>RR9999</c>.</param>
/// <param name="Where">The place in the data.</param>
/// <param name="What">What was found, and what was expected: whole sentences.</param>
/// <param name="Mend">What to do about it; empty where there is nothing to do.</param>
public sealed record Finding(Severity Severity, string Code, Place Where, string What, string Mend = "")
{
    /// <summary>A finding that ends the run.</summary>
    public static Finding Error(string code, Place where, string what, string mend = "") =>
        new(Severity.Error, code, where, what, mend);

    /// <summary>A finding to look at before relying on the result.</summary>
    public static Finding Caution(string code, Place where, string what, string mend = "") =>
        new(Severity.Caution, code, where, what, mend);

    /// <summary>A finding worth knowing.</summary>
    public static Finding Notice(string code, Place where, string what, string mend = "") =>
        new(Severity.Notice, code, where, what, mend);
}
