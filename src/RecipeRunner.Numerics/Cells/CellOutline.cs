namespace RecipeRunner.Numerics.Cells;

/// <summary>The polygon of a cell within a frame: convex, counter-clockwise, the first point not repeated; empty when the cell misses the frame.</summary>
/// <param name="X">Eastings, in metres.</param>
/// <param name="Y">Northings, in metres, as many.</param>
public sealed record CellOutline(double[] X, double[] Y)
{
    /// <summary>Whether the cell misses the frame.</summary>
    public bool IsEmpty => X.Length == 0;

    /// <summary>Area in square metres.</summary>
    public double Area
    {
        get
        {
            double twice = 0;
            for (int i = 2; i < X.Length; i++)
            {
                twice += ((X[i - 1] - X[0]) * (Y[i] - Y[0])) - ((X[i] - X[0]) * (Y[i - 1] - Y[0]));
            }

            return twice / 2;
        }
    }
}
