namespace RecipeRunner.Model.Rain;

/// <summary>Whether an areal value was given.</summary>
public enum ArealStatus : byte
{
    /// <summary>Every gauge with weight in the full network reported.</summary>
    Complete,

    /// <summary>Some were missing; the value follows from those that reported.</summary>
    Partial,

    /// <summary>No value: too little reported.</summary>
    Withheld,
}
