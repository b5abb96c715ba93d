using System.Buffers.Binary;
using System.Runtime.InteropServices;
using System.Security.Cryptography;
using System.Text;
using RecipeRunner.Model.Space;
using RecipeRunner.Model.Time;

namespace RecipeRunner.Model.Steps;

/// <summary>
/// Writes an artifact in a form that is the same on every machine (little-endian, lengths first, UTF-8) and digests it
/// with SHA-256 (FIPS 180-4).
/// </summary>
public sealed class CanonicalWriter
{
    private readonly IncrementalHash hash;
    private readonly byte[] gathered = new byte[1 << 13];
    private int length;

    internal CanonicalWriter(IncrementalHash hash) => this.hash = hash;

    /// <summary>A whole number.</summary>
    public void Write(int value)
    {
        BinaryPrimitives.WriteInt32LittleEndian(Room(sizeof(int)), value);
    }

    /// <summary>A long whole number.</summary>
    public void Write(long value)
    {
        BinaryPrimitives.WriteInt64LittleEndian(Room(sizeof(long)), value);
    }

    /// <summary>A number by its bits; negative zero as zero.</summary>
    public void Write(double value) => Write(BitConverter.DoubleToInt64Bits(value + 0.0));

    /// <summary>A number that may be missing.</summary>
    public void Write(double? value)
    {
        Write(value.HasValue ? 1 : 0);
        Write(value ?? 0.0);
    }

    /// <summary>Text as UTF-8, its length in bytes first.</summary>
    public void Write(string value) => Write(Encoding.UTF8.GetBytes(value).AsSpan());

    /// <summary>Raw bytes, their number first.</summary>
    public void Write(ReadOnlySpan<byte> bytes)
    {
        Write(bytes.Length);
        Flush();
        hash.AppendData(bytes);
    }

    /// <summary>Numbers by their bits, their number first; negative zero as it is.</summary>
    public void Write(ReadOnlySpan<double> values)
    {
        Write(values.Length);
        if (BitConverter.IsLittleEndian)
        {
            Flush();
            hash.AppendData(MemoryMarshal.AsBytes(values));
            return;
        }

        foreach (var value in values)
        {
            Write(BitConverter.DoubleToInt64Bits(value));
        }
    }

    /// <summary>Steps of time.</summary>
    public void Write(Timeline times)
    {
        Write(times.Step.ToSettingText());
        Write(times.Step.LabelText(times.First));
        Write(times.Count);
    }

    /// <summary>A place.</summary>
    public void Write(Location place)
    {
        Write(place.X);
        Write(place.Y);
    }

    /// <summary>A region, part by part, ring by ring.</summary>
    public void Write(Region region)
    {
        Write(region.Parts.Length);
        foreach (var part in region.Parts)
        {
            Write(1 + part.Holes.Length);
            foreach (var ring in part.Rings)
            {
                Write(ring.Vertices.Length);
                foreach (var vertex in ring.Vertices)
                {
                    Write(vertex);
                }
            }
        }
    }

    /// <summary>A table, column by column.</summary>
    public void Write(Table table)
    {
        Write(table.Columns.Length);
        foreach (var column in table.Columns)
        {
            Write(column.Name);
            Write(column.Unit);
            Write((int)column.Kind);
            Write(column.Length);
            foreach (var text in column.Texts)
            {
                Write(text);
            }

            foreach (var number in column.Numbers)
            {
                Write(number);
            }
        }
    }

    /// <summary>Another artifact, by its digest.</summary>
    public void Write(Artifact artifact) => Write(artifact.Digest);

    /// <summary>Hands on what was gathered.</summary>
    internal void Flush()
    {
        hash.AppendData(gathered, 0, length);
        length = 0;
    }

    /// <summary>Room for some bytes at the end of what is gathered.</summary>
    private Span<byte> Room(int bytes)
    {
        if (length + bytes > gathered.Length)
        {
            Flush();
        }

        length += bytes;
        return gathered.AsSpan(length - bytes, bytes);
    }
}
