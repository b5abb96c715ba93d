using System.Reflection;
using System.Text.RegularExpressions;
using System.Xml.Linq;

namespace RecipeRunner.Host.Catalogue;

/// <summary>The doc comments of libraries, from the XML files that lie beside them.</summary>
internal sealed partial class DocComments
{
    private readonly Dictionary<string, XElement> members = new(StringComparer.Ordinal);

    public DocComments(IEnumerable<Assembly> libraries)
    {
        foreach (
            var path in libraries.Select(library => Path.ChangeExtension(library.Location, ".xml")).Where(File.Exists)
        )
        {
            foreach (var member in XDocument.Load(path).Descendants("member"))
            {
                members[member.Attribute("name")!.Value] = member;
            }
        }
    }

    /// <summary>The comment of a method.</summary>
    public XElement? Of(MethodInfo method) =>
        members.GetValueOrDefault(IdOf(method)) is { } exact
            ? exact
            : members
                .FirstOrDefault(pair =>
                    pair.Key.StartsWith(IdOf(method) + "(", StringComparison.Ordinal)
                    || pair.Key.StartsWith(IdOf(method) + "`", StringComparison.Ordinal)
                )
                .Value;

    /// <summary>The full name of the type whose comment a method's comment inherits; null where it stands alone.</summary>
    public static string? Inherited(XElement? comment) =>
        comment?.Element("inheritdoc")?.Attribute("cref")?.Value is { } cref
        && cref.StartsWith("T:", StringComparison.Ordinal)
            ? cref[2..]
            : null;

    /// <summary>The comment of a type.</summary>
    public XElement? OfType(string fullName) => members.GetValueOrDefault("T:" + fullName);

    /// <summary>The text of a comment's part, on one line, tags taken out.</summary>
    public static string Text(XElement? element) =>
        element is null ? "" : Blanks().Replace(string.Concat(element.Nodes().Select(NodeText)), " ").Trim();

    private static string NodeText(XNode node) =>
        node switch
        {
            XText text => text.Value,
            XElement { Name.LocalName: "see" or "paramref" } reference => LastPart(
                reference.Attributes().First().Value
            ),
            XElement element => string.Concat(element.Nodes().Select(NodeText)),
            _ => "",
        };

    private static string LastPart(string cref) => cref[(cref.LastIndexOfAny(['.', ':']) + 1)..];

    private static string IdOf(MethodInfo method) => $"M:{method.DeclaringType!.FullName}.{method.Name}";

    [GeneratedRegex(@"\s+", RegexOptions.CultureInvariant, 1000)]
    private static partial Regex Blanks();
}
