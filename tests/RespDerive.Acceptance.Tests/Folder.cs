namespace RespDerive.Acceptance.Tests;

/// <summary>A folder of one test.</summary>
internal sealed class Folder : IDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateDirectory(Path.Combine(AppContext.BaseDirectory, "folders", Guid.NewGuid().ToString("N")));

    public string this[string file] => Path.Combine(_folder.FullName, file);

    public void Dispose() => _folder.Delete(recursive: true);
}
