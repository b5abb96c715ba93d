using System.Globalization;
using System.Reflection;
using System.Runtime.CompilerServices;

namespace RecipeRunner.Host.Catalogue;

/// <summary>Writes a verb as a recipe would.</summary>
internal static class SignatureText
{
    /// <summary>Such as <c>gauges.ThiessenCells() -> CellLayer</c>.</summary>
    public static string Of(MethodInfo method)
    {
        var parameters = method.GetParameters();
        var extension = method.IsDefined(typeof(ExtensionAttribute), inherit: false);
        var start = extension ? parameters[0].Name + "." : "";
        var rest = parameters.Skip(extension ? 1 : 0).Select(ParameterText);
        var end = method.ReturnType == typeof(void) ? "" : $" -> {TypeName(method.ReturnType)}";
        return $"{start}{method.Name}({string.Join(", ", rest)}){end}";
    }

    private static string ParameterText(ParameterInfo parameter)
    {
        var text = $"{TypeName(parameter.ParameterType)} {parameter.Name}";
        return parameter.HasDefaultValue ? $"{text} = {Default(parameter.DefaultValue)}" : text;
    }

    private static string Default(object? value) =>
        value switch
        {
            null => "none",
            string text => $"\"{text}\"",
            _ => Convert.ToString(value, CultureInfo.InvariantCulture)!,
        };

    private static string TypeName(Type type)
    {
        if (Nullable.GetUnderlyingType(type) is { } inner)
        {
            return TypeName(inner);
        }

        if (type.IsArray)
        {
            return TypeName(type.GetElementType()!) + "[]";
        }

        if (type.IsGenericType && type.GetGenericArguments() is [var item])
        {
            return $"list of {TypeName(item)}";
        }

        return type.Name switch
        {
            "String" => "text",
            "Double" => "number",
            "Int32" => "whole number",
            "Boolean" => "true or false",
            "T" => "value",
            var name => name,
        };
    }
}
