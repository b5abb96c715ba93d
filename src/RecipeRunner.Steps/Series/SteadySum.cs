namespace RecipeRunner.Steps.Series;

/// <summary>A running sum that carries what rounding drops (Neumaier 1974, doi:10.1002/zamm.19740540106).</summary>
internal struct SteadySum
{
    private double sum;
    private double carried;

    /// <summary>The sum so far.</summary>
    public readonly double Value => sum + carried;

    /// <summary>Adds a finite number.</summary>
    public void Add(double value)
    {
        var next = sum + value;
        carried += Math.Abs(sum) >= Math.Abs(value) ? sum - next + value : value - next + sum;
        sum = next;
    }
}
