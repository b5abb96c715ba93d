using System.Buffers.Binary;
using System.Security.Cryptography;
using System.Text;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Running;

/// <summary>A digest is SHA-256 (FIPS 180-4) over the canonical form: lengths first, little-endian, UTF-8.</summary>
public sealed class ArtifactDigestTests
{
    [Theory]
    [InlineData("alpha", 1)]
    [InlineData("ä", 5000)]
    public void A_text_is_digested_as_its_length_and_bytes(string text, int times)
    {
        var words = new Words(string.Concat(Enumerable.Repeat(text, times)));
        byte[] canonical = [.. WithLength(typeof(Words).FullName!), .. WithLength(words.Text)];

        words.Digest.ShouldBe(Convert.ToHexStringLower(SHA256.HashData(canonical)));
    }

    private static byte[] WithLength(string text)
    {
        var bytes = Encoding.UTF8.GetBytes(text);
        var length = new byte[4];
        BinaryPrimitives.WriteInt32LittleEndian(length, bytes.Length);
        return [.. length, .. bytes];
    }
}
