using System.Buffers.Binary;
using RecipeRunner.Model.Space;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// The rings of a shapefile's polygon may come in any order (ESRI Shapefile Technical Description, 1998, page 8), and files
/// are found in which they run the wrong way. What lies in what decides.
/// </summary>
public sealed class RingOrderTests : IDisposable
{
    private static readonly (double X, double Y)[] Shell = Square(0, 0, 10_000);
    private static readonly (double X, double Y)[] Hole = Square(2000, 2000, 4000);
    private static readonly (double X, double Y)[] Island = Square(3000, 3000, 1000);
    private static readonly (double X, double Y)[] Apart = Square(20_000, 0, 1000);
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Theory]
    [InlineData(false, false)]
    [InlineData(false, true)]
    [InlineData(true, false)]
    [InlineData(true, true)]
    public void Order_and_direction_change_nothing(bool reversedOrder, bool reversedRings)
    {
        (double X, double Y)[][] rings = [Shell, Hole, Island, Apart];
        rings = reversedOrder ? [.. rings.Reverse()] : rings;
        rings = reversedRings ? [.. rings.Select(ring => ring.Reverse().ToArray())] : rings;

        var shape = Read(rings);

        shape.Area.ShouldBe(1e8 - 16e6 + 1e6 + 1e6);
        shape.Parts.Select(part => part.Holes.Length).ShouldBe([1, 0, 0]);
        bench.Study.Findings.ShouldBeEmpty();
    }

    private Region Read(params (double X, double Y)[][] rings)
    {
        bench.CopyShapefile("nc1948/nc", "one");
        var dbf = File.ReadAllBytes(Path.Combine(bench.Folder, "one.dbf"));
        var (header, width) = (
            BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(8)),
            BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(10))
        );
        BinaryPrimitives.WriteInt32LittleEndian(dbf.AsSpan(4), 1);
        bench.Write("one.dbf", dbf[..(header + width)]);
        var content = Content(rings);
        bench.Write(
            "one.shp",
            [.. Header(100 + 8 + content.Length), .. Big(1), .. Big(content.Length / 2), .. content]
        );
        bench.Write("one.shx", [.. Header(108), .. Big(50), .. Big(content.Length / 2)]);
        File.Delete(Path.Combine(bench.Folder, "one.prj"));
        return bench.Verbs.ReadBasins("one.shp", id: "FIPS", crs: bench.Verbs.Crs("EPSG:32632")).Basins[0].Shape;
    }

    private static byte[] Content((double X, double Y)[][] rings)
    {
        var closed = rings.Select(ring => ring.Append(ring[0]).ToArray()).ToArray();
        var bytes = new List<byte>([
            .. Little(5),
            .. new byte[32],
            .. Little(closed.Length),
            .. Little(closed.Sum(ring => ring.Length)),
        ]);
        var start = 0;
        foreach (var ring in closed)
        {
            bytes.AddRange(Little(start));
            start += ring.Length;
        }

        foreach (var (x, y) in closed.SelectMany(ring => ring))
        {
            bytes.AddRange(BitConverter.GetBytes(x));
            bytes.AddRange(BitConverter.GetBytes(y));
        }

        return [.. bytes];
    }

    private static byte[] Header(int length)
    {
        byte[] start = [.. Big(9994), .. new byte[20], .. Big(length / 2), .. Little(1000), .. Little(5)];
        return [.. start, .. new byte[100 - start.Length]];
    }

    private static (double X, double Y)[] Square(double x, double y, double side) =>
        [(x, y), (x, y + side), (x + side, y + side), (x + side, y)];

    private static byte[] Little(int value) => BitConverter.GetBytes(value);

    private static byte[] Big(int value) => BitConverter.GetBytes(BinaryPrimitives.ReverseEndianness(value));
}
