using NodaTime;
using RecipeRunner.Model.Rain;

namespace RecipeRunner.Host.Comparing;

/// <summary>Areal rainfall looked up by a basin's id and a step's label, as two series number them differently.</summary>
internal sealed class NamedSeries(ArealRainfall areal)
{
    private readonly Dictionary<string, int> basins = areal
        .Basins.Basins.Select((basin, index) => (basin.Id, index))
        .ToDictionary(pair => pair.Id, pair => pair.index, StringComparer.Ordinal);

    /// <summary>How many values are given.</summary>
    public int GivenCount => areal.Count - areal.WithheldCount;

    /// <summary>A value; null where the series withholds it or has none.</summary>
    public double? At(string basin, LocalDateTime label) =>
        basins.TryGetValue(basin, out var index) && areal.Times.IndexOf(label) is { } step
            ? areal.At(step, index).DepthMillimetres
            : null;
}
