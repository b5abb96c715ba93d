using System.Collections.Immutable;
using RecipeRunner.Host.Running;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tracing;

/// <summary>Lets a step look into a study's input files again; it writes nothing.</summary>
internal sealed class InputContext(string folder, CancellationToken cancellation) : StepContext
{
    private readonly DataFolder inputs = DataFolder.At(folder);

    public override CancellationToken Cancellation => cancellation;

    public override bool InputExists(string name) => inputs.Exists(name);

    public override ImmutableArray<string> FindInputs(string pattern) => inputs.Find(pattern);

    public override Stream OpenInput(string name) => File.OpenRead(inputs.PathOf(name));

    public override Stream CreateOutput(string path) => throw NothingToDo();

    public override void Find(Finding finding) { }

    public override void State(string name, string value) { }

    public override void Assume(string sentence) { }

    public override void Progress(double share) { }

    private static InvalidOperationException NothingToDo() => new("A trace writes nothing.");
}
