using System.Collections.Immutable;
using System.IO.Enumeration;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Testing;

/// <summary>A study for tests: runs steps in memory over a data folder, writes nothing to disk, and keeps what they said.</summary>
/// <param name="dataFolder">The folder in which steps find their inputs.</param>
public sealed class TrialStudy(string dataFolder) : IStudy
{
    private readonly Dictionary<string, string> settings = new(StringComparer.Ordinal);
    private int entries;

    /// <summary>Findings of all steps, in order.</summary>
    public List<Finding> Findings { get; } = [];

    /// <summary>Facts that steps stated, in order.</summary>
    public List<(string Name, string Value)> Statements { get; } = [];

    /// <summary>What steps took for granted, in order.</summary>
    public List<string> Assumptions { get; } = [];

    /// <summary>Files that steps created, by path.</summary>
    public Dictionary<string, MemoryStream> Outputs { get; } = new(StringComparer.Ordinal);

    /// <summary>Titles, notes and sources, in order.</summary>
    public List<string> Said { get; } = [];

    /// <summary>The door of a step, for tests that open files again.</summary>
    public StepContext Context => new TrialContext(this);

    /// <inheritdoc/>
    public T Run<T>(Step<T> step)
        where T : Artifact => Take(step.Execute(new TrialContext(this)));

    /// <summary>Takes in an artifact that a test made by hand, so that verbs work on it.</summary>
    /// <typeparam name="T">Its type.</typeparam>
    /// <param name="artifact">An artifact without lineage.</param>
    public T Take<T>(T artifact)
        where T : Artifact
    {
        artifact.Adopt(new Lineage(this, ++entries, new RecipeLine("trial.csx", entries, 1)));
        return artifact;
    }

    /// <summary>Gives a setting a value, as the person who runs a recipe would.</summary>
    public void Set(string name, string value) => settings[name] = value;

    /// <inheritdoc/>
    public void Title(string text) => Said.Add(text);

    /// <inheritdoc/>
    public void Note(string text) => Said.Add(text);

    /// <inheritdoc/>
    public void Source(string file, string text, string? licence) =>
        Said.Add($"{file}: {text}{(licence is null ? "" : $" ({licence})")}");

    /// <inheritdoc/>
    public T Setting<T>(string name, T @default)
        where T : notnull =>
        settings.TryGetValue(name, out var text)
            ? (T)Convert.ChangeType(text, typeof(T), System.Globalization.CultureInfo.InvariantCulture)
            : @default;

    private sealed class TrialContext(TrialStudy study) : StepContext
    {
        public override CancellationToken Cancellation => CancellationToken.None;

        public override bool InputExists(string name) => File.Exists(PathOf(name));

        public override ImmutableArray<string> FindInputs(string pattern)
        {
            var folder = Path.GetDirectoryName(pattern) ?? "";
            var within = PathOf(folder);
            var last = Path.GetFileName(pattern);
            if (!last.AsSpan().ContainsAny('*', '?'))
            {
                return [pattern];
            }

            var names = Directory
                .EnumerateFiles(within)
                .Select(file => Path.GetFileName(file))
                .Where(name => FileSystemName.MatchesSimpleExpression(last, name, ignoreCase: false))
                .Select(name => Path.Combine(folder, name))
                .Order(StringComparer.Ordinal)
                .ToImmutableArray();
            return names.IsEmpty
                ? throw new RefusedException(
                    Finding.Error("RR0120", new Place(pattern), "There is no such file in the data folder.")
                )
                : names;
        }

        public override Stream OpenInput(string name) =>
            InputExists(name)
                ? File.OpenRead(PathOf(name))
                : throw new RefusedException(
                    Finding.Error("RR0120", new Place(name), "There is no such file in the data folder.")
                );

        public override Stream CreateOutput(string path) => study.Outputs[path] = new MemoryStream();

        public override void Find(Finding finding) => study.Findings.Add(finding);

        public override void State(string name, string value) => study.Statements.Add((name, value));

        public override void Assume(string sentence) => study.Assumptions.Add(sentence);

        public override void Progress(double share) { }

        private string PathOf(string name) => Path.Combine(study.DataFolder, name);
    }

    private string DataFolder { get; } = dataFolder;
}
