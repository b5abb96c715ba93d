using System.Collections.Immutable;

namespace RecipeRunner.Model.Rain;

/// <summary>What one gauge gave to one areal value.</summary>
/// <param name="Gauge">Its id.</param>
/// <param name="DepthMillimetres">Its depth at that step.</param>
/// <param name="Status">What is known of that depth.</param>
/// <param name="DistanceMetres">Its distance from the basin, 0 inside.</param>
/// <param name="AreaSquareMetres">The part of the basin that it speaks for.</param>
/// <param name="Weight">Its weight at that step; the weights of a value sum to 1.</param>
public readonly record struct GaugeShare(
    string Gauge,
    double DepthMillimetres,
    RecordStatus Status,
    double DistanceMetres,
    double AreaSquareMetres,
    double Weight
)
{
    /// <summary>Weight times depth.</summary>
    public double ProductMillimetres => Weight * DepthMillimetres;
}

/// <summary>A gauge with weight in the full network that gave nothing to one areal value.</summary>
/// <param name="Gauge">Its id.</param>
/// <param name="Status">Why: missing, accumulated or failed.</param>
/// <param name="AreaSquareMetres">The part of the basin that it speaks for while all gauges report.</param>
/// <param name="Weight">Its weight while all gauges report.</param>
public readonly record struct SilentShare(string Gauge, RecordStatus Status, double AreaSquareMetres, double Weight);

/// <summary>How one areal value came about, gauge by gauge, so that it can be checked by hand.</summary>
/// <param name="Shares">The gauges that it was made of, in the network's order; none where it was withheld.</param>
/// <param name="Silent">The gauges with weight in the full network that reported nothing that can be used, in the same order.</param>
public sealed record ArealAccount(ImmutableArray<GaugeShare> Shares, ImmutableArray<SilentShare> Silent);
