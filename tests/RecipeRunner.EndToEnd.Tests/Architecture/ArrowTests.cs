using System.Reflection;
using ArchUnitNET.Fluent;
using ArchUnitNET.Loader;
using static ArchUnitNET.Fluent.ArchRuleDefinition;

namespace RecipeRunner.EndToEnd.Tests.Architecture;

/// <summary>The arrows of src/README.md: who may know whom.</summary>
public sealed class ArrowTests
{
    private const string House = "RecipeRunner.";

    private static readonly ArchUnitNET.Domain.Architecture Everything = new ArchLoader()
        .LoadAssemblies([
            .. Rooms.Select(Assembly.Load),
            Assembly.Load("Microsoft.CodeAnalysis"),
            Assembly.Load("Microsoft.CodeAnalysis.CSharp"),
            Assembly.Load("ProjNET"),
            Assembly.Load("NetTopologySuite"),
            Assembly.Load("NetTopologySuite.IO.Esri.Shapefile"),
            Assembly.Load("NetTopologySuite.IO.GeoJSON4STJ"),
            Assembly.Load("Sep"),
            Assembly.Load("Spectre.Console"),
            Assembly.Load("Spectre.Console.Cli"),
        ])
        .Build();

    private static string[] Rooms =>
        ["RecipeRunner.Numerics", "RecipeRunner.Model", "RecipeRunner.Steps", "RecipeRunner.Host", "recipe-runner"];

    [Theory]
    [InlineData("RecipeRunner.Numerics", "")]
    [InlineData("RecipeRunner.Model", "")]
    [InlineData("RecipeRunner.Steps", "RecipeRunner.Model RecipeRunner.Numerics")]
    [InlineData("RecipeRunner.Host", "RecipeRunner.Model")]
    [InlineData("recipe-runner", "RecipeRunner.Host RecipeRunner.Model RecipeRunner.Steps")]
    public void A_project_knows_only_those_below_it(string project, string allowed)
    {
        var known = Assembly
            .Load(project)
            .GetReferencedAssemblies()
            .Select(name => name.Name!)
            .Where(name => name.StartsWith(House, StringComparison.Ordinal))
            .Order(StringComparer.Ordinal);

        known.ShouldBe(allowed.Split(' ', StringSplitOptions.RemoveEmptyEntries));
    }

    [Fact]
    public void Numerics_stands_on_nothing_but_the_platform()
    {
        var known = Assembly.Load("RecipeRunner.Numerics").GetReferencedAssemblies().Select(name => name.Name!);

        known.ShouldAllBe(name => name.StartsWith("System", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("Microsoft.CodeAnalysis", "RecipeRunner.Host.Scripting")]
    [InlineData("ProjNet", "RecipeRunner.Steps.Referencing")]
    [InlineData("NetTopologySuite.IO", "RecipeRunner.Steps.(Reading|Emitting)")]
    [InlineData("nietras.SeparatedValues", "RecipeRunner.Steps.(Reading|Peeking|Emitting)")]
    [InlineData("Spectre.Console", "RecipeRunner.Cli")]
    public void A_library_is_known_in_one_room_only(string library, string room)
    {
        Outside(room, library).HasNoViolations(Everything).ShouldBeTrue($"{library} is known outside {room}");
        Within(room, library)
            .HasNoViolations(Everything)
            .ShouldBeFalse($"nothing in {room} uses {library}: the rule watches nothing");
    }

    [Fact]
    public void The_geometry_library_is_known_to_steps_only()
    {
        Outside("RecipeRunner.Steps", "NetTopologySuite").HasNoViolations(Everything).ShouldBeTrue();
        Within("RecipeRunner.Steps", "NetTopologySuite").HasNoViolations(Everything).ShouldBeFalse();
    }

    private static IArchRule Outside(string room, string library) =>
        Types()
            .That()
            .ResideInNamespaceMatching("^RecipeRunner.*")
            .And()
            .DoNotResideInNamespaceMatching($"^{room}.*")
            .Should()
            .NotDependOnAny(Types().That().ResideInNamespaceMatching($"^{library}.*"));

    private static IArchRule Within(string room, string library) =>
        Types()
            .That()
            .ResideInNamespaceMatching($"^{room}.*")
            .Should()
            .NotDependOnAny(Types().That().ResideInNamespaceMatching($"^{library}.*"));
}
