using Microsoft.CodeAnalysis;
using Microsoft.CodeAnalysis.CSharp;
using Microsoft.CodeAnalysis.CSharp.Syntax;
using RecipeRunner.Model.Wording;

namespace RecipeRunner.Host.Scripting;

/// <summary>Says what to do about the compiler errors that recipe writers meet most.</summary>
internal static class CompilerMends
{
    /// <summary>The mend for a diagnostic; empty where there is nothing better to say than the compiler does.</summary>
    public static string For(Diagnostic diagnostic, CSharpCompilation compilation) =>
        diagnostic.Id switch
        {
            "CS0103" or "CS0117" or "CS1061" => NearNames(diagnostic, compilation),
            "CS1504" =>
                "A recipe loads only files in its own folder or below, by a relative path: #load \"common.csx\".",
            "CS0246" => "Is a name misspelt? `recipe-runner steps` lists what a recipe can say.",
            "CS1002" => "Each statement ends with a semicolon.",
            "CS1503" or "CS7036" or "CS1501" or "CS1739" =>
                "`recipe-runner steps NAME` shows what the verb takes, with an example.",
            _ => "",
        };

    private static string NearNames(Diagnostic diagnostic, CSharpCompilation compilation)
    {
        var root = diagnostic.Location.SourceTree!.GetRoot();
        if (root.FindNode(diagnostic.Location.SourceSpan, getInnermostNodeForTie: true) is not SimpleNameSyntax name)
        {
            return "";
        }

        var model = compilation.GetSemanticModel(diagnostic.Location.SourceTree);
        var candidates =
            name.Parent is MemberAccessExpressionSyntax access && access.Name == name
                ? MembersOf(access, model)
                : model.LookupSymbols(name.SpanStart);
        return NearWords.Mend(name.Identifier.ValueText, candidates.Select(symbol => symbol.Name));
    }

    private static IEnumerable<ISymbol> MembersOf(MemberAccessExpressionSyntax access, SemanticModel model)
    {
        var type =
            model.GetTypeInfo(access.Expression).Type ?? model.GetSymbolInfo(access.Expression).Symbol as ITypeSymbol;
        return type is null
            ? []
            : model.LookupSymbols(access.Name.SpanStart, type, includeReducedExtensionMethods: true);
    }
}
