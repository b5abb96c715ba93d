using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using RecipeRunner.Model.Space;

namespace RecipeRunner.Model.Steps;

/// <summary>
/// Writes an artifact in a form that is the same on every machine (little-endian, lengths first, UTF-8) and digests it
/// with SHA-256 (FIPS 180-4).
/// </summary>
public sealed class CanonicalWriter
{
    private readonly IncrementalHash hash;

    internal CanonicalWriter(IncrementalHash hash) => this.hash = hash;

    /// <summary>A whole number.</summary>
    public void Write(int value)
    {
        Span<byte> bytes = stackalloc byte[sizeof(int)];
        BinaryPrimitives.WriteInt32LittleEndian(bytes, value);
        hash.AppendData(bytes);
    }

    /// <summary>A long whole number.</summary>
    public void Write(long value)
    {
        Span<byte> bytes = stackalloc byte[sizeof(long)];
        BinaryPrimitives.WriteInt64LittleEndian(bytes, value);
        hash.AppendData(bytes);
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
    public void Write(string value)
    {
        var bytes = Encoding.UTF8.GetBytes(value);
        Write(bytes.Length);
        hash.AppendData(bytes);
    }

    /// <summary>Raw bytes, their number first.</summary>
    public void Write(ReadOnlySpan<byte> bytes)
    {
        Write(bytes.Length);
        hash.AppendData(bytes);
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
}
