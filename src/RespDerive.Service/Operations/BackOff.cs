using System.Text;

namespace RespDerive.Service.Operations;

/// <summary>Waits between tries: doubling from one second up to a cap, spread by a fifth so that many do not come at once.</summary>
internal static class BackOff
{
    /// <summary>The wait after a number of failed tries. The spread comes from the key, so that it needs no randomness.</summary>
    public static TimeSpan After(int tries, TimeSpan longest, string key)
    {
        var doubled = TimeSpan.FromSeconds(Math.Pow(2, Math.Min(tries, 20)));
        var wait = doubled < longest ? doubled : longest;
        var spread = Crc(key, tries) % 1000 / 1000.0;
        return wait * (0.9 + (0.2 * spread));
    }

    private static uint Crc(string key, int tries)
    {
        // FNV-1a: short, even, and the same on every machine.
        var hash = 2166136261u;
        foreach (var b in Encoding.UTF8.GetBytes(key + tries.ToString(System.Globalization.CultureInfo.InvariantCulture)))
        {
            hash = unchecked((hash ^ b) * 16777619u);
        }

        return hash;
    }
}
