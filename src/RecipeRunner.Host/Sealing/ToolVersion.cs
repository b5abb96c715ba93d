namespace RecipeRunner.Host.Sealing;

/// <summary>The version of the tool, as studies name it.</summary>
public static class ToolVersion
{
    /// <summary>Major, minor, patch.</summary>
    public static string Text { get; } = typeof(ToolVersion).Assembly.GetName().Version!.ToString(3);
}
