using System.Collections.Immutable;
using System.Reflection;
using System.Runtime.CompilerServices;
using System.Xml.Linq;
using RecipeRunner.Host.Scripting;
using RecipeRunner.Model.Steps;

namespace RecipeRunner.Host.Catalogue;

/// <summary>The verbs of a recipe language, told by the doc comments of its step libraries.</summary>
public sealed class VerbCatalogue
{
    private const BindingFlags Declared = BindingFlags.Public | BindingFlags.DeclaredOnly;
    private readonly DocComments comments;
    private readonly ImmutableArray<Assembly> libraries;

    private VerbCatalogue(RecipeLanguage language)
    {
        libraries = [.. language.StepLibraries.Append(language.VerbsType.Assembly).Distinct()];
        comments = new DocComments(libraries.Append(typeof(IStudy).Assembly));
        var top = language
            .VerbsType.GetMethods(Declared | BindingFlags.Instance)
            .Where(method => !method.IsSpecialName);
        var extensions = libraries
            .SelectMany(library => library.GetExportedTypes())
            .Where(type => type.IsAbstract && type.IsSealed)
            .SelectMany(type => type.GetMethods(Declared | BindingFlags.Static))
            .Where(method => method.IsDefined(typeof(ExtensionAttribute), inherit: false));
        Verbs =
        [
            .. top.Concat(extensions)
                .Select(EntryOf)
                .OrderBy(verb => verb.Room, StringComparer.Ordinal)
                .ThenBy(verb => verb.Name, StringComparer.Ordinal)
                .ThenBy(verb => verb.Signature, StringComparer.Ordinal),
        ];
    }

    /// <summary>The verbs, by room and name.</summary>
    public ImmutableArray<VerbEntry> Verbs { get; }

    /// <summary>The catalogue of a language.</summary>
    public static VerbCatalogue Of(RecipeLanguage language) => new(language);

    private VerbEntry EntryOf(MethodInfo method)
    {
        var own = comments.Of(method);
        var stepName = DocComments.Inherited(own);
        var step = stepName is null
            ? null
            : libraries.Select(library => library.GetType(stepName)).FirstOrDefault(type => type is not null);
        var told = stepName is null ? own : comments.OfType(stepName);
        return new VerbEntry(
            method.Name,
            RoomOf(step ?? method.DeclaringType!),
            SignatureText.Of(method),
            DocComments.Text(told?.Element("summary")),
            [.. method.GetParameters().Select(parameter => ParameterOf(parameter, own))],
            step?.GetCustomAttribute<StepAttribute>()?.Source ?? "",
            DocComments.Text(told?.Element("example"))
        );
    }

    /// <summary>The last part of the namespace; verbs that stand at the top of a library concern the study itself.</summary>
    private static string RoomOf(Type type)
    {
        var space = type.Namespace!;
        var last = space[(space.LastIndexOf('.') + 1)..];
        return string.Equals(space, type.Assembly.GetName().Name, StringComparison.Ordinal) ? "Study" : last;
    }

    private static VerbParameter ParameterOf(ParameterInfo parameter, XElement? own)
    {
        var told = own
            ?.Elements("param")
            .FirstOrDefault(element =>
                string.Equals(element.Attribute("name")?.Value, parameter.Name, StringComparison.Ordinal)
            );
        return new VerbParameter(
            parameter.Name!,
            DocComments.Text(told),
            Choices(Nullable.GetUnderlyingType(parameter.ParameterType) ?? parameter.ParameterType)
        );
    }

    private static ImmutableArray<string> Choices(Type type)
    {
        if (type.IsEnum)
        {
            return [.. Enum.GetNames(type).Select(name => $"{type.Name}.{name}")];
        }

        if (!type.IsAssignableTo(typeof(ISettingValue)))
        {
            return [];
        }

        var makers = type.Assembly.GetExportedTypes().OrderBy(maker => maker.Name, StringComparer.Ordinal);
        return [.. makers.SelectMany(maker => ValuesOf(maker, type))];
    }

    /// <summary>The public ways in which one type gives values of another.</summary>
    private static IEnumerable<string> ValuesOf(Type maker, Type type)
    {
        var values = maker
            .GetProperties(Declared | BindingFlags.Static)
            .Where(property => property.PropertyType.IsAssignableTo(type))
            .Select(property => $"{maker.Name}.{property.Name}");
        var methods = maker
            .GetMethods(Declared | BindingFlags.Static)
            .Where(method => method.ReturnType.IsAssignableTo(type) && !method.IsSpecialName)
            .Select(method => $"{maker.Name}.{method.Name}(…)")
            .Distinct(StringComparer.Ordinal);
        return values.Concat(methods);
    }
}
