using System.Runtime.InteropServices;

namespace RecipeRunner.Numerics.Clipping;

/// <summary>
/// One stay of a ring in one cell: from where it came in to where it left, and what it swept about the point of entry.
/// Coordinates are offsets from the ring's origin.
/// </summary>
/// <param name="Site">Rank of the site whose cell it is.</param>
/// <param name="ExitSlot">The wall crossed on leaving, or <see cref="RingWalk.NoExit"/> where the ring ends.</param>
/// <param name="EntryX">Where the stay begins.</param>
/// <param name="EntryY">Where the stay begins.</param>
/// <param name="ExitX">Where it ends.</param>
/// <param name="ExitY">Where it ends.</param>
/// <param name="TwiceSwept">Twice the signed area between the path and its point of entry.</param>
/// <param name="Length">Length of the path, each step as |dx| + |dy|.</param>
[StructLayout(LayoutKind.Auto)]
internal readonly record struct Visit(
    int Site,
    int ExitSlot,
    double EntryX,
    double EntryY,
    double ExitX,
    double ExitY,
    double TwiceSwept,
    double Length
);
