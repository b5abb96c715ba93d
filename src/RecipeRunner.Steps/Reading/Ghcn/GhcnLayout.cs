using RecipeRunner.Model.Rain;

namespace RecipeRunner.Steps.Reading.Ghcn;

/// <summary>
/// Elements and flags of GHCN-Daily that concern rain (source: NOAA GHCN-Daily readme.txt, section III).
/// </summary>
internal static class GhcnLayout
{
    /// <summary>Precipitation of the day, tenths of a millimetre.</summary>
    public const string Daily = "PRCP";

    /// <summary>Precipitation of several days up to this one, tenths of a millimetre.</summary>
    public const string SeveralDays = "MDPR";

    /// <summary>The number of days in <see cref="SeveralDays"/>.</summary>
    public const string DayCount = "DAPR";

    /// <summary>What stands where there is no value.</summary>
    public const int Missing = -9999;

    /// <summary>The length of a station's id.</summary>
    public const int IdLength = 11;

    /// <summary>True for the three elements that are read.</summary>
    public static bool IsRain(ReadOnlySpan<char> element) => element is Daily or SeveralDays or DayCount;

    /// <summary>The measurement flag of a trace.</summary>
    public const char TraceFlag = 'T';

    /// <summary>The measurement flag of a value that was missing and is presumed zero.</summary>
    public const char PresumedZeroFlag = 'P';

    /// <summary>A blank flag: nothing to say.</summary>
    public const char Blank = ' ';

    /// <summary>What a value is worth by its flags.</summary>
    /// <param name="measurement">The measurement flag.</param>
    /// <param name="quality">The quality flag; any but blank is a failed check.</param>
    public static RecordStatus StatusOf(char measurement, char quality) =>
        quality != Blank ? RecordStatus.Failed
        : measurement == TraceFlag ? RecordStatus.Trace
        : measurement == PresumedZeroFlag ? RecordStatus.Estimated
        : RecordStatus.Observed;
}

/// <summary>One value of one day.</summary>
/// <param name="Value">As the file writes it.</param>
/// <param name="Measurement">The measurement flag.</param>
/// <param name="Quality">The quality flag.</param>
internal readonly record struct GhcnValue(int Value, char Measurement, char Quality);
