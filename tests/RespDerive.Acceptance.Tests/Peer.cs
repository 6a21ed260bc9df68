using System.ComponentModel;
using System.Diagnostics;
using System.Reflection;

[assembly: AssemblyFixture(typeof(RespDerive.Acceptance.Tests.Peer))]

namespace RespDerive.Acceptance.Tests;

/// <summary>A FHIR R4 server that nobody here wrote, as a process of its own; one for each start.</summary>
public sealed class Peer : IAsyncLifetime
{
    private static readonly string s_folder = typeof(Peer).Assembly.GetCustomAttributes<AssemblyMetadataAttribute>().Single(one => one.Key == "Peers").Value!;
    private string? _missing;

    public async ValueTask InitializeAsync()
    {
        try
        {
            if (!Directory.Exists(Path.Combine(s_folder, "node_modules")))
            {
                using var install = Process.Start(new ProcessStartInfo("npm", ["ci"]) { WorkingDirectory = s_folder, RedirectStandardOutput = true, RedirectStandardError = true })!;
                var text = await install.StandardOutput.ReadToEndAsync() + await install.StandardError.ReadToEndAsync();
                await install.WaitForExitAsync();
                _missing = install.ExitCode == 0 ? null : $"npm ci ended with {install.ExitCode}: {text}";
            }
        }
        catch (Win32Exception)
        {
            _missing = "npm is not installed";
        }
    }

    /// <summary>Starts a server without any content; its base is told. Without Node the test is skipped, except where everything must run.</summary>
    internal async Task<Running> StartAsync()
    {
        if (_missing is null)
        {
            try
            {
                return await Running.StartAsync();
            }
            catch (Win32Exception)
            {
                _missing = "node is not installed";
            }
        }

        if (Environment.GetEnvironmentVariable("CI") == "true")
        {
            Assert.Fail(_missing);
        }

        Assert.Skip($"NOT TESTED against an independent server: {_missing}");
        throw new UnreachableException();
    }

    public ValueTask DisposeAsync() => ValueTask.CompletedTask;

    internal sealed class Running(Process process, string baseUrl) : IDisposable
    {
        public string BaseUrl => baseUrl;

        public static async Task<Running> StartAsync()
        {
            var process = Process.Start(new ProcessStartInfo("node", ["r4-server.mjs"]) { WorkingDirectory = s_folder, RedirectStandardInput = true, RedirectStandardOutput = true })!;
            var ready = await process.StandardOutput.ReadLineAsync(TestContext.Current.CancellationToken);
            Assert.StartsWith("ready ", ready, StringComparison.Ordinal);
            return new Running(process, ready!["ready ".Length..]);
        }

        public void Dispose()
        {
            process.Kill();
            process.Dispose();
        }
    }
}
