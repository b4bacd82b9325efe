using System.Reflection;
using System.Runtime.CompilerServices;
using System.Text.RegularExpressions;
using BarbuleOptics.Quantities;
using Xunit;

namespace BarbuleOptics.Tests.Architecture;

/// <summary>Rules of the house that a reader of the code may rely on.</summary>
public sealed partial class DesignRuleTests
{
    private const BindingFlags Own = BindingFlags.Public | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    private static readonly Type[] PublicTypes = typeof(Length).Assembly.GetExportedTypes();

    [Fact]
    public void Results_and_measurements_do_not_change_once_made()
    {
        IEnumerable<PropertyInfo> settable = PublicTypes.SelectMany(type => type.GetProperties(Own))
            .Where(property => property.SetMethod is { IsPublic: true } setter && !setter.ReturnParameter.GetRequiredCustomModifiers().Contains(typeof(IsExternalInit)));
        Assert.Empty(settable.Select(property => $"{property.DeclaringType!.Name}.{property.Name}"));
    }

    [Fact]
    public void A_public_number_with_a_dimension_names_its_unit()
    {
        IEnumerable<string> nameless = PublicTypes.SelectMany(Numbers)
            .Where(member => Dimensional().IsMatch(member.Name) && !Unit().IsMatch(member.Name))
            .Select(member => $"{member.Owner}.{member.Name}");
        Assert.Empty(nameless.Distinct());
    }

    [Fact]
    public void A_file_is_named_for_the_type_it_declares()
    {
        foreach (string file in ImportOrderTests.CodeFiles(Path.Combine(Repository.Root, "src")).Where(file => Path.GetFileName(file) != "Program.cs"))
        {
            IEnumerable<string> declared = Declaration().Matches(File.ReadAllText(file)).Select(match => match.Groups[1].Value);
            Assert.True(declared.Contains(Path.GetFileNameWithoutExtension(file)), $"{file} declares no type of its name");
        }
    }

    private static IEnumerable<(string Owner, string Name)> Numbers(Type type)
    {
        foreach (PropertyInfo property in type.GetProperties(Own).Where(property => IsNumber(property.PropertyType)))
            yield return (type.Name, property.Name);
        IEnumerable<MethodBase> calls = [.. type.GetMethods(Own), .. type.GetConstructors()];
        foreach (ParameterInfo parameter in calls.SelectMany(call => call.GetParameters()).Where(parameter => IsNumber(parameter.ParameterType)))
            yield return (type.Name, parameter.Name ?? "");
    }

    private static bool IsNumber(Type type) => type == typeof(double) || type == typeof(double?) || type == typeof(ReadOnlySpan<double>);

    [GeneratedRegex("wavelength|thickness|diameter|spacing|pitch|depth|width|height|angle|hue|cortex", RegexOptions.IgnoreCase)]
    private static partial Regex Dimensional();

    [GeneratedRegex("(Nm|Um|Nm2|Um2|Degrees|Radians|Share)$", RegexOptions.IgnoreCase)]
    private static partial Regex Unit();

    [GeneratedRegex(@"^(?:public|internal)\s+(?:(?:static|sealed|abstract|partial|readonly|ref)\s+)*(?:record\s+struct|record|class|struct|interface|enum)\s+(\w+)", RegexOptions.Multiline)]
    private static partial Regex Declaration();
}
