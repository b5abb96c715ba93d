namespace RecipeRunner.Steps.Emitting;

/// <summary>Names of emitted files.</summary>
internal static class EmittedName
{
    /// <summary>The name without an ending that the step adds itself, in whatever case it is written.</summary>
    public static string Without(string name, string ending) =>
        name.EndsWith(ending, StringComparison.OrdinalIgnoreCase) ? name[..^ending.Length] : name;
}
