using System.Diagnostics;
using System.Text.Json;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// Every conversion of the unit table against a reference library for UCUM that nobody here wrote: @lhncbc/ucum-lhc of the
/// Lister Hill National Center for Biomedical Communications (tests/peers/units). Needs node and npm; without them it is skipped,
/// except in the build server (CI=true), where it fails.
/// </summary>
public sealed class UnitReferenceTests
{
    /// <summary>Written by the trade for resistance; read strictly, UCUM divides from left to right, which is pressure per volume and time.</summary>
    private const string TradeResistance = "cm[H2O]/L/s";

    private static readonly decimal[] Values = [1m, 7.3m, 120m];

    [Fact]
    public async Task Every_conversion_agrees_with_the_reference_library()
    {
        var folder = await InstalledAsync();
        var pairs = Ucum.Accepted.SelectMany(from => Ucum.Alike(from).Select(to => (From: from, To: to))).ToArray();
        Assert.True(pairs.Length > 300);
        var asked = pairs.SelectMany(pair => Values.Select(value => (Value: value, pair.From, pair.To))).ToArray();

        var answers = await AnswersAsync(folder, asked);

        var wrong = asked.Zip(answers).Select(entry => Complaint(entry.First.Value, entry.First.From, entry.First.To, entry.Second)).OfType<string>().ToArray();
        Assert.True(wrong.Length == 0, string.Join('\n', wrong));
    }

    private static string? Complaint(decimal value, string from, string to, double? reference)
    {
        if (!Ucum.TryConvert(value, from, to, out var ours))
        {
            return $"{from} to {to} is refused by the table";
        }

        if (IsConvention(from, to))
        {
            return reference is null ? null : $"{from} to {to} is no convention: the reference converts it";
        }

        return reference is { } theirs && Math.Abs(((double)ours / theirs) - 1) <= 1e-9 ? null : $"{value} {from} is {ours} {to}, reference {reference}";
    }

    /// <summary>Conversions of the trade that UCUM does not know: the resistance above, and the 22.4 L that a mole of gas takes.</summary>
    private static bool IsConvention(string from, string to) =>
        from != to && (from == TradeResistance || to == TradeResistance || IsAmount(from) != IsAmount(to));

    private static bool IsAmount(string unit) => unit.Contains("mol", StringComparison.Ordinal) || unit.Contains("eq", StringComparison.Ordinal);

    private static async Task<string> InstalledAsync()
    {
        var folder = Path.Combine(Root(), "tests", "peers", "units");
        if (!Directory.Exists(Path.Combine(folder, "node_modules", "@lhncbc", "ucum-lhc")))
        {
            var (code, _, error) = await RunAsync(folder, "npm", "", "ci", "--loglevel=error");
            SkipUnless(code == 0, "npm ci in tests/peers/units: " + error);
        }

        return folder;
    }

    private static async Task<double?[]> AnswersAsync(string folder, IEnumerable<(decimal Value, string From, string To)> asked)
    {
        var (code, output, error) = await RunAsync(folder, "node", JsonSerializer.Serialize(asked.Select(one => new object[] { one.Value, one.From, one.To })), "convert.mjs");
        SkipUnless(code is not null, error);
        Assert.True(code == 0, error);
        return JsonSerializer.Deserialize<double?[]>(output)!;
    }

    /// <summary>Exit code null when the program cannot be started.</summary>
    private static async Task<(int? Code, string Output, string Error)> RunAsync(string folder, string program, string input, params string[] arguments)
    {
        var start = new ProcessStartInfo(program, arguments) { WorkingDirectory = folder, RedirectStandardInput = true, RedirectStandardOutput = true, RedirectStandardError = true };
        try
        {
            using var process = Process.Start(start)!;
            var (output, error) = (process.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken), process.StandardError.ReadToEndAsync(TestContext.Current.CancellationToken));
            await process.StandardInput.WriteAsync(input);
            process.StandardInput.Close();
            await process.WaitForExitAsync(TestContext.Current.CancellationToken);
            return (process.ExitCode, await output, await error);
        }
        catch (System.ComponentModel.Win32Exception missing)
        {
            return (null, "", $"{program} cannot be started: {missing.Message}");
        }
    }

    private static void SkipUnless(bool possible, string reason)
    {
        if (Environment.GetEnvironmentVariable("CI") == "true")
        {
            Assert.True(possible, reason);
        }

        Assert.SkipUnless(possible, "UNITS NOT CHECKED AGAINST THE REFERENCE LIBRARY. " + reason);
    }

    private static string Root()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "RespDerive.sln")))
        {
            folder = folder.Parent ?? throw new InvalidOperationException("RespDerive.sln not found above the tests.");
        }

        return folder.FullName;
    }
}
