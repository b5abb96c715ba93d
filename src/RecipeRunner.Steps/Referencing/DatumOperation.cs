namespace RecipeRunner.Steps.Referencing;

/// <summary>How coordinates got from one datum to another.</summary>
/// <param name="Code">The registry's code or codes, such as <c>EPSG:1188</c>; empty where no operation took place.</param>
/// <param name="Text">A sentence for the journal, the same on every machine.</param>
/// <param name="AccuracyMetres">
/// As the registry states it, added up over a chain; 0 within one datum; null where coordinates were taken as they are.
/// </param>
/// <param name="IsTakenAsIs">True where a datum was disregarded because the recipe accepted it.</param>
public sealed record DatumOperation(string Code, string Text, double? AccuracyMetres, bool IsTakenAsIs);
