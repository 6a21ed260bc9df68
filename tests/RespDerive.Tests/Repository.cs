namespace RespDerive.Tests;

/// <summary>The folder that holds the solution, found from where the tests run.</summary>
internal static class Repository
{
    public static string Root { get; } = Find();

    public static string PathOf(params string[] parts) => Path.Combine([Root, .. parts]);

    private static string Find()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "RespDerive.sln")))
        {
            folder = folder.Parent ?? throw new InvalidOperationException("RespDerive.sln not found above the tests.");
        }

        return folder.FullName;
    }
}
