namespace RecipeRunner.Model.Rain;

/// <summary>What is known of one value of a record. Missing is not zero.</summary>
public enum RecordStatus : byte
{
    /// <summary>The gauge reported nothing.</summary>
    Missing,

    /// <summary>The gauge reported this depth.</summary>
    Observed,

    /// <summary>The gauge reported rain too little to measure; the depth counts as zero.</summary>
    Trace,

    /// <summary>The depth was not read at the gauge in this step but worked out from others, or marked so by its source.</summary>
    Estimated,

    /// <summary>The gauge caught rain in this step but was read only later, for several steps at once (<see cref="Accumulation"/>).</summary>
    Accumulated,

    /// <summary>The gauge reported this depth, and it failed a check of quality; it is kept but not used.</summary>
    Failed,
}

/// <summary>What statuses mean for those who use values.</summary>
public static class RecordStatuses
{
    /// <summary>True where the depth of this very step can be used: observed, trace or estimated.</summary>
    /// <param name="status">What is known of the value.</param>
    public static bool Reports(this RecordStatus status) =>
        status is RecordStatus.Observed or RecordStatus.Trace or RecordStatus.Estimated;

    /// <summary>The status as tables write it, such as <c>observed</c>.</summary>
    /// <param name="status">What is known of the value.</param>
    public static string Word(this RecordStatus status) =>
        status switch
        {
            RecordStatus.Missing => "missing",
            RecordStatus.Observed => "observed",
            RecordStatus.Trace => "trace",
            RecordStatus.Estimated => "estimated",
            RecordStatus.Accumulated => "accumulated",
            _ => "failed quality",
        };
}
