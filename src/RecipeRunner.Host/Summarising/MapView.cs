using System.Globalization;
using RecipeRunner.Model.Space;

namespace RecipeRunner.Host.Summarising;

/// <summary>Places of the working grid on a sheet: east to the right, north up, one scale both ways.</summary>
internal sealed class MapView
{
    private readonly Bounds bounds;
    private readonly double scale;

    /// <summary>A view that shows a rectangle on a sheet of the given width.</summary>
    public MapView(Bounds shown, double width)
    {
        var largest = Math.Max(shown.Width, shown.Height);
        bounds = shown.Grow(Math.Max(1, 0.06 * largest));
        scale = width / Math.Max(bounds.Width, bounds.Height / 1.2);
        Width = bounds.Width * scale;
        Height = bounds.Height * scale;
    }

    /// <summary>Width of the sheet.</summary>
    public double Width { get; }

    /// <summary>Height of the sheet.</summary>
    public double Height { get; }

    /// <summary>Metres of the working grid in one unit of the sheet.</summary>
    public double MetresPerUnit => 1 / scale;

    /// <summary>True where the sheet shows the place.</summary>
    public bool Shows(Location place) =>
        place.X >= bounds.West && place.X <= bounds.East && place.Y >= bounds.South && place.Y <= bounds.North;

    /// <summary>A place on the sheet.</summary>
    public (double X, double Y) On(Location place) =>
        ((place.X - bounds.West) * scale, (bounds.North - place.Y) * scale);

    /// <summary>The path data of a region, to a tenth of a unit; vertices that fall together are drawn once.</summary>
    public string Path(Region region) => string.Concat(region.Rings.Select(RingPath));

    /// <summary>A number as SVG writes it.</summary>
    public static string Text(double value) =>
        (Math.Round(value, 1) + 0.0).ToString("0.#", CultureInfo.InvariantCulture);

    private string RingPath(Ring ring)
    {
        var points = new List<string>(ring.Vertices.Length);
        foreach (var vertex in ring.Vertices)
        {
            var (x, y) = On(vertex);
            var point = $"{Text(x)} {Text(y)}";
            if (points.Count == 0 || !string.Equals(points[^1], point, StringComparison.Ordinal))
            {
                points.Add(point);
            }
        }

        return $"M{string.Join('L', points)}Z";
    }
}
