namespace RecipeRunner.EndToEnd.Tests.Running;

/// <summary>A study of the demo's first recipe, made once by the real tool and looked at by many tests.</summary>
public sealed class DemoStudy : IDisposable
{
    public DemoStudy()
    {
        Said = Tool.Run("run", Recipe("monthly-totals"), "--data", Data);
        Said.ExitCode.ShouldBe(0, Said.Errors);
    }

    public static string Data => Path.Combine(Tool.Repository, "data-demo");

    public Tool Tool { get; } = new();

    public Said Said { get; }

    public string Folder => Tool.PathOf("monthly-totals.study");

    public static string Recipe(string name) => Path.Combine(Tool.Repository, "recipes", name + ".csx");

    public string PathOf(string name) => Path.Combine(Folder, "data", name);

    public void Dispose() => Tool.Dispose();
}
