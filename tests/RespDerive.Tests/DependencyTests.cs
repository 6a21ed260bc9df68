using System.Reflection;

namespace RespDerive.Tests;

/// <summary>The rules of the codebase: who may refer to whom, and how long a file may be.</summary>
public sealed class DependencyTests
{
    private const int LongestFile = 400;

    [Fact]
    public void Physiology_refers_to_nothing_but_the_platform() => Assert.All(References("RespDerive.Physiology"), name => Assert.True(IsPlatform(name), name));

    [Fact]
    public void Timeline_refers_to_physiology_and_the_platform() =>
        Assert.All(References("RespDerive.Timeline"), name => Assert.True(IsPlatform(name) || name == "RespDerive.Physiology", name));

    [Fact]
    public void The_pure_projects_use_no_files_network_or_processes() => Assert.All(
        References("RespDerive.Physiology").Concat(References("RespDerive.Timeline")),
        name => Assert.DoesNotMatch(@"^System\.(IO\.(?!Hashing)|Net\.|Diagnostics\.Process|Data\.)", name));

    [Fact]
    public void Storage_knows_no_resource_types() =>
        Assert.DoesNotContain(References("RespDerive.Storage"), name => name.StartsWith("Hl7.", StringComparison.Ordinal) || name == "RespDerive.Fhir");

    [Fact]
    public void Fhir_knows_no_storage_and_no_service() =>
        Assert.DoesNotContain(References("RespDerive.Fhir"), name => name is "RespDerive.Storage" or "RespDerive.Service" or "RespDerive.Sandbox");

    [Fact]
    public void The_sandbox_shares_no_code_with_what_it_checks() =>
        Assert.DoesNotContain(References("RespDerive.Sandbox"), name => name.StartsWith("RespDerive.", StringComparison.Ordinal));

    [Fact]
    public void No_source_file_is_longer_than_four_hundred_lines()
    {
        var files = Directory.EnumerateFiles(Repository.PathOf("src"), "*.cs", SearchOption.AllDirectories)
            .Where(file => !file.Split(Path.DirectorySeparatorChar).Any(part => part is "bin" or "obj")).ToArray();
        Assert.NotEmpty(files);
        Assert.All(files, file => Assert.True(File.ReadLines(file).Count() <= LongestFile, file));
    }

    private static string[] References(string assembly) =>
        [.. Assembly.LoadFrom(Path.Combine(AppContext.BaseDirectory, assembly + ".dll")).GetReferencedAssemblies().Select(name => name.Name!)];

    private static bool IsPlatform(string name) =>
        name.StartsWith("System.", StringComparison.Ordinal) && File.Exists(Path.Combine(Path.GetDirectoryName(typeof(object).Assembly.Location)!, name + ".dll"));
}
