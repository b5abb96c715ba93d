using System.Buffers.Binary;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Steps.Reading;

/// <summary>
/// Checks the three files of a shapefile against their headers and against each other: lengths, codes, record numbers,
/// the counts within each shape, and finite coordinates (ESRI Shapefile Technical Description, 1998; dBASE III header).
/// </summary>
internal static class ShapefileCheck
{
    private const int HeaderBytes = 100;
    private const int FileCode = 9994;
    private const string CopyAgain = "Copy all files of the shapefile again from where they came.";

    /// <summary>Refuses damaged files.</summary>
    /// <exception cref="RefusedException">With every problem found.</exception>
    public static void Require(string name, byte[] shp, byte[] shx, byte[] dbf)
    {
        var problems = new Problems();
        RequireHeader(problems, name, shp);
        RequireHeader(problems, Sibling(name, "shx"), shx);
        var rows = RequireTable(problems, Sibling(name, "dbf"), dbf);
        problems.ThrowIfAny();
        var shapes = RequireRecords(problems, name, shp);
        problems.ThrowIfAny();
        RequireIndex(problems, name, shx, shapes);
        if (rows != shapes.Count)
        {
            problems.Add(
                "RR0214",
                new Place(name),
                FormattableString.Invariant(
                    $"It holds {shapes.Count} shapes, but its .dbf has {rows} rows: they are not of one data set, or one was cut."
                ),
                CopyAgain
            );
        }

        problems.ThrowIfAny();
    }

    private static void RequireHeader(Problems problems, string name, byte[] file)
    {
        if (file.Length < HeaderBytes)
        {
            problems.Add(
                "RR0211",
                new Place(name),
                FormattableString.Invariant(
                    $"The file has {file.Length} bytes; a header alone has {HeaderBytes}. It was cut."
                ),
                CopyAgain
            );
            return;
        }

        if (Big(file, 0) != FileCode)
        {
            problems.Add(
                "RR0212",
                new Place(name),
                "The file does not begin as a shapefile does.",
                "Is it a file of another kind that was renamed?"
            );
            return;
        }

        var stated = 2L * Big(file, 24);
        if (stated != file.Length)
        {
            problems.Add(
                "RR0211",
                new Place(name),
                FormattableString.Invariant(
                    $"Its header says {stated} bytes, the file has {file.Length}. It was cut, or joined with another."
                ),
                CopyAgain
            );
        }
    }

    private static List<(int Offset, int Bytes)> RequireRecords(Problems problems, string name, byte[] shp)
    {
        var records = new List<(int Offset, int Bytes)>();
        var type = Little(shp, 32);
        var at = HeaderBytes;
        while (at < shp.Length)
        {
            var number = records.Count + 1;
            var place = new Place(name, Item: FormattableString.Invariant($"shape {number}"));
            if (
                at + 12 > shp.Length
                || Big(shp, at) != number
                || Big(shp, at + 4) < 2
                || at + 8 + (2L * Big(shp, at + 4)) > shp.Length
            )
            {
                problems.Add(
                    "RR0213",
                    place,
                    FormattableString.Invariant($"The record at byte {at} does not fit the file."),
                    CopyAgain
                );
                break;
            }

            var content = shp.AsSpan(at + 8, 2 * Big(shp, at + 4));
            if (ShapeProblem(content, type) is { } problem)
            {
                problems.Add("RR0213", place, problem, CopyAgain);
            }

            records.Add((at, content.Length));
            at += 8 + content.Length;
        }

        return records;
    }

    private static string? ShapeProblem(ReadOnlySpan<byte> content, int fileType)
    {
        var type = BinaryPrimitives.ReadInt32LittleEndian(content);
        if (type == 0)
        {
            return null;
        }

        if (type != fileType)
        {
            return FormattableString.Invariant($"Its type is {type}, that of the file is {fileType}.");
        }

        return (type % 10) switch
        {
            1 => PointsProblem(content, 4, 1),
            3 or 5 => PartsProblem(content),
            8 => content.Length < 40
                ? "It is too short."
                : PointsProblem(content, 40, BinaryPrimitives.ReadInt32LittleEndian(content[36..])),
            _ => FormattableString.Invariant($"Its type {type} is not read."),
        };
    }

