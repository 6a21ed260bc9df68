using System.Diagnostics;

namespace RespDerive.Storage.Tests;

public sealed class CrashTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("store-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    // SIGKILL shows that nothing is acknowledged before COMMIT; that COMMIT reaches the disk rests on synchronous=FULL, checked at opening.
    [Theory]
    [InlineData(1)]
    [InlineData(300)]
    [InlineData(2000)]
    public async Task Every_acknowledged_version_is_there_after_the_process_was_killed(int acknowledgements)
    {
        var path = Path.Combine(_folder, "store.db");
        using var process = Process.Start(new ProcessStartInfo(Environment.ProcessPath!, ["append", path]) { RedirectStandardOutput = true })!;
        var acknowledged = new List<string>();
        while (await process.StandardOutput.ReadLineAsync(TestContext.Current.CancellationToken) is { } line)
        {
            acknowledged.Add(line);
            if (acknowledged.Count == acknowledgements)
            {
                process.Kill();
            }
        }

        await process.WaitForExitAsync(TestContext.Current.CancellationToken);
        Assert.True(acknowledged.Count >= acknowledgements);
        await using var store = Store.Open(path, Some.Kind);
        Assert.Empty(store.CheckIntegrity());
        Assert.All(acknowledged, n => Assert.Equal($"Observation/{n} 1", Some.Text(store.Find("ehr", $"Observation/{n}"))));
        var open = store.PatientsWithOpenRows(100).Sum(patient => store.OpenTurn(patient, int.MaxValue)!.Resources.Count);
        Assert.Equal(store.Counts().Received, open);
    }
}
