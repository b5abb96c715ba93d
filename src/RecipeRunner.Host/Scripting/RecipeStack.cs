using System.Diagnostics;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>Finds the recipe line that is being run, or that threw, from the stack.</summary>
internal static class RecipeStack
{
    /// <summary>The innermost recipe line of the running thread.</summary>
    public static RecipeLine Current() => Find(new StackTrace(fNeedFileInfo: true)) ?? new RecipeLine("", 0, 0);

    /// <summary>The innermost recipe line that an exception passed through; null where it passed none.</summary>
    public static RecipeLine? LineOf(Exception failure) =>
        Find(new StackTrace(failure, fNeedFileInfo: true)) is { Line: > 0 } line ? line
        : failure.InnerException is { } inner ? LineOf(inner)
        : null;

    private static RecipeLine? Find(StackTrace stack)
    {
        foreach (var frame in stack.GetFrames())
        {
            var inRecipe = string.Equals(
                frame.GetMethod()?.Module.Assembly.GetName().Name,
                "recipe",
                StringComparison.Ordinal
            );
            if (inRecipe && frame.GetFileLineNumber() > 0)
            {
                return new RecipeLine(frame.GetFileName()!, frame.GetFileLineNumber(), frame.GetFileColumnNumber());
            }
        }

        return null;
    }
}
