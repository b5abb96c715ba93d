using System.Collections.Immutable;
using NetTopologySuite.Geometries;
using NetTopologySuite.Operation.Valid;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Steps;
using Location = RecipeRunner.Model.Space.Location;

namespace RecipeRunner.Steps.Referencing;

/// <summary>Projects a basin's shape and keeps it valid.</summary>
/// <param name="rings">Projects its rings.</param>
/// <param name="isProjected">True where the target is a plane, in which shapes are checked.</param>
/// <param name="context">Takes findings.</param>
internal sealed class RegionProjection(RingProjection rings, bool isProjected, StepContext context)
{
    private static readonly GeometryFactory Shapes = new();

    /// <summary>The shape in the target: shells counter-clockwise, holes clockwise, collapsed rings left out and found.</summary>
    /// <param name="source">The shape in the source's system.</param>
    /// <param name="degrees">The places of its rings, one after another, as longitudes from Greenwich and latitudes.</param>
    /// <param name="where">The basin, for messages.</param>
    /// <exception cref="RefusedException">RR0342: nothing is left. RR0343: its outline crosses itself in the target.</exception>
    public Region Project(Region source, ReadOnlySpan<Location> degrees, Place where)
    {
        var parts = ImmutableArray.CreateBuilder<RegionPart>(source.Parts.Length);
        var lost = 0;
        foreach (var part in source.Parts)
        {
            var projected = ImmutableArray.CreateBuilder<Ring>(1 + part.Holes.Length);
            foreach (var ring in part.Rings)
            {
                var count = ring.Vertices.Length;
                var vertices = rings.Project(ring.Vertices.AsSpan(), degrees[..count], where);
                degrees = degrees[count..];
                projected.Add(Wind(vertices, clockwise: projected.Count > 0));
            }

            var holes = projected.Skip(1).Where(HasArea).ToImmutableArray();
            lost += projected.Count - 1 - holes.Length + (HasArea(projected[0]) ? 0 : 1);
            if (HasArea(projected[0]))
            {
                parts.Add(new RegionPart(projected[0], holes));
            }
        }

        var region = new Region(parts.ToImmutable());
        ReportLost(lost, region, where);
        RefuseIfCrossing(region, where);
        return region;
    }

    private static bool HasArea(Ring ring) => ring.Vertices.Length >= 3 && ring.SignedArea != 0;

    private static Ring Wind(ImmutableArray<Location> vertices, bool clockwise)
    {
        var ring = new Ring(vertices);
        return vertices.Length >= 3 && ring.SignedArea < 0 != clockwise ? new Ring([.. vertices.Reverse()]) : ring;
    }

    private void ReportLost(int lost, Region region, Place where)
    {
        if (region.Parts.IsEmpty)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0342",
                    where,
                    "Its outline has no area left in the target system: all its vertices fall on a point or a line.",
                    "Check the basin's coordinates and the reference system of its file."
                )
            );
        }

        if (lost > 0)
        {
            context.Find(
                Finding.Caution(
                    "RR0342",
                    where,
                    FormattableString.Invariant(
                        $"{lost} of its rings have no area left in the target system (vertices closer than 0.015 mm) and are left out."
                    ),
                    "Check the basin's outline for stray rings."
                )
            );
        }
    }

    private void RefuseIfCrossing(Region region, Place where)
    {
        if (!isProjected)
        {
            return;
        }

        var shape = Shapes.CreateMultiPolygon([
            .. region.Parts.Select(part => Shapes.CreatePolygon(Closed(part.Shell), [.. part.Holes.Select(Closed)])),
        ]);
        if (new IsValidOp(shape).ValidationError is { } flaw)
        {
            throw new RefusedException(
                Finding.Error(
                    "RR0343",
                    where,
                    FormattableString.Invariant(
                        $"Its outline is not valid in the target system near {flaw.Coordinate.X:0} E {flaw.Coordinate.Y:0} N: {flaw.Message}."
                    ),
                    "Repair the basin, or put vertices on long edges before projecting: .To(grid, densify: 1000)"
                )
            );
        }
    }

    private static LinearRing Closed(Ring ring) =>
        Shapes.CreateLinearRing([
            .. ring.Vertices.Append(ring.Vertices[0]).Select(vertex => new Coordinate(vertex.X, vertex.Y)),
        ]);
}
