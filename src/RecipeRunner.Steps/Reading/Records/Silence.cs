namespace RecipeRunner.Steps.Reading.Records;

/// <summary>A run of steps at which a gauge reported nothing.</summary>
/// <param name="Gauge">Index of the gauge.</param>
/// <param name="First">Index of the first step.</param>
/// <param name="Length">How many steps.</param>
internal readonly record struct Silence(int Gauge, int First, int Length);
