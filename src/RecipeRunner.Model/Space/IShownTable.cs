namespace RecipeRunner.Model.Space;

/// <summary>A table that answers a question of its own, so that the study's page shows it under a heading.</summary>
public interface IShownTable : ITabular
{
    /// <summary>What the table answers, in a few words.</summary>
    string Heading { get; }
}
