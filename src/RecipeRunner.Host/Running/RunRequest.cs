using System.Collections.Immutable;

namespace RecipeRunner.Host.Running;

/// <summary>What a person asks for when they run a recipe.</summary>
/// <param name="RecipePath">The recipe file.</param>
/// <param name="DataFolder">The folder that the recipe's file names are relative to; null for the recipe's own.</param>
/// <param name="StudyFolder">The study to leave; null for the recipe's name with <c>.study</c> in the current folder.</param>
/// <param name="Settings">Settings given by name.</param>
/// <param name="Replace">True where an existing study of that name may be replaced.</param>
/// <param name="ListInputsAbove">Inputs of more bytes than this are listed by digest and size, not copied; null to copy all.</param>
/// <param name="SigningKey">The SSH key that signs the seal; null to leave it unsigned.</param>
public sealed record RunRequest(
    string RecipePath,
    string? DataFolder,
    string? StudyFolder,
    ImmutableSortedDictionary<string, string> Settings,
    bool Replace,
    long? ListInputsAbove = null,
    string? SigningKey = null
);
