using System.IO.Compression;
using System.Text;

namespace RecipeRunner.Steps.Tests.Support;

/// <summary>Packs texts.</summary>
public static class Gzip
{
    /// <summary>A text as one gzip member.</summary>
    public static byte[] Pack(string text)
    {
        using var packed = new MemoryStream();
        using (var packer = new GZipStream(packed, CompressionLevel.Optimal, leaveOpen: true))
        {
            packer.Write(Encoding.UTF8.GetBytes(text));
        }

        return packed.ToArray();
    }
}
