using System.Diagnostics;
using System.Globalization;
using RespDerive.Storage;

namespace RespDerive.Benchmarks.EndToEnd;

/// <summary>Journalling alone, deriving, and deriving with delivery under the same load, in turns; medians of the rounds.</summary>
internal static class Comparison
{
    private static readonly TimeSpan Longest = TimeSpan.FromMinutes(3);

    private sealed record Run(string Name, int Sent, double Sending, double Whole, double Processor, int Turns, Counts? Counts, bool Finished)
    {
        public double Rate => Sent / Whole;

        public double Cost => Processor * 1000 / Sent;
    }

    public static async Task RunAsync(IReadOnlyList<string> figures)
    {
        var seconds = TimeSpan.FromSeconds(figures.Count > 0 ? double.Parse(figures[0], CultureInfo.InvariantCulture) : 10);
        var rounds = figures.Count > 1 ? int.Parse(figures[1], CultureInfo.InvariantCulture) : 3;
        Console.WriteLine(Machine.Line());
        Console.WriteLine($"{Load.Beds} beds, {seconds.TotalSeconds} s of load, {rounds} rounds after one to warm up; clients, service and endpoint share this process.");
        var load = new Load();
        await RoundAsync(load, TimeSpan.FromSeconds(Math.Min(3, seconds.TotalSeconds)));
        Console.WriteLine("| run | observations | sending s | until done s | observations/s | processor ms/observation | turns | observations/turn | results | withheld | delivered |");
        Console.WriteLine("|---|---:|---:|---:|---:|---:|---:|---:|---:|---:|---:|");
        var all = new List<Run>();
        for (var round = 0; round < rounds; round++)
        {
            var runs = await RoundAsync(load, seconds);
            all.AddRange(runs);
            foreach (var run in runs)
            {
                Console.WriteLine(Row(run));
            }
        }

        Tell(all);
        Console.WriteLine(Machine.Line());
    }

    private static async Task<Run[]> RoundAsync(Load load, TimeSpan duration) =>
        [await JournalAsync(load, duration), await ServiceAsync(load, duration, delivers: false), await ServiceAsync(load, duration, delivers: true)];

    private static async Task<Run> JournalAsync(Load load, TimeSpan duration)
    {
        await using var journal = await JournalAlone.StartAsync();
        var address = journal.Address + "/notify";
        await load.SendStandingAsync(address);
        return await MeasureAsync("journalling alone", () => load.SendAsync(address, duration), () => Task.FromResult(true), () => (0, null));
    }

    private static async Task<Run> ServiceAsync(Load load, TimeSpan duration, bool delivers)
    {
        await using var service = await LoadedService.StartAsync(delivers);
        await load.SendStandingAsync(service.Endpoint);
        await load.SendStandingAsync(service.Address);
        await service.IdleAsync(Longest);
        var before = service.Turns;
        return await MeasureAsync(delivers ? "derived and delivered" : "derived", () => load.SendAsync(service.Address, duration),
            () => service.IdleAsync(Longest), () => (service.Turns - before, service.Counts));
    }

    private static async Task<Run> MeasureAsync(string name, Func<Task<int>> send, Func<Task<bool>> finish, Func<(int Turns, Counts? Counts)> tell)
    {
        GC.Collect();
        var (start, processor) = (Stopwatch.GetTimestamp(), Environment.CpuUsage.TotalTime);
        var sent = await send();
        var sending = Stopwatch.GetElapsedTime(start).TotalSeconds;
        var finished = await finish();
        var whole = Stopwatch.GetElapsedTime(start).TotalSeconds;
        var used = (Environment.CpuUsage.TotalTime - processor).TotalSeconds;
        var (turns, counts) = tell();
        return new Run(name, sent, sending, whole, used, turns, counts, finished);
    }

    private static string Row(Run run) => string.Create(CultureInfo.InvariantCulture,
        $"| {run.Name}{(run.Finished ? "" : " (not finished)")} | {run.Sent} | {run.Sending:F1} | {run.Whole:F1} | {run.Rate:F0} | {run.Cost:F2} | {run.Turns} | {(run.Turns == 0 ? "" : (run.Sent / (double)run.Turns).ToString("F1", CultureInfo.InvariantCulture))} | {run.Counts?.Results} | {run.Counts?.Withheld} | {run.Counts?.Delivered} |");

    private static void Tell(IReadOnlyList<Run> all)
    {
        var medians = all.GroupBy(run => run.Name).Select(group => (Name: group.Key, Rate: Table.Middle(group.Select(run => run.Rate)), Cost: Table.Middle(group.Select(run => run.Cost)))).ToArray();
        Console.WriteLine("| median | observations/s | of journalling alone | processor ms/observation |");
        Console.WriteLine("|---|---:|---:|---:|");
        foreach (var (name, rate, cost) in medians)
        {
            Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| {name} | {rate:F0} | {rate / medians[0].Rate:P0} | {cost:F2} |"));
        }
    }
}
