using System.Collections.Immutable;
using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.Emit;
using Microsoft.CodeAnalysis.Text;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Scripting;

/// <summary>Compiles a recipe, a C# script, to an image in memory with the lines of its source.</summary>
public static class RecipeCompiler
{
    private static readonly ImmutableArray<string> Platform =
    [
        "System.Private.CoreLib",
        "System.Runtime",
        "System.Linq",
        "System.Collections",
        "System.Collections.Immutable",
        "netstandard",
    ];

    /// <summary>Compiles.</summary>
    /// <param name="recipe">The recipe.</param>
    /// <param name="language">What it may say.</param>
    /// <param name="cancellation">Stops the compiler.</param>
    /// <exception cref="RefusedException">The recipe does not compile; one problem for each of the compiler's errors.</exception>
    public static CompiledRecipe Compile(RecipeText recipe, RecipeLanguage language, CancellationToken cancellation)
    {
        var loads = new LoadedTexts(recipe.Folder);
        var compilation = Describe(recipe, language, loads, cancellation);
        using var image = new MemoryStream();
        using var lines = new MemoryStream();
        var options = new EmitOptions(debugInformationFormat: DebugInformationFormat.PortablePdb);
        var result = compilation.Emit(image, lines, options: options, cancellationToken: cancellation);
        ThrowWhereRefused(result.Diagnostics, recipe, compilation);
        ThrowWhereEmpty(recipe, compilation);
        var entry = compilation.GetEntryPoint(cancellation)!;
        return new CompiledRecipe(
            recipe,
            loads.All,
            image.ToArray(),
            lines.ToArray(),
            entry.ContainingType.MetadataName,
            entry.MetadataName
        );
    }

    private static CSharpCompilation Describe(
        RecipeText recipe,
        RecipeLanguage language,
        LoadedTexts loads,
        CancellationToken cancellation
    )
    {
        var tree = CSharpSyntaxTree.ParseText(
            SourceText.From(recipe.Text, System.Text.Encoding.UTF8),
            new CSharpParseOptions(LanguageVersion.CSharp14, DocumentationMode.None, SourceCodeKind.Script),
            recipe.FileName,
            cancellation
        );
        var options = new CSharpCompilationOptions(
            OutputKind.DynamicallyLinkedLibrary,
            scriptClassName: "Recipe",
            usings: language.Imports,
            optimizationLevel: OptimizationLevel.Debug,
            allowUnsafe: false,
            deterministic: true,
            sourceReferenceResolver: loads,
            nullableContextOptions: NullableContextOptions.Disable,
            metadataImportOptions: MetadataImportOptions.Public
        );
        return CSharpCompilation.CreateScriptCompilation(
            "recipe",
            tree,
            ReferencesFor(language),
            options,
            globalsType: language.VerbsType
        );
    }

    private static IEnumerable<MetadataReference> ReferencesFor(RecipeLanguage language)
    {
        var trusted = ((string)AppContext.GetData("TRUSTED_PLATFORM_ASSEMBLIES")!).Split(Path.PathSeparator);
        var platform = trusted.Where(path =>
            Platform.Contains(Path.GetFileNameWithoutExtension(path), StringComparer.Ordinal)
        );
        var libraries = language
            .StepLibraries.Append(language.VerbsType.Assembly)
            .Append(typeof(IStudy).Assembly)
            .Append(typeof(NodaTime.LocalDate).Assembly)
            .Select(assembly => assembly.Location);
        return platform
            .Concat(libraries)
            .Distinct(StringComparer.Ordinal)
            .Select(path => MetadataReference.CreateFromFile(path));
    }

    private static void ThrowWhereEmpty(RecipeText recipe, CSharpCompilation compilation)
    {
        if (!compilation.SyntaxTrees.Any(tree => tree.GetRoot().ChildNodes().Any()))
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0103",
                    new Place(recipe.ShownFolder + recipe.FileName),
                    "The recipe says nothing to do.",
                    "A recipe reads data, weighs, and emits; `recipe-runner steps` lists what it can say."
                )
            );
        }
    }

    private static void ThrowWhereRefused(
        ImmutableArray<Diagnostic> diagnostics,
        RecipeText recipe,
        CSharpCompilation compilation
    )
    {
        var problems = diagnostics
            .Where(diagnostic => diagnostic.Severity == DiagnosticSeverity.Error)
            .OrderBy(diagnostic => diagnostic.Location.SourceSpan.Start)
            .Select(diagnostic => RecipeProblem.Of(diagnostic, recipe, compilation))
            .Take(Problems.Limit)
            .ToImmutableArray();
        if (!problems.IsEmpty)
        {
            throw new RecipeException(problems);
        }
    }
}
