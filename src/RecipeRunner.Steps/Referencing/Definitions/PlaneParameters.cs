using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// The parameters of a projection as its definition names them, turned into degrees from Greenwich and metres as they are
/// asked for. A parameter that is missing, given twice or left over is refused: the projection library would take it as 0.
/// </summary>
internal sealed class PlaneParameters
{
    private readonly string method;
    private readonly Place where;
    private readonly string mend;
    private readonly Dictionary<string, double> values = new(StringComparer.OrdinalIgnoreCase);
    private readonly HashSet<string> asked = new(StringComparer.OrdinalIgnoreCase);

    /// <summary>Takes the parameters of a projected system's node.</summary>
    /// <param name="system">The PROJCS node.</param>
    /// <param name="method">The method's name, for messages.</param>
    /// <param name="where">The place, for messages.</param>
    /// <param name="mend">What to do where they are not understood.</param>
    /// <exception cref="RefusedException">A parameter has no number or comes twice.</exception>
    public PlaneParameters(WktNode system, string method, Place where, string mend)
    {
        this.mend = mend;
        this.method = method;
        this.where = where;
        foreach (var node in system.ChildrenOf("PARAMETER"))
        {
            if (node.Numbers.Count != 1 || !values.TryAdd(node.Name, node.Numbers[0]))
            {
                throw Refuse($"gives its parameter {node.Name} twice or without a number");
            }
        }
    }

    /// <summary>Degrees in one of the definition's angles.</summary>
    public required double DegreesPerUnit { get; init; }

    /// <summary>Degrees from Greenwich to the definition's meridian.</summary>
    public required double MeridianDegrees { get; init; }

    /// <summary>Metres in one of the definition's lengths.</summary>
    public required double MetresPerUnit { get; init; }

    /// <summary>True where one of the names is given.</summary>
    public bool Has(params ReadOnlySpan<string> names) => Given(names) is not null;

    /// <summary>An angle in degrees.</summary>
    /// <param name="names">Its names in the dialects, one of which must be given.</param>
    public double Angle(params ReadOnlySpan<string> names) => Required(names) * DegreesPerUnit;

    /// <summary>A direction in degrees, -180 to 180.</summary>
    public double Direction(params ReadOnlySpan<string> names) => Degrees.Wrap(Angle(names), 0);

    /// <summary>A longitude in degrees from Greenwich, -180 to 180.</summary>
    public double Longitude(params ReadOnlySpan<string> names) => Degrees.Wrap(Angle(names) + MeridianDegrees, 0);

    /// <summary>A length in metres.</summary>
    public double Length(params ReadOnlySpan<string> names) => Required(names) * MetresPerUnit;

    /// <summary>A ratio.</summary>
    public double Ratio(params ReadOnlySpan<string> names) => Required(names);

    /// <summary>A number that has to be a certain one where it is given at all.</summary>
    /// <exception cref="RefusedException">It is another.</exception>
    public void Expect(string name, double expected)
    {
        if (Given(name) is { } given && given != expected)
        {
            throw Refuse(FormattableString.Invariant($"has {name} {given}, where only {expected} is understood"));
        }
    }

    /// <summary>Refuses parameters that nobody asked for.</summary>
    /// <exception cref="RefusedException">There is one.</exception>
    public void RefuseLeftOver()
    {
        if (values.Keys.FirstOrDefault(name => !asked.Contains(name)) is { } left)
        {
            throw Refuse($"gives a parameter {left}, which is unknown for this method");
        }
    }

    /// <summary>A refusal that names the method.</summary>
    public RefusedException Refuse(string why) =>
        new(Finding.Error("RR0311", where, $"The projection {method} {why}.", mend));

    private double Required(ReadOnlySpan<string> names) =>
        Given(names) ?? throw Refuse($"lacks its parameter {names[0]}");

    private double? Given(params ReadOnlySpan<string> names)
    {
        foreach (var name in names)
        {
            if (values.TryGetValue(name, out var value))
            {
                asked.Add(name);
                return value;
            }
        }

        return null;
    }
}
