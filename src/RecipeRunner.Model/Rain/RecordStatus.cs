namespace RecipeRunner.Model.Rain;

/// <summary>What is known of one value of a record. Missing is not zero.</summary>
public enum RecordStatus : byte
{
    /// <summary>The gauge reported nothing.</summary>
    Missing,

    /// <summary>The gauge reported this depth.</summary>
    Observed,
}
