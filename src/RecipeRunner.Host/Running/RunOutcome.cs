using NodaTime;

namespace RecipeRunner.Host.Running;

/// <summary>A finished run.</summary>
/// <param name="StudyFolder">Where the sealed study lies.</param>
/// <param name="Record">What was done.</param>
/// <param name="FileCount">The files of the study, the seal's own included.</param>
/// <param name="Elapsed">How long it took.</param>
public sealed record RunOutcome(string StudyFolder, StudyRecord Record, int FileCount, Duration Elapsed);
