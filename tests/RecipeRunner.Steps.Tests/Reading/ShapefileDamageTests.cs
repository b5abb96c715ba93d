using System.Buffers.Binary;
using RecipeRunner.Steps.Tests.Support;

namespace RecipeRunner.Steps.Tests.Reading;

/// <summary>
/// A damaged shapefile is refused, never half read. The whole one is the North Carolina counties of R's sf package
/// (tests/reference/README.md).
/// </summary>
public sealed class ShapefileDamageTests : IDisposable
{
    private readonly Bench bench = new();

    public ShapefileDamageTests() => bench.CopyShapefile("nc1948/nc", "nc");

    public void Dispose() => bench.Dispose();

    [Fact]
    public void The_whole_file_is_read()
    {
        var basins = Read();

        basins.Basins.Length.ShouldBe(100);
        basins.ReferenceSystem.Code.ShouldBe("EPSG:4267");
        basins
            .Basins.Count(basin => basin.Shape.Parts.Length > 1)
            .ShouldBe(6, "source: tests/reference/checks.txt, multipart 6");
        bench.Study.Findings.ShouldBeEmpty();
    }

    [Theory]
    [InlineData("shp")]
    [InlineData("shx")]
    [InlineData("dbf")]
    public void A_cut_anywhere_is_refused_and_names_the_file(string part)
    {
        var path = Path.Combine(bench.Folder, "nc." + part);
        var whole = File.ReadAllBytes(path);
        for (var length = 0; length < whole.Length - 1; length += Math.Max(1, whole.Length / 240))
        {
            File.WriteAllBytes(path, whole[..length]);
            var problems = Bench.Refused(() => Read());

            problems[0].Code.ShouldBeOneOf("RR0211", "RR0213", "RR0214");
            problems[0].Where.File.ShouldBe("nc." + part, customMessage: $"cut at {length}");
        }
    }

    [Theory]
    [InlineData("shp")]
    [InlineData("shx")]
    [InlineData("dbf")]
    public void Bytes_that_follow_the_end_are_refused(string part)
    {
        var path = Path.Combine(bench.Folder, "nc." + part);
        File.WriteAllBytes(path, [.. File.ReadAllBytes(path), .. new byte[64]]);

        Bench.Refused(() => Read())[0].Code.ShouldBe("RR0211");
    }

    [Theory]
    [InlineData(24, 1_000_000_000)]
    [InlineData(100, 7)]
    [InlineData(104, 2_000_000_000)]
    [InlineData(104, -5)]
    public void Big_endian_counts_that_lie_are_refused(int offset, int value) =>
        Lie(offset, bytes => BinaryPrimitives.WriteInt32BigEndian(bytes, value));

    [Theory]
    [InlineData(108, 3)]
    [InlineData(144, 1_000_000_000)]
    [InlineData(144, -1)]
    [InlineData(148, 2_000_000_000)]
    [InlineData(148, 0)]
    [InlineData(152, 5)]
    public void Little_endian_counts_that_lie_are_refused(int offset, int value) =>
        Lie(offset, bytes => BinaryPrimitives.WriteInt32LittleEndian(bytes, value));

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Coordinates_that_are_no_numbers_are_refused(double value) =>
        Lie(156, bytes => BinaryPrimitives.WriteDoubleLittleEndian(bytes, value));

    [Fact]
    public void Parts_of_two_data_sets_under_one_name_are_refused()
    {
        var path = Path.Combine(bench.Folder, "nc.dbf");
        var dbf = File.ReadAllBytes(path);
        var width = BinaryPrimitives.ReadUInt16LittleEndian(dbf.AsSpan(10));
        BinaryPrimitives.WriteInt32LittleEndian(dbf.AsSpan(4), 99);
        File.WriteAllBytes(path, dbf[..^width]);

        var problem = Bench.Refused(() => Read())[0];
        problem.Code.ShouldBe("RR0214");
        problem.What.ShouldContain("100 shapes");
        problem.What.ShouldContain("99 rows");
    }

    [Theory]
    [InlineData("shx")]
    [InlineData("dbf")]
    public void A_missing_part_is_named(string part)
    {
        File.Delete(Path.Combine(bench.Folder, "nc." + part));

        var problem = Bench.Refused(() => Read())[0];
        problem.Code.ShouldBe("RR0210");
        problem.Mend.ShouldContain("nc." + part);
    }

    [Fact]
    public void Without_a_prj_the_numbers_are_described_and_the_mend_is_given()
    {
        File.Delete(Path.Combine(bench.Folder, "nc.prj"));

        var problem = Bench.Refused(() => Read())[0];
        problem.Code.ShouldBe("RR0203");
        problem.Mend.ShouldContain("degrees");
        problem.Mend.ShouldContain("crs: Crs(");
        bench.Verbs.ReadBasins("nc.shp", id: "FIPS", crs: bench.Verbs.Crs("EPSG:4267")).Basins.Length.ShouldBe(100);
    }

