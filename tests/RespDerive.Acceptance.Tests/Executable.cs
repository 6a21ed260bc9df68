using System.Diagnostics;
using System.Text;

namespace RespDerive.Acceptance.Tests;

/// <summary>The built program as a process of its own.</summary>
internal sealed class Executable : IAsyncDisposable
{
    private readonly Process _process;
    private readonly StringBuilder _error = new();

    private Executable(IEnumerable<string> args, IEnumerable<(string Key, string Value)> environment)
    {
        var start = new ProcessStartInfo("dotnet", [Path.Combine(AppContext.BaseDirectory, "respderive.dll"), .. args])
        {
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        foreach (var (key, value) in environment)
        {
            start.Environment[key] = value;
        }

        _process = Process.Start(start)!;
        _process.ErrorDataReceived += (_, line) =>
        {
            lock (_error)
            {
                _error.AppendLine(line.Data);
            }
        };
        _process.BeginErrorReadLine();
    }

    /// <summary>What it wrote to standard error so far.</summary>
    public string Error
    {
        get { lock (_error) { return _error.ToString(); } }
    }

    /// <summary>Runs a command to its end.</summary>
    public static async Task<(int Code, string Output, string Error)> RunAsync(params string[] args)
    {
        await using var run = new Executable(args, []);
        var output = await run._process.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken);
        await run._process.WaitForExitAsync(TestContext.Current.CancellationToken);
        return (run._process.ExitCode, output, run.Error);
    }

    /// <summary>Starts <c>serve</c>; settings are keys below <c>RespDerive:</c>. Complete when it answers.</summary>
    public static async Task<Executable> ServeAsync(string address, params IEnumerable<(string Key, string Value)> settings)
    {
        var run = new Executable(["serve", "--urls", address], settings.Select(one => ("RespDerive__" + one.Key.Replace(":", "__", StringComparison.Ordinal), one.Value)));
        using var http = new HttpClient();
        await Service.Tests.Until.True(
            async () =>
            {
                Assert.False(run._process.HasExited, run.Error);
                try
                {
                    using var answer = await http.GetAsync($"{address}/health/live", TestContext.Current.CancellationToken);
                    return answer.IsSuccessStatusCode;
                }
                catch (HttpRequestException)
                {
                    return false;
                }
            },
            "the service to answer");
        return run;
    }

    /// <summary>Ends it at once, as kill -9 does.</summary>
    public async Task KillAsync()
    {
        _process.Kill();
        await _process.WaitForExitAsync(CancellationToken.None);
    }

    public async ValueTask DisposeAsync()
    {
        if (!_process.HasExited)
        {
            await KillAsync();
        }

        _process.Dispose();
    }
}
