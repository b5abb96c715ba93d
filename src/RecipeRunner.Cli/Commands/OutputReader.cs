using RecipeRunner.Host.Rerunning;
using RecipeRunner.Steps.Emitting;

namespace RecipeRunner.Cli.Commands;

/// <summary>Lends the host the step library's knowledge of emitted files.</summary>
internal sealed class OutputReader : IOutputReader
{
    /// <inheritdoc/>
    public IEnumerable<OutputValue> Read(string path) =>
        EmittedValues.Read(path).Select(value => new OutputValue(value.Row, value.Column, value.Text));
}
