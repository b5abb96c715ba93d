using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using RecipeRunner.Numerics.Predicates;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// Carries places from one reference system to another: first to degrees from Greenwich, then to the target. Geographic
/// places are degrees of longitude and latitude, projected ones metres in the order of the grid's axes (east, north; a few
/// registered grids point west, south), whatever the system's own unit. Safe for use by several threads.
/// </summary>
public sealed class GridTransform
{
    private readonly KnownSystem from;
    private readonly KnownSystem to;

    private GridTransform(KnownSystem from, KnownSystem to, DatumOperation operation)
    {
        this.from = from;
        this.to = to;
        Operation = operation;
    }

    /// <summary>How the datums were dealt with.</summary>
    public DatumOperation Operation { get; }

    /// <summary>The system that places come from.</summary>
    public ReferenceSystem From => from.Facts;

    /// <summary>The system that places go to.</summary>
    public ReferenceSystem To => to.Facts;

    /// <summary>True where both are the same system, so that places stay but for the lattice.</summary>
    internal bool IsIdentity => from.Facts.IsSameAs(to.Facts);

    /// <summary>The checked source.</summary>
    internal KnownSystem Source => from;

    /// <summary>The checked target.</summary>
    internal KnownSystem Target => to;

    /// <summary>Prepares the way between two systems.</summary>
    /// <param name="from">The system of the places given.</param>
    /// <param name="to">The system wanted.</param>
    /// <param name="datum">What is accepted between two datums; <see cref="DatumChoice.Published"/> where null.</param>
    /// <exception cref="RefusedException">
    /// RR0303, RR0304, RR0310 to RR0312: a system cannot be used. RR0320: no accepted way leads between the datums.
    /// </exception>
    public static GridTransform Between(ReferenceSystem from, ReferenceSystem to, DatumChoice? datum = null)
    {
        var (source, target) = (KnownSystem.Of(from), KnownSystem.Of(to));
        return new GridTransform(source, target, DatumRule.Decide(source, target, datum ?? DatumChoice.Published));
    }

    /// <summary>Carries places; projected results lie on the lattice of 2^-16 m.</summary>
    /// <param name="places">Finite; latitudes within ±90.</param>
    /// <param name="results">Takes as many.</param>
    /// <exception cref="RefusedException">RR0330: a place is none. RR0333: a place has no image. The first is named.</exception>
    public void Apply(ReadOnlySpan<Location> places, Span<Location> results)
    {
        var degrees = new Location[places.Length];
        ToDegrees(places, degrees, new Place());
        FromDegrees(places, degrees, results, new Place());
    }

    /// <summary>The first half of the way: longitudes from Greenwich and latitudes, on the source's datum.</summary>
    /// <param name="places">Places of the source.</param>
    /// <param name="degrees">Takes as many.</param>
    /// <param name="where">What the places are part of, for messages.</param>
    internal void ToDegrees(ReadOnlySpan<Location> places, Span<Location> degrees, Place where)
    {
        foreach (var place in places)
        {
            if (!IsPlace(place))
            {
                throw Refuse(
                    "RR0330",
                    where,
                    place,
                    NoPlaceReason(place),
                    "Check the coordinates; x is longitude or east."
                );
            }
        }

        if (from.Projection is { } projection)
        {
            var failed = projection.ToDegrees(places, degrees);
            if (failed >= 0)
            {
                throw NoImage(where, places[failed], from);
            }

            return;
        }

        for (var i = 0; i < places.Length; i++)
        {
            degrees[i] = new Location(places[i].X + from.Definition.MeridianDegrees, places[i].Y);
        }
    }

    /// <summary>The second half of the way.</summary>
    /// <param name="places">The places of the source that the degrees stem from; taken over where both systems are one.</param>
    /// <param name="degrees">What the first half gave.</param>
    /// <param name="results">Takes as many.</param>
    /// <param name="where">What the places are part of, for messages.</param>
    internal void FromDegrees(
        ReadOnlySpan<Location> places,
        ReadOnlySpan<Location> degrees,
        Span<Location> results,
        Place where
    )
    {
        if (IsIdentity)
        {
            places.CopyTo(results);
        }
        else if (to.Projection is { } projection)
        {
            var failed = projection.ToPlane(degrees, results);
            if (failed >= 0)
            {
                throw NoImage(where, degrees[failed], to);
            }
        }
        else
        {
            for (var i = 0; i < degrees.Length; i++)
            {
                results[i] = new Location(Degrees.Wrap(degrees[i].X - to.Definition.MeridianDegrees, 0), degrees[i].Y);
            }
        }

        if (to.Projection is not null)
        {
            for (var i = 0; i < results.Length; i++)
            {
                results[i] = OnLattice(results[i]) ?? throw NoImage(where, degrees[i], to);
            }
        }
    }

    private static Location? OnLattice(Location place) =>
        Math.Abs(place.X) <= Lattice.ReachMetres && Math.Abs(place.Y) <= Lattice.ReachMetres
            ? new Location(Lattice.Snap(place.X), Lattice.Snap(place.Y))
            : null;

    private bool IsPlace(Location place) =>
        double.IsFinite(place.X)
        && double.IsFinite(place.Y)
        && (from.Projection is not null || (Math.Abs(place.Y) <= 90 && Math.Abs(place.X) <= 360));

    private string NoPlaceReason(Location place) =>
        !double.IsFinite(place.X) || !double.IsFinite(place.Y)
            ? "has a coordinate that is not a number"
            : $"is no longitude and latitude in degrees, as {from.Facts.Label} has them";

    private static RefusedException NoImage(Place where, Location place, KnownSystem system) =>
        Refuse(
            "RR0333",
            where,
            place,
            $"lies where {system.Facts.Label} has no coordinates",
            $"{system.Facts.Label} is made for {system.Area}. Check the coordinates and the reference system."
        );

    private static RefusedException Refuse(string code, Place where, Location place, string why, string mend) =>
        new(Finding.Error(code, where, FormattableString.Invariant($"The place {place.X}, {place.Y} {why}."), mend));
}
