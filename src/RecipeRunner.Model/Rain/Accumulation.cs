namespace RecipeRunner.Model.Rain;

/// <summary>A depth that one gauge caught over several steps and that was read once, at the end of the last.</summary>
/// <param name="Gauge">Index of the gauge.</param>
/// <param name="FirstStep">Index of the first step.</param>
/// <param name="LastStep">Index of the last step, at which it was read; after the first.</param>
/// <param name="DepthMillimetres">The depth over all of them.</param>
public readonly record struct Accumulation(int Gauge, int FirstStep, int LastStep, double DepthMillimetres);
