using System.Collections.Immutable;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>A study in the making: runs steps, one after the other, and journals them.</summary>
internal sealed class RunStudy(
    InputFiles inputs,
    OutputFiles outputs,
    RecipeSettings settings,
    IRunObserver observer,
    CancellationToken cancellation
) : IStudy
{
    private readonly List<JournalEntry> journal = [];
    private readonly List<string> notes = [];
    private readonly StatedSources sources = new();
    private int running;

    public string? GivenTitle { get; private set; }

    public ImmutableArray<string> Notes => [.. notes];

    /// <summary>The stated sources, checked against the files that were read.</summary>
    public ImmutableArray<DataSource> Sources => sources.Of(inputs.Records);

    public ImmutableArray<JournalEntry> Journal => [.. journal];

    public T Run<T>(Step<T> step)
        where T : Artifact
    {
        cancellation.ThrowIfCancellationRequested();
        if (Interlocked.Exchange(ref running, 1) == 1)
        {
            throw TwoAtOnce();
        }

        try
        {
            return RunAlone(step);
        }
        finally
        {
            Volatile.Write(ref running, 0);
        }
    }

    private T RunAlone<T>(Step<T> step)
        where T : Artifact
    {
        var line = RecipeStack.Current();
        var description = new StepDescription(step);
        var taken = description.Inputs.Select(input => Take(input.Name, input.Artifact)).ToImmutableArray();
        using var context = new RunContext(description.Attribute.Word, inputs, outputs, observer, cancellation);
        var result = step.Execute(context);
        context.Dispose();
        result.Adopt(new Lineage(this, journal.Count + 1, line));
        Enter(step, description, line, taken, context, result);
        return result;
    }

    public void Title(string text)
    {
        GivenTitle = text;
        observer.Titled(text);
    }

    public void Note(string text) => notes.Add(text);

    public void Source(string file, string text, string? licence) => sources.Add(file, text, licence);

    public T Setting<T>(string name, T @default)
        where T : notnull => settings.Use(name, @default);

    private static RefusedException TwoAtOnce() =>
        new(
            Finding.Error(
                "RR0113",
                new Place(),
                "Two steps were to run at once; their order in the journal would be chance.",
                "Run steps one after the other; they use all processors where that pays."
            )
        );

    private StepInput Take(string name, Artifact artifact) =>
        artifact.Lineage is { } lineage && ReferenceEquals(lineage.Study, this)
            ? new StepInput(name, lineage.Entry, artifact.Digest)
            : throw new RefusedException(
                Finding.Error(
                    "RR0112",
                    Place.Of(name),
                    "This was not made by this study.",
                    "Read it or make it by a step of this recipe, so that the journal can say where it comes from."
                )
            );

    private void Enter(
        object step,
        StepDescription description,
        RecipeLine line,
        ImmutableArray<StepInput> taken,
        RunContext context,
        Artifact result
    )
    {
        var entry = new JournalEntry
        {
            Number = journal.Count + 1,
            Title = description.Attribute.Title,
            Word = description.Attribute.Word,
            Source = description.Attribute.Source,
            StepType = description.TypeName,
            Library = description.Library,
            Line = line,
            Settings = description.Settings,
            Inputs = taken,
            Step = step,
            Output = result,
            Statements = [.. context.Statements],
            Assumptions = [.. context.Assumptions],
            Findings = [.. context.Findings],
            FilesRead = [.. context.FilesRead],
            FilesWritten = [.. context.FilesWritten],
        };
        journal.Add(entry);
        observer.Finished(entry);
    }
}
