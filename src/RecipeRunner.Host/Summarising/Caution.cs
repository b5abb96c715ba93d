namespace RecipeRunner.Host.Summarising;

/// <summary>The caution that every study carries.</summary>
public static class Caution
{
    /// <summary>The words.</summary>
    public const string Text =
        "These figures were computed from the records and boundaries listed here, with the assumptions listed here. They are "
        + "no substitute for local codes and standards or for the judgement of a licensed professional. Do not use them for "
        + "the design or operation of dams, drainage or flood protection without such review.";
}
