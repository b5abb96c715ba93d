using System.Runtime.InteropServices;

namespace RecipeRunner.Model.Rain;

/// <summary>Mean areal rainfall of one basin over one step, with what it rests on.</summary>
[StructLayout(LayoutKind.Auto)]
public readonly record struct ArealValue
{
    private readonly double depth;
    private readonly double nearest;

    /// <summary>Creates the value.</summary>
    /// <param name="depthMillimetres">The depth; null where withheld, which is not zero.</param>
    /// <param name="status">Whether the value was given.</param>
    /// <param name="gaugesReporting">Gauges of the full network's weights that reported.</param>
    /// <param name="gaugesEstimated">How many of them gave an estimated depth.</param>
    /// <param name="weightReporting">The share of the basin's weight in the full network that reported, 0 to 1.</param>
    /// <param name="nearestReportingMetres">Distance from the basin (0 inside) to the nearest reporting gauge; null where none reported.</param>
    public ArealValue(
        double? depthMillimetres,
        ArealStatus status,
        int gaugesReporting,
        int gaugesEstimated,
        double weightReporting,
        double? nearestReportingMetres
    )
    {
        depth = depthMillimetres ?? double.NaN;
        Status = status;
        GaugesReporting = gaugesReporting;
        GaugesEstimated = gaugesEstimated;
        WeightReporting = weightReporting;
        nearest = nearestReportingMetres ?? double.NaN;
    }

    /// <summary>The depth; null where withheld, which is not zero.</summary>
    public double? DepthMillimetres => double.IsNaN(depth) ? null : depth;

    /// <summary>Whether the value was given.</summary>
    public ArealStatus Status { get; }

    /// <summary>Gauges of the full network's weights that reported.</summary>
    public int GaugesReporting { get; }

    /// <summary>How many of them gave an estimated depth.</summary>
    public int GaugesEstimated { get; }

    /// <summary>The share of the basin's weight in the full network that reported, 0 to 1.</summary>
    public double WeightReporting { get; }

    /// <summary>Distance from the basin (0 inside) to the nearest reporting gauge; null where none reported.</summary>
    public double? NearestReportingMetres => double.IsNaN(nearest) ? null : nearest;
}
