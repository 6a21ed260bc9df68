using System.Diagnostics;

namespace RespDerive.Service.Tests;

/// <summary>Waits for conditions; a deadline ends a wait that would never.</summary>
internal static class Until
{
    private static readonly TimeSpan Deadline = TimeSpan.FromSeconds(20);
    private static readonly TimeSpan Look = TimeSpan.FromMilliseconds(40);

    /// <summary>The first answer that is not null.</summary>
    public static async Task<T> Some<T>(Func<Task<T?>> look, string what, Func<Task<string>>? otherwise = null) where T : class
    {
        var since = Stopwatch.StartNew();
        while (true)
        {
            if (await look() is { } found)
            {
                return found;
            }

            if (since.Elapsed > Deadline)
            {
                Assert.Fail($"Waited in vain for {what}. {(otherwise is null ? "" : await otherwise())}");
            }

            await Task.Delay(Look, TestContext.Current.CancellationToken);
        }
    }

    public static Task True(Func<bool> condition, string what, Func<string>? otherwise = null) =>
        Some(() => Task.FromResult(condition() ? "" : null), what, otherwise is null ? null : () => Task.FromResult(otherwise()));

    public static Task True(Func<Task<bool>> condition, string what) => Some(async () => await condition() ? "" : null, what);
}