    [Fact]
    public void A_system_given_against_the_files_own_is_a_caution()
    {
        bench.Verbs.ReadBasins("nc.shp", id: "FIPS", crs: bench.Verbs.Crs("EPSG:4269"));

        bench.Study.Findings.Single().Code.ShouldBe("RR0235");
    }

    [Theory]
    [InlineData("FIPSS", "FIPS")]
    [InlineData("NAM", "NAME")]
    public void An_unknown_column_offers_near_ones(string column, string near)
    {
        var problem = Bench.Refused(() => bench.Verbs.ReadBasins("nc.shp", id: column))[0];

        problem.Code.ShouldBe("RR0206");
        problem.Mend.ShouldContain(near);
    }

    [Fact]
    public void Ids_that_repeat_are_all_named()
    {
        var problems = Bench.Refused(() => bench.Verbs.ReadBasins("nc.shp", id: "SID79"));

        problems.ShouldAllBe(problem => problem.Code == "RR0237");
        problems.Count.ShouldBeGreaterThan(5);
    }

    [Theory]
    [InlineData("UTF-8", false)]
    [InlineData("utf8", false)]
    [InlineData("1252", true)]
    [InlineData("ISO-8859-1", true)]
    [InlineData("ANSI 1252", true)]
    [InlineData("8859_1", true)]
    public void Encodings_named_by_the_cpg_are_honoured(string label, bool latin)
    {
        Rename("Märzgraben", latin);
        bench.Write("nc.cpg", label);

        bench.Verbs.ReadBasins("nc.shp", id: "FIPS", name: "NAME").Basins[0].Name.ShouldBe("Märzgraben");
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Without_a_cpg_text_is_read_as_what_it_can_be(bool latin)
    {
        Rename("Märzgraben", latin);

        bench.Verbs.ReadBasins("nc.shp", id: "FIPS", name: "NAME").Basins[0].Name.ShouldBe("Märzgraben");
    }

    [Fact]
    public void A_guessed_encoding_is_a_notice_and_an_unknown_language_is_refused()
    {
        Rename("Märzgraben", latin: true);
        Read();
        bench.Study.Findings.Single().Code.ShouldBe("RR0218");

        var path = Path.Combine(bench.Folder, "nc.dbf");
        var dbf = File.ReadAllBytes(path);
        dbf[29] = 0xF7;
        File.WriteAllBytes(path, dbf);
        Bench.Refused(() => Read())[0].Code.ShouldBe("RR0219");
    }

    [Fact]
    public void A_prj_that_cannot_be_used_is_refused_unless_the_recipe_says_the_system()
    {
        bench.Write("nc.prj", "PROJCS[\"weird\"]");

        Bench.Refused(() => Read())[0].Where.File.ShouldBe("nc.prj");
        bench.Verbs.ReadBasins("nc.shp", id: "FIPS", crs: bench.Verbs.Crs("EPSG:4267")).Basins.Length.ShouldBe(100);
        bench.Study.Findings.Single().Code.ShouldBe("RR0235");
    }

    [Theory]
    [InlineData("UTF-8", "RR0216")]
    [InlineData("UTF-99", "RR0215")]
    public void A_cpg_that_does_not_fit_is_refused(string label, string code)
    {
        Rename("Märzgraben", latin: true);
        bench.Write("nc.cpg", label);

        Bench.Refused(() => Read())[0].Code.ShouldBe(code);
    }

    private Model.Space.BasinLayer Read() => bench.Verbs.ReadBasins("nc.shp", id: "FIPS");

    private void Lie(int offset, Action<byte[]> write)
    {
        var path = Path.Combine(bench.Folder, "nc.shp");
        var shp = File.ReadAllBytes(path);
        var tail = shp[offset..];
        write(tail);
        tail.CopyTo(shp, offset);
        File.WriteAllBytes(path, shp);

        Bench.Refused(() => Read())[0].Code.ShouldBeOneOf("RR0211", "RR0213");
    }

    /// <summary>Writes a name over that of the first county, and clears the language byte.</summary>
    private void Rename(string name, bool latin)
    {
        var path = Path.Combine(bench.Folder, "nc.dbf");
        var dbf = File.ReadAllBytes(path);
        dbf[29] = 0;
        var at = dbf.AsSpan().IndexOf("Ashe   "u8);
        var bytes = (latin ? System.Text.Encoding.Latin1 : System.Text.Encoding.UTF8).GetBytes(name);
        bytes.CopyTo(dbf.AsSpan(at));
        File.WriteAllBytes(path, dbf);
    }
}
