using System.Collections.Immutable;
using System.Reflection;
using System.Runtime.ExceptionServices;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>A recipe that compiled.</summary>
public sealed class CompiledRecipe
{
    private readonly byte[] image;
    private readonly byte[] lines;
    private readonly string entryType;
    private readonly string entryMethod;

    internal CompiledRecipe(
        RecipeText recipe,
        ImmutableArray<LoadedText> loaded,
        byte[] image,
        byte[] lines,
        string entryType,
        string entryMethod
    )
    {
        Recipe = recipe;
        Loaded = loaded;
        this.image = image;
        this.lines = lines;
        this.entryType = entryType;
        this.entryMethod = entryMethod;
    }

    /// <summary>The recipe.</summary>
    public RecipeText Recipe { get; }

    /// <summary>The files that it loads.</summary>
    public ImmutableArray<LoadedText> Loaded { get; }

    /// <summary>Runs the recipe to its end.</summary>
    /// <param name="verbs">The top-level verbs of the study.</param>
    /// <param name="cancellation">Set when the run is to stop; steps see it too.</param>
    /// <exception cref="RecipeException">The recipe failed, or a step refused its input; with the recipe line.</exception>
    /// <exception cref="OperationCanceledException">The run was stopped.</exception>
    public void Run(object verbs, CancellationToken cancellation)
    {
        var entry = Assembly.Load(image, lines).GetType(entryType, throwOnError: true)!.GetMethod(entryMethod)!;
        try
        {
            var task = (Task<object>)entry.Invoke(null, [new object?[] { verbs, null }])!;
            task.GetAwaiter().GetResult();
        }
        catch (Exception failure)
            when (Unwrap(failure) is not OperationCanceledException || !cancellation.IsCancellationRequested)
        {
            throw Explain(Unwrap(failure));
        }
        catch (TargetInvocationException failure)
        {
            ExceptionDispatchInfo.Throw(failure.InnerException!);
        }
    }

    private static Exception Unwrap(Exception failure) =>
        failure is TargetInvocationException or TypeInitializationException or AggregateException
        && failure.InnerException is { } inner
            ? Unwrap(inner)
            : failure;

    private RecipeException Explain(Exception failure)
    {
        var line = RecipeStack.LineOf(failure);
        var problems = failure is RefusedException refused ? refused.Problems : [ProblemOf(failure)];
        return new RecipeException([.. problems.Select(problem => Locate(problem, line))], failure);
    }

    private static Finding ProblemOf(Exception failure) =>
        failure is IOException or UnauthorizedAccessException
            ? Finding.Error(
                "RR0704",
                new Place(),
                failure.Message,
                "Check that the folders can be read and written, and that the disk has room."
            )
            : Finding.Error(
                "RR0110",
                new Place(),
                $"The recipe failed: {failure.Message} ({failure.GetType().Name})",
                "Mend the line above, or what it is given."
            );

    private RecipeProblem Locate(Finding problem, RecipeLine? line)
    {
        if (line is not { } at)
        {
            return new RecipeProblem(problem, null, "", 0);
        }

        var source = SourceOf(at);
        var word = source
            .Skip(Math.Max(0, at.Column - 1))
            .TakeWhile(letter => char.IsLetterOrDigit(letter) || letter == '_')
            .Count();
        return new RecipeProblem(problem, at with { File = Recipe.ShownFolder + at.File }, source, word);
    }

    private string SourceOf(RecipeLine line)
    {
        var text = string.Equals(line.File, Recipe.FileName, StringComparison.Ordinal)
            ? Recipe.Text
            : Loaded.FirstOrDefault(file => string.Equals(file.Name, line.File, StringComparison.Ordinal))?.Text ?? "";
        return text.Split('\n').ElementAtOrDefault(line.Line - 1)?.TrimEnd('\r') ?? "";
    }
}
