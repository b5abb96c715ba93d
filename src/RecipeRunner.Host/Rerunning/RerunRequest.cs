namespace RecipeRunner.Host.Rerunning;

/// <summary>What a person asks for when they rerun a study.</summary>
/// <param name="Folder">The study's folder.</param>
/// <param name="DataFolder">The folder that has all of the study's inputs, where the study lists some without holding them.</param>
/// <param name="Signers">A list of allowed signers, one of whom must have signed the study; null where nobody needs to have.</param>
public sealed record RerunRequest(string Folder, string? DataFolder = null, string? Signers = null);
