using System.Collections.Immutable;

namespace RecipeRunner.Host.Catalogue;

/// <summary>One thing that a verb takes.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Meaning">What it is.</param>
/// <param name="Choices">What can be given, where that is a short list; empty otherwise.</param>
public sealed record VerbParameter(string Name, string Meaning, ImmutableArray<string> Choices);

/// <summary>A verb that a recipe can say, as its doc comments tell it.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Room">The part of the work that it belongs to, such as <c>Reading</c>.</param>
/// <param name="Signature">How it is written.</param>
/// <param name="Summary">What it does.</param>
/// <param name="Parameters">What it takes.</param>
/// <param name="Source">The published source of its method; empty where there is none.</param>
/// <param name="Example">A line of a recipe; empty where there is none.</param>
public sealed record VerbEntry(
    string Name,
    string Room,
    string Signature,
    string Summary,
    ImmutableArray<VerbParameter> Parameters,
    string Source,
    string Example
);
