using System.Globalization;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>A problem with the recipe line that it arises from.</summary>
/// <param name="Problem">What is wrong, where in the data, and the mend.</param>
/// <param name="Line">The recipe line; null where it is no line's fault.</param>
/// <param name="Source">The text of that line; empty where unknown.</param>
/// <param name="Length">How many characters of the line, from its column, are meant; 0 where unknown.</param>
public sealed record RecipeProblem(Finding Problem, RecipeLine? Line, string Source, int Length)
{
    /// <summary>The problem that a compiler's diagnostic tells of.</summary>
    internal static RecipeProblem Of(Diagnostic diagnostic, RecipeText recipe, CSharpCompilation compilation)
    {
        var finding = Finding.Error(
            diagnostic.Id,
            new Place(),
            diagnostic.GetMessage(CultureInfo.InvariantCulture).TrimEnd('.') + ".",
            CompilerMends.For(diagnostic, compilation)
        );
        if (diagnostic.Location.SourceTree is not { } tree)
        {
            return new RecipeProblem(finding, null, "", 0);
        }

        var span = diagnostic.Location.GetLineSpan();
        var start = span.StartLinePosition;
        var line = tree.GetText().Lines[start.Line].ToString();
        var end = span.EndLinePosition.Line == start.Line ? span.EndLinePosition.Character : line.Length;
        var place = new RecipeLine(recipe.ShownFolder + span.Path, start.Line + 1, start.Character + 1);
        return new RecipeProblem(finding, place, line, Math.Max(1, end - start.Character));
    }
}
