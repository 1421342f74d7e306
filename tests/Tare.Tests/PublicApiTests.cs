using System.Reflection;

namespace Tare.Tests;

/// <summary>The public surface is written down in src/Tare/PublicApi.txt; a change of it must be meant.</summary>
public class PublicApiTests
{
    [Fact]
    public void Public_surface_is_as_written_down()
    {
        string file = Path.Combine(AppContext.BaseDirectory, "PublicApi.txt");
        string[] now = [.. Lines(typeof(Claim).Assembly).Order(StringComparer.Ordinal)];
        string[] written = [.. File.ReadAllLines(file).Where(line => line.Length > 0)];
        string fresh = Path.Combine(AppContext.BaseDirectory, "PublicApi.fresh.txt");
        File.WriteAllText(fresh, string.Join('\n', now) + "\n");
        Assert.True(
            now.SequenceEqual(written),
            $"new: {string.Join(" | ", now.Except(written))}\ngone: {string.Join(" | ", written.Except(now))}\nIf that is meant, copy PublicApi.fresh.txt from the test's folder over src/Tare/PublicApi.txt.");
    }

    private static IEnumerable<string> Lines(Assembly assembly)
    {
        foreach (Type type in assembly.GetExportedTypes())
        {
            string name = Name(type);
            yield return $"{name} : {(type.IsEnum ? "enum" : type.IsValueType ? "struct" : type.IsAbstract && type.IsSealed ? "static class" : "class")}";
            foreach (MemberInfo member in type.GetMembers(BindingFlags.Public | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly))
            {
                string? line = member switch
                {
                    ConstructorInfo c => $"{name}({Parameters(c)})",
                    MethodInfo { IsSpecialName: false } m when !m.Name.Contains('$') => $"{name}.{m.Name}{Generic(m)}({Parameters(m)}) -> {Name(m.ReturnType)}",
                    PropertyInfo p => $"{name}.{p.Name} -> {Name(p.PropertyType)}{(p.SetMethod is { IsPublic: true } ? " set" : "")}",
                    FieldInfo { IsLiteral: true } f => $"{name}.{f.Name} = {f.GetRawConstantValue()}",
                    FieldInfo { IsSpecialName: false } f => $"{name}.{f.Name} -> {Name(f.FieldType)}",
                    _ => null,
                };
                if (line is not null)
                    yield return line;
            }
        }
    }

    private static string Generic(MethodInfo method) =>
        method.IsGenericMethod ? $"<{string.Join(", ", method.GetGenericArguments().Select(Name))}>" : "";

    private static string Parameters(MethodBase method) => string.Join(", ", method.GetParameters().Select(p =>
        $"{Name(p.ParameterType)} {p.Name}{(p.HasDefaultValue ? " = " + (p.DefaultValue is null ? "null" : FormattableString.Invariant($"{p.DefaultValue}")) : "")}"));

    private static string Name(Type type)
    {
        if (type.IsArray)
            return Name(type.GetElementType()!) + "[" + new string(',', type.GetArrayRank() - 1) + "]";
        if (type.IsByRef)
            return "ref " + Name(type.GetElementType()!);
        string name = type.Name.Split('`')[0];
        return type.IsGenericType ? $"{name}<{string.Join(", ", type.GetGenericArguments().Select(Name))}>" : name;
    }
}
