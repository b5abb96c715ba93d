using System.Collections.Immutable;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Steps;
using RecipeRunner.Steps.Reading.Texts;

namespace RecipeRunner.Steps.Reading.Records;

/// <summary>What texts in the cells of values mean, as the recipe declares it: by the text, or by its number where it is one.</summary>
internal sealed class RecordMarks
{
    private readonly Dictionary<string, RecordStatus> texts = new(StringComparer.Ordinal);
    private readonly List<(double Number, RecordStatus Status)> numbers = [];

    /// <summary>Takes the declarations.</summary>
    /// <exception cref="RefusedException">One text is to mean two things.</exception>
    public RecordMarks(
        ImmutableArray<string> missing,
        ImmutableArray<string> trace,
        ImmutableArray<string> accumulating,
        ImmutableArray<string> estimated
    )
    {
        var problems = new Problems();
        Declare(missing, RecordStatus.Missing, problems);
        Declare(trace, RecordStatus.Trace, problems);
        Declare(accumulating, RecordStatus.Accumulated, problems);
        Declare(estimated, RecordStatus.Estimated, problems);
        problems.ThrowIfAny();
        Suffixes = estimated;
        foreach (var suffix in estimated)
        {
            texts.Remove(suffix);
        }
    }

    /// <summary>Marks that follow a number in its cell and say that it is estimated.</summary>
    public ImmutableArray<string> Suffixes { get; }

    /// <summary>True where a number that could be a depth, zero or more, is a mark.</summary>
    public bool HasDepths => numbers.Exists(mark => mark.Number >= 0);

    /// <summary>What a text means; null where it is no mark.</summary>
    public RecordStatus? Of(ReadOnlySpan<char> text) =>
        texts.GetAlternateLookup<ReadOnlySpan<char>>().TryGetValue(text, out var status) ? status : null;

    /// <summary>What a number means; null where it is no mark.</summary>
    public RecordStatus? Of(double number)
    {
        foreach (var mark in numbers)
        {
            if (mark.Number == number)
            {
                return mark.Status;
            }
        }

        return null;
    }

    private void Declare(ImmutableArray<string> marks, RecordStatus status, Problems problems)
    {
        foreach (var mark in marks)
        {
            var known = NumberText.TryRead(mark, out var number) ? Of(number) : null;
            if (known is not null && known != status || (texts.TryGetValue(mark, out var other) && other != status))
            {
                problems.Add(
                    "RR0263",
                    Place.Of("marks of values"),
                    $"'{mark}' is declared to mean two things: {(known ?? texts[mark]).Word()} and {status.Word()}.",
                    "Give each mark one meaning."
                );
                continue;
            }

            texts[mark] = status;
            if (NumberText.TryRead(mark, out number))
            {
                numbers.Add((number, status));
            }
        }
    }
}
