using System.Globalization;
using System.Runtime.InteropServices;

namespace RespDerive.Benchmarks;

/// <summary>What a figure was taken on; without it no figure means anything.</summary>
internal static class Machine
{
    public static string Line() => string.Create(CultureInfo.InvariantCulture,
        $"{TimeProvider.System.GetUtcNow():yyyy-MM-dd HH:mm} UTC, {Environment.ProcessorCount} processors, {RuntimeInformation.OSDescription}, {RuntimeInformation.FrameworkDescription}, load average {Load()}");

    private static string Load() => File.Exists("/proc/loadavg") ? string.Join(' ', File.ReadAllText("/proc/loadavg").Split(' ').Take(3)) : "unknown";
}
