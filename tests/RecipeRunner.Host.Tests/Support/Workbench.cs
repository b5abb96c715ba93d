using System.Collections.Immutable;
using System.Text.Json.Nodes;
using RecipeRunner.Host.Rerunning;
using RecipeRunner.Host.Running;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Host.Sealing;

namespace RecipeRunner.Host.Tests.Support;

/// <summary>A folder of its own for one test, with a recipe, data and studies.</summary>
public sealed class Workbench : IDisposable
{
    public Workbench()
    {
        Folder = Directory.CreateTempSubdirectory("recipe-runner-").FullName;
        Directory.CreateDirectory(DataFolder);
        WriteData("a.txt", "alpha");
        WriteData("b.txt", "beta");
    }

    public static RecipeLanguage Language { get; } =
        new(
            typeof(WordVerbs),
            study => new WordVerbs(study),
            [typeof(WordVerbs).Assembly],
            ["System", "System.Linq", "System.Collections.Generic", "RecipeRunner.Host.Tests.Support"]
        );

    public string Folder { get; }

    public string DataFolder => Path.Combine(Folder, "data-folder");

    public string Study => Path.Combine(Folder, "out.study");

    public void WriteData(string name, string text) => Write(Path.Combine("data-folder", name), text);

    public string Write(string name, string text)
    {
        var path = Path.Combine(Folder, name);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        File.WriteAllText(path, text);
        return path;
    }

    public RunOutcome Run(
        string recipe,
        string? into = null,
        bool replace = false,
        long? listAbove = null,
        string? sign = null,
        CancellationToken cancellation = default,
        params (string Name, string Value)[] settings
    ) =>
        RecipeRun.Execute(
            new RunRequest(
                Write("recipe.csx", recipe),
                DataFolder,
                into ?? Study,
                settings.ToImmutableSortedDictionary(s => s.Name, s => s.Value, StringComparer.Ordinal),
                replace,
                listAbove,
                sign
            ),
            Language,
            new SilentObserver(),
            cancellation
        );

    public RerunReport Rerun(string? data = null, string? signers = null) =>
        StudyRerun.Of(
            new RerunRequest(Study, data, signers),
            Language,
            new NoReader(),
            new SilentObserver(),
            CancellationToken.None
        );

    /// <summary>Writes the manifests anew, as one would who edits a study and hides it.</summary>
    public void Reseal()
    {
        var title = JsonNode.Parse(File.ReadAllBytes(Path.Combine(Study, "data/audit.json")))!["title"]!;
        Bag.Seal(Study, title.GetValue<string>(), CancellationToken.None);
    }

    public RecipeProblem Fail(string recipe) => Should.Throw<RecipeException>(() => Run(recipe)).Problems[0];

    /// <summary>What lies in the folder beside recipe and data.</summary>
    public string[] Leftovers() =>
        [
            .. Directory
                .EnumerateFileSystemEntries(Folder)
                .Select(path => Path.GetFileName(path))
                .Where(name => name is not ("data-folder" or "recipe.csx"))
                .Order(StringComparer.Ordinal),
        ];

    public void Dispose() => Directory.Delete(Folder, recursive: true);

    private sealed class NoReader : IOutputReader
    {
        public IEnumerable<OutputValue> Read(string path) => [];
    }

    public sealed class SilentObserver : IRunObserver
    {
        public void Titled(string title) { }

        public void Progressed(string word, double share) { }

        public void Finished(JournalEntry entry) { }
    }
}
