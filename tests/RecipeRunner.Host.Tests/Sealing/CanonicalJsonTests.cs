using System.Text;
using System.Text.Json.Nodes;
using RecipeRunner.Host.Sealing;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Tests.Sealing;

/// <summary>Audits are in the canonical form of RFC 8785.</summary>
public sealed class CanonicalJsonTests
{
    /// <summary>source: RFC 8785, section 3.2.2, its example, less the member that holds fractions: audits have none.</summary>
    [Fact]
    public void Literals_and_strings_are_written_as_the_RFC_shows() =>
        Of("""{ "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/", "literals": [null, true, false] }""")
            .ShouldBe("""{"literals":[null,true,false],"string":"€$\u000f\nA'B\"\\\\\"/"}""");

    /// <summary>source: RFC 8785, section 3.2.3, its example: members by UTF-16 code units.</summary>
    [Fact]
    public void Members_are_sorted_as_the_RFC_shows()
    {
        var sorted = JsonNode
            .Parse(
                Of(
                    """
                    {
                      "\u20ac": "Euro Sign",
                      "\r": "Carriage Return",
                      "\ufb33": "Hebrew Letter Dalet With Dagesh",
                      "1": "One",
                      "\ud83d\ude00": "Emoji: Grinning Face",
                      "\u0080": "Control",
                      "\u00f6": "Latin Small Letter O With Diaeresis"
                    }
                    """
                )
            )!
            .AsObject();

        sorted
            .Select(member => member.Value!.GetValue<string>())
            .ShouldBe([
                "Carriage Return",
                "One",
                "Control",
                "Latin Small Letter O With Diaeresis",
                "Euro Sign",
                "Emoji: Grinning Face",
                "Hebrew Letter Dalet With Dagesh",
            ]);
    }

    /// <summary>source: RFC 8785, section 3.2.4: the bytes are UTF-8; those of its example's string, from the euro sign on.</summary>
    [Fact]
    public void The_bytes_are_UTF8() =>
        Convert
            .ToHexStringLower(CanonicalJson.Of(JsonNode.Parse("""["\u20ac$\u000f\u000aA'B\u0022"]""")))
            .ShouldBe("5b22e282ac245c75303030665c6e4127425c22225d");

    /// <summary>source: RFC 8785, appendix B, the rows that are whole numbers.</summary>
    [Theory]
    [InlineData("0", "0")]
    [InlineData("-0", "0")]
    [InlineData("9007199254740992", "9007199254740992")]
    [InlineData("-9007199254740992", "-9007199254740992")]
    public void Whole_numbers_are_written_plainly(string given, string expected) => Of(given).ShouldBe(expected);

    [Theory]
    [InlineData("1.5")]
    [InlineData("1e3")]
    [InlineData("9007199254740993")]
    [InlineData("-9223372036854775808")]
    public void Other_numbers_are_a_fault(string given) => Should.Throw<InvalidOperationException>(() => Of(given));

    /// <summary>source: RFC 8785, section 3.2.2.2: lone surrogates end the work with an error.</summary>
    [Fact]
    public void Half_a_character_is_refused() =>
        Should
            .Throw<RefusedException>(() => CanonicalJson.Of(JsonValue.Create("a\ud800b")))
            .Problems[0]
            .Code.ShouldBe("RR0707");

    [Theory]
    [InlineData("{ }", "{}")]
    [InlineData("[ ]", "[]")]
    [InlineData("""{"b":[1,{"d":null,"c":""}],"a":{}}""", """{"a":{},"b":[1,{"c":"","d":null}]}""")]
    public void Nothing_stands_between_tokens(string given, string expected) => Of(given).ShouldBe(expected);

    private static string Of(string json) => Encoding.UTF8.GetString(CanonicalJson.Of(JsonNode.Parse(json)));
}
