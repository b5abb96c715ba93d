using RecipeRunner.Host.Catalogue;
using RecipeRunner.Host.Tests.Support;

namespace RecipeRunner.Host.Tests.Catalogue;

public sealed class VerbCatalogueTests
{
    [Fact]
    public void A_verb_is_told_by_the_comment_of_its_step()
    {
        var join = VerbCatalogue
            .Of(Workbench.Language)
            .Verbs.Single(verb => string.Equals(verb.Name, "Join", StringComparison.Ordinal));

        join.Summary.ShouldBe("Joins two texts.");
        join.Source.ShouldBe("Nobody 1900");
        join.Room.ShouldBe("Support");
        join.Signature.ShouldBe("first.Join(Words second, text with = \"-\", number strength = 1) -> Words");
    }
}
