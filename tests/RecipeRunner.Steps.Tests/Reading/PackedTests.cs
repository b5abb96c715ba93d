using System.IO.Compression;
using System.Text;
using RecipeRunner.Model.Rain;
using RecipeRunner.Model.Time;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>Files packed with gzip. Members and trailers: source: RFC 1952, sections 2.2 and 2.3.1.</summary>
public sealed class PackedTests : IDisposable
{
    private const string Text = "date,A,B\n2024-01-01,1.5,\n2024-01-02,0,2.5\n";
    private readonly Bench bench = new();

    public void Dispose() => bench.Dispose();

    [Fact]
    public void A_packed_file_is_read_as_the_file_within()
    {
        var plain = Read("rain.csv", Encoding.UTF8.GetBytes(Text));
        var packed = Read("rain.csv.gz", Gzip.Pack(Text));
        var members = Read("rain.csv.gz", [.. Gzip.Pack(Text[..20]), .. Gzip.Pack(Text[20..])]);

        packed.Digest.ShouldBe(plain.Digest);
        members.Digest.ShouldBe(plain.Digest);
    }

    [Fact]
    public void Gauges_are_read_from_a_packed_table()
    {
        bench.Write("gauges.csv.gz", Gzip.Pack("id,x,y\nA,13.5,50.1\n"));

        bench
            .Verbs.ReadGauges("gauges.csv.gz", "id", "x", "y", crs: bench.Verbs.Crs("EPSG:4326"))
            .Gauges.Length.ShouldBe(1);
    }

    [Fact]
    public void A_cut_file_is_refused_wherever_it_was_cut()
    {
        var whole = Gzip.Pack(Text);
        byte[] two = [.. Gzip.Pack(Text[..20]), .. Gzip.Pack(Text[20..])];
        for (var length = 1; length < whole.Length; length++)
        {
            Code(whole[..length]).ShouldBe("RR0207", $"{length} bytes");
        }

        for (var length = Gzip.Pack(Text[..20]).Length + 1; length < two.Length; length++)
        {
            Code(two[..length]).ShouldBe("RR0207", $"{length} bytes of two members");
        }
    }

    [Fact]
    public void A_changed_byte_is_refused_or_changes_nothing()
    {
        var whole = Gzip.Pack(Text);
        var digest = Read("rain.csv.gz", whole).Digest;
        for (var at = 0; at < whole.Length; at++)
        {
            var changed = whole.ToArray();
            changed[at] ^= 0x10;
            bench.Write("rain.csv.gz", changed);
            try
            {
                Read("rain.csv.gz", changed).Digest.ShouldBe(digest, $"byte {at}");
            }
            catch (Model.Steps.RefusedException refusal)
            {
                refusal.Problems[0].Code.ShouldBe("RR0207", $"byte {at}");
            }
        }
    }

    [Fact]
    public void What_follows_the_packed_text_is_damage() => Code([.. Gzip.Pack(Text), 1, 2, 3]).ShouldBe("RR0207");

    [Fact]
    public void Problems_name_the_packed_file_and_the_line_within()
    {
        bench.Write("rain.csv.gz", Gzip.Pack("date,A\n2024-01-01,x\n"));
        var problem = Bench.Refused(() => Read("rain.csv.gz", Gzip.Pack("date,A\n2024-01-01,x\n")))[0];

        (problem.Where.File, problem.Where.Line).ShouldBe(("rain.csv.gz", 2));
    }

    [Fact]
    public void A_file_that_swells_beyond_reason_is_refused()
    {
        using var packed = new MemoryStream();
        using (var packer = new GZipStream(packed, CompressionLevel.Optimal, leaveOpen: true))
        {
            var block = Encoding.UTF8.GetBytes(new string('\n', 1 << 20));
            for (var i = 0; i < 300; i++)
            {
                packer.Write(block);
            }
        }

        Code(packed.ToArray()).ShouldBe("RR0208");
    }

    private string Code(byte[] bytes) => Bench.Refused(() => Read("rain.csv.gz", bytes))[0].Code;

    private RainRecords Read(string name, byte[] bytes)
    {
        bench.Write(name, bytes);
        return bench.Verbs.ReadRecords(name, RainUnit.Millimetres, TimeStep.Days("09:00"));
    }
}