    private static string? PartsProblem(ReadOnlySpan<byte> content)
    {
        if (content.Length < 44)
        {
            return "It is too short.";
        }

        long parts = BinaryPrimitives.ReadInt32LittleEndian(content[36..]);
        long points = BinaryPrimitives.ReadInt32LittleEndian(content[40..]);
        if (parts < 1 || points < 1 || 44 + (4 * parts) + (16 * points) > content.Length)
        {
            return FormattableString.Invariant(
                $"It states {parts} parts and {points} points, which its {content.Length} bytes cannot hold."
            );
        }

        var before = -1;
        for (var part = 0; part < parts; part++)
        {
            var start = BinaryPrimitives.ReadInt32LittleEndian(content[(44 + (4 * part))..]);
            if (start <= before || start >= points || (part == 0 && start != 0))
            {
                return FormattableString.Invariant($"Its part {part + 1} starts at point {start}, which does not fit.");
            }

            before = start;
        }

        return PointsProblem(content, 44 + (4 * (int)parts), (int)points);
    }

    private static string? PointsProblem(ReadOnlySpan<byte> content, int start, int points)
    {
        if (points < 0 || start + (16L * points) > content.Length)
        {
            return FormattableString.Invariant(
                $"It states {points} points, which its {content.Length} bytes cannot hold."
            );
        }

        for (var i = 0; i < 2 * points; i++)
        {
            if (!double.IsFinite(BinaryPrimitives.ReadDoubleLittleEndian(content[(start + (8 * i))..])))
            {
                return FormattableString.Invariant(
                    $"Its point {(i / 2) + 1} has a coordinate that is not a finite number."
                );
            }
        }

        return null;
    }

    private static void RequireIndex(Problems problems, string name, byte[] shx, List<(int Offset, int Bytes)> shapes)
    {
        var index = Sibling(name, "shx");
        if (shx.Length != HeaderBytes + (8 * shapes.Count))
        {
            problems.Add(
                "RR0214",
                new Place(index),
                FormattableString.Invariant(
                    $"It lists {(shx.Length - HeaderBytes) / 8} shapes; {name} holds {shapes.Count}."
                ),
                CopyAgain
            );
            return;
        }

        for (var i = 0; i < shapes.Count; i++)
        {
            var entry = HeaderBytes + (8 * i);
            if (2L * Big(shx, entry) != shapes[i].Offset || 2L * Big(shx, entry + 4) != shapes[i].Bytes)
            {
                problems.Add(
                    "RR0214",
                    new Place(index, Item: FormattableString.Invariant($"shape {i + 1}")),
                    $"It points to another place than where {name} holds the shape.",
                    CopyAgain
                );
            }
        }
    }

    private static int RequireTable(Problems problems, string name, byte[] dbf)
    {
        if (dbf.Length < 33)
        {
            problems.Add(
                "RR0211",
                new Place(name),
                FormattableString.Invariant($"The file has {dbf.Length} bytes; a header alone has 33. It was cut."),
                CopyAgain
            );
            return 0;
        }

        var rows = Little(dbf, 4);
        int header = BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(8));
        int width = BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(10));
        var needed = header + ((long)rows * width);
        if (
            rows < 0
            || header < 33
            || header > dbf.Length
            || width < 1
            || needed > dbf.Length
            || dbf.Length > needed + 1
        )
        {
            problems.Add(
                "RR0211",
                new Place(name),
                FormattableString.Invariant(
                    $"Its header says {rows} rows of {width} bytes after {header}: {needed} bytes. The file has {dbf.Length}. It was cut, or joined with another."
                ),
                CopyAgain
            );
            return rows;
        }

        RequireFields(problems, name, dbf, header, width);
        return rows;
    }

    private static void RequireFields(Problems problems, string name, byte[] dbf, int header, int width)
    {
        var sum = 1;
        var at = 32;
        for (; at + 32 <= header && dbf[at] != 0x0D; at += 32)
        {
            sum += dbf[at + 16];
        }

        if (at >= dbf.Length || dbf[at] != 0x0D || sum != width)
        {
            problems.Add(
                "RR0211",
                new Place(name),
                FormattableString.Invariant($"Its columns add up to {sum} bytes a row; its header says {width}."),
                CopyAgain
            );
        }
    }

    private static string Sibling(string name, string ending) => name[..^3] + ending;

    private static int Big(byte[] file, int at) => BinaryPrimitives.ReadInt32BigEndian(file.AsSpan(at));

    private static int Little(byte[] file, int at) => BinaryPrimitives.ReadInt32LittleEndian(file.AsSpan(at));
}
