using ProjNet.CoordinateSystems.Transformations;
using ProjNet.Geometries;
using RecipeRunner.Model.Space;

namespace RecipeRunner.Steps.Referencing;

/// <summary>
/// A projection between degrees from Greenwich and metres in the plane, on one ellipsoid. Safe for use by several threads.
/// </summary>
internal sealed class GridProjection
{
    private const double Step = 1e-5;
    private const double SeamDegrees = 2e-5;
    private const double GoodEnoughMetres = 1e-6;
    private const double WorstMetres = 0.001;
    private const int MostCorrections = 6;

    private readonly PlaneForm form;
    private readonly MathTransform toPlane;
    private readonly MathTransform toDegrees;

    /// <summary>Prepares the projection.</summary>
    public GridProjection(Ellipsoid ellipsoid, PlaneForm form)
    {
        this.form = form;
        (toPlane, toDegrees) = ProjectionLibrary.Build(ellipsoid, form);
    }

    /// <summary>Degrees to metres. Longitudes are wrapped to within 180 degrees of the central meridian first.</summary>
    /// <param name="degrees">Longitude from Greenwich and latitude.</param>
    /// <param name="metres">Takes as many places.</param>
    /// <returns>The index of the first place that has no image; -1 where all have one.</returns>
    public int ToPlane(ReadOnlySpan<Location> degrees, Span<Location> metres)
    {
        var work = new XY[degrees.Length];
        for (var i = 0; i < work.Length; i++)
        {
            work[i] = new XY(Degrees.Wrap(degrees[i].X, form.Longitude), degrees[i].Y);
        }

        Run(toPlane, work);
        var failed = -1;
        for (var i = work.Length - 1; i >= 0; i--)
        {
            metres[i] = IsOnSeam(degrees[i]) ? AcrossSeam(degrees[i]) : Turn(new Location(work[i].X, work[i].Y));
            failed = IsFinite(metres[i]) ? failed : i;
        }

        return failed;
    }

    /// <summary>
    /// Metres to degrees. The library's inverse is off by up to 12 mm in places; each place is corrected until
    /// the way there leads back to it within a micrometre.
    /// </summary>
    /// <param name="metres">Places in the plane.</param>
    /// <param name="degrees">Takes as many: longitude from Greenwich, -180 to 180, and latitude.</param>
    /// <returns>The index of the first place that the way there does not lead back to; -1 where all are confirmed.</returns>
    public int ToDegrees(ReadOnlySpan<Location> metres, Span<Location> degrees)
    {
        var work = new XY[metres.Length];
        for (var i = 0; i < work.Length; i++)
        {
            var turned = Turn(metres[i]);
            work[i] = new XY(turned.X, turned.Y);
        }

        Run(toDegrees, work);
        for (var i = 0; i < work.Length; i++)
        {
            if (Correct(new Location(work[i].X, work[i].Y), metres[i]) is not { } found)
            {
                return i;
            }

            degrees[i] = found;
        }

        return -1;
    }

    /// <summary>One place in the plane; not finite where there is none.</summary>
    public Location ToPlane(Location degrees) => IsOnSeam(degrees) ? AcrossSeam(degrees) : ToPlaneBesideSeam(degrees);

    /// <summary>The library throws at nothing.</summary>
    private static void Run(MathTransform transform, XY[] places)
    {
        if (places.Length > 0)
        {
            transform.Transform(places);
        }
    }

    private Location ToPlaneBesideSeam(Location degrees)
    {
        var (x, y) = toPlane.Transform(Degrees.Wrap(degrees.X, form.Longitude), degrees.Y);
        return Turn(new Location(x, y));
    }

    /// <summary>
    /// The library's oblique Mercator with an initial line due east (the Swiss and Hungarian grids) is off by kilometres
    /// within half a metre of the meridian of the centre.
    /// </summary>
    private bool IsOnSeam(Location degrees) =>
        form.Method == PlaneMethod.ObliqueMercator
        && Math.Abs(form.Azimuth) == 90
        && Math.Abs(Degrees.Wrap(degrees.X - form.Longitude, 0)) < SeamDegrees;

    /// <summary>Straight between two places beside the seam, 3 m apart: right to under a micrometre.</summary>
    private Location AcrossSeam(Location degrees)
    {
        var west = ToPlaneBesideSeam(new Location(form.Longitude - SeamDegrees, degrees.Y));
        var east = ToPlaneBesideSeam(new Location(form.Longitude + SeamDegrees, degrees.Y));
        var share = 0.5 + (Degrees.Wrap(degrees.X - form.Longitude, 0) / (2 * SeamDegrees));
        return new Location(west.X + (share * (east.X - west.X)), west.Y + (share * (east.Y - west.Y)));
    }

    /// <summary>Newton's method from a near guess; null where it does not arrive.</summary>
    private Location? Correct(Location guess, Location wanted)
    {
        var place = guess;
        var miss = double.NaN;
        for (var turn = 0; turn < MostCorrections && IsFinite(place) && Math.Abs(place.Y) <= 90; turn++)
        {
            var here = ToPlane(place);
            miss = here.DistanceTo(wanted);
            if (miss <= GoodEnoughMetres)
            {
                break;
            }

            var east = ToPlane(new Location(place.X + Step, place.Y));
            var north = ToPlane(new Location(place.X, place.Y + Step));
            var (dx, dy) = (wanted.X - here.X, wanted.Y - here.Y);
            var (a, b, c, d) = (east.X - here.X, north.X - here.X, east.Y - here.Y, north.Y - here.Y);
            var determinant = (a * d) - (b * c);
            place = new Location(
                place.X + (Step * ((dx * d) - (dy * b)) / determinant),
                place.Y + (Step * ((dy * a) - (dx * c)) / determinant)
            );
        }

        return miss <= WorstMetres ? new Location(Degrees.Wrap(place.X, 0), place.Y) : null;
    }

    /// <summary>Turns axes from or to east and north: each turn undoes itself.</summary>
    private Location Turn(Location place) =>
        form.Axes switch
        {
            PlaneAxes.WestSouth => new(-place.X, -place.Y),
            PlaneAxes.SouthWest => new(-place.Y, -place.X),
            _ => place,
        };

    private static bool IsFinite(Location place) => double.IsFinite(place.X) && double.IsFinite(place.Y);
}
