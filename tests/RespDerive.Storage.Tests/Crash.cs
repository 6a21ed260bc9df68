using System.Globalization;

namespace RespDerive.Storage.Tests;

/// <summary>The process that the crash test kills: appends until it dies, and says what was acknowledged.</summary>
internal static class Crash
{
    private const int Callers = 8;

    public static async Task<int> AppendAsync(string path, TextWriter acknowledged)
    {
        await using var store = Store.Open(path, Some.Kind);
        await Task.WhenAll(Enumerable.Range(0, Callers).Select(caller => Task.Run(async () =>
        {
            for (var n = caller; ; n += Callers)
            {
                await store.AppendAsync([Some.Arrival($"Observation/{n}", patient: $"Patient/{n % 7}")]);
                lock (acknowledged)
                {
                    acknowledged.WriteLine(n.ToString(CultureInfo.InvariantCulture));
                    acknowledged.Flush();
                }
            }
        })));
        return 0;
    }
}
