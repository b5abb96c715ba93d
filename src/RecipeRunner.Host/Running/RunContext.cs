using System.Collections.Immutable;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Running;

/// <summary>The door of one step: remembers what went through it.</summary>
internal sealed class RunContext(
    string word,
    InputFiles inputs,
    OutputFiles outputs,
    IRunObserver observer,
    CancellationToken cancellation
) : StepContext, IDisposable
{
    private readonly List<Stream> open = [];

    public override CancellationToken Cancellation => cancellation;

    public List<Finding> Findings { get; } = [];

    public List<(string Name, string Value)> Statements { get; } = [];

    public List<string> Assumptions { get; } = [];

    public List<string> FilesRead { get; } = [];

    public List<string> FilesWritten { get; } = [];

    public override bool InputExists(string name) => inputs.Exists(name);

    public override ImmutableArray<string> FindInputs(string pattern) => inputs.Find(pattern);

    public override Stream OpenInput(string name)
    {
        var stream = inputs.Open(name, cancellation);
        FilesRead.Add(name);
        open.Add(stream);
        return stream;
    }

    public override Stream CreateOutput(string path)
    {
        var stream = outputs.Create(path);
        FilesWritten.Add(path);
        open.Add(stream);
        return stream;
    }

    public override void Find(Finding finding)
    {
        if (finding.Severity == Severity.Error)
        {
            throw new RefusedException(finding);
        }

        Findings.Add(finding);
    }

    public override void State(string name, string value) => Statements.Add((name, value));

    public override void Assume(string sentence) => Assumptions.Add(sentence);

    public override void Progress(double share) => observer.Progressed(word, share);

    /// <summary>Closes what the step left open.</summary>
    public void Dispose()
    {
        foreach (var stream in open)
        {
            stream.Dispose();
        }
    }
}
