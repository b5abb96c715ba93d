namespace RecipeRunner.Model.Space;

/// <summary>An area for which rainfall is wanted.</summary>
/// <param name="Id">Its unique key in its layer.</param>
/// <param name="Name">Its name for people; the id where the source has none.</param>
/// <param name="Shape">Its valid shape.</param>
public sealed record Basin(string Id, string Name, Region Shape);
