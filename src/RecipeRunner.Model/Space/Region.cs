using System.Collections.Immutable;

namespace RecipeRunner.Model.Space;

/// <summary>A closed line without self-crossings. The first vertex is not repeated at the end.</summary>
/// <param name="Vertices">At least three places, in the reference system of the layer that holds the ring.</param>
public sealed record Ring(ImmutableArray<Location> Vertices)
{
    /// <summary>
    /// The enclosed area in squared units of the coordinates, positive where the ring runs counter-clockwise
    /// (the surveyor's formula, taken about the first vertex to keep its digits far from the origin).
    /// </summary>
    public double SignedArea
    {
        get
        {
            var origin = Vertices[0];
            var twice = 0.0;
            for (var i = 1; i < Vertices.Length - 1; i++)
            {
                var a = Vertices[i];
                var b = Vertices[i + 1];
                twice += ((a.X - origin.X) * (b.Y - origin.Y)) - ((b.X - origin.X) * (a.Y - origin.Y));
            }

            return twice / 2;
        }
    }
}

/// <summary>One connected piece of a region.</summary>
/// <param name="Shell">The outer ring, counter-clockwise.</param>
/// <param name="Holes">The holes, clockwise, within the shell.</param>
public sealed record RegionPart(Ring Shell, ImmutableArray<Ring> Holes)
{
    /// <summary>The shell, then the holes.</summary>
    public IEnumerable<Ring> Rings => Holes.Prepend(Shell);
}

/// <summary>A valid areal shape: one or more parts that do not overlap, each with its holes.</summary>
/// <param name="Parts">The parts; empty for the empty region.</param>
public sealed record Region(ImmutableArray<RegionPart> Parts)
{
    /// <summary>The region without area.</summary>
    public static Region Empty { get; } = new([]);

    /// <summary>A region of one part without holes.</summary>
    /// <param name="vertices">The shell, counter-clockwise, the first vertex not repeated.</param>
    public static Region OfShell(IEnumerable<Location> vertices) => new([new RegionPart(new Ring([.. vertices]), [])]);

    /// <summary>Every ring: each part's shell, then its holes.</summary>
    public IEnumerable<Ring> Rings => Parts.SelectMany(part => part.Rings);

    /// <summary>The number of vertices of all rings.</summary>
    public int VertexCount => Rings.Sum(ring => ring.Vertices.Length);

    /// <summary>Shells less holes, in squared units of the coordinates: square metres in a projected system.</summary>
    public double Area => Rings.Sum(ring => ring.SignedArea);

    /// <summary>The rectangle about the region.</summary>
    public Bounds Bounds => Bounds.Of(Parts.SelectMany(part => part.Shell.Vertices));
}
