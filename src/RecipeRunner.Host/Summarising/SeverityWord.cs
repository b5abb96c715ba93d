using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Summarising;

/// <summary>The word for a severity.</summary>
public static class SeverityWord
{
    /// <summary>One lower-case word.</summary>
    public static string Of(Severity severity) =>
        severity switch
        {
            Severity.Error => "error",
            Severity.Caution => "caution",
            _ => "notice",
        };
}
