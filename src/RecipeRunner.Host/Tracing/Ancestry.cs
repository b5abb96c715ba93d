using System.Collections.Immutable;
using RecipeRunner.Host.Running;

namespace RecipeRunner.Host.Tracing;

/// <summary>The steps behind a step.</summary>
internal static class Ancestry
{
    /// <summary>The step and all from which its inputs came, the last first.</summary>
    public static ImmutableArray<JournalEntry> Of(StudyRecord record, JournalEntry entry)
    {
        var numbers = new SortedSet<int> { entry.Number };
        var open = new Stack<int>(numbers);
        while (open.TryPop(out var number))
        {
            foreach (var input in record.Journal[number - 1].Inputs.Where(input => numbers.Add(input.Entry)))
            {
                open.Push(input.Entry);
            }
        }

        return [.. numbers.Reverse().Select(number => record.Journal[number - 1])];
    }
}
