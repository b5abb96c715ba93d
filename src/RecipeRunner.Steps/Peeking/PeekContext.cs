using System.Collections.Immutable;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Peeking;

/// <summary>The door of a look at a file: reads beside it, writes nothing, and keeps what is found.</summary>
internal sealed class PeekContext(string folder, CancellationToken cancellation) : StepContext
{
    public List<Finding> Findings { get; } = [];

    public override CancellationToken Cancellation => cancellation;

    public override bool InputExists(string name) => File.Exists(Path.Combine(folder, name));

    public override ImmutableArray<string> FindInputs(string pattern) => [pattern];

    public override Stream OpenInput(string name) => File.OpenRead(Path.Combine(folder, name));

    public override Stream CreateOutput(string path) =>
        throw new InvalidOperationException("A look at a file writes nothing.");

    public override void Find(Finding finding) => Findings.Add(finding);

    public override void State(string name, string value) { }

    public override void Assume(string sentence) =>
        throw new InvalidOperationException("A look at a file keeps no journal.");

    public override void Progress(double share) { }
}
