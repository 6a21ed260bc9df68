using System.Globalization;
using BenchmarkDotNet.Reports;

namespace RespDerive.Benchmarks;

/// <summary>One line per figure, medians.</summary>
internal static class Table
{
    private const char Quote = '\'';

    public static void Head()
    {
        Console.WriteLine("| stage | per | clock | median | allocated |");
        Console.WriteLine("|---|---|---|---:|---:|");
    }

    public static void Rows(Summary summary)
    {
        foreach (var problem in summary.ValidationErrors.Where(error => error.IsCritical))
        {
            Console.WriteLine(problem.Message);
        }

        var done = summary.Reports.Where(report => report.ResultStatistics is not null).ToArray();
        foreach (var report in done)
        {
            var what = report.BenchmarkCase.Descriptor;
            var clock = Attribute.IsDefined(what.Type, typeof(WaitsForDiskAttribute)) ? "wall" : "processor";
            var parameters = string.Concat(report.BenchmarkCase.Parameters.Items.Select(item => " " + item.Value));
            Console.WriteLine($"| {what.Type.Name} | {what.WorkloadMethodDisplayInfo.Trim(Quote)}{parameters} | {clock} | {Time(report.ResultStatistics!.Median)} | {Bytes(report.GcStats.GetBytesAllocatedPerOperation(report.BenchmarkCase))} |");
        }

        if (done.Length > 2 && done[0].BenchmarkCase.HasParameters)
        {
            Console.WriteLine($"| {done[0].BenchmarkCase.Descriptor.Type.Name} | **median of these** | processor | {Time(Middle(done.Select(report => report.ResultStatistics!.Median)))} | {Bytes((long)Middle(done.Select(report => (double)(report.GcStats.GetBytesAllocatedPerOperation(report.BenchmarkCase) ?? 0))))} |");
        }

        foreach (var failed in summary.Reports.Where(report => report.ResultStatistics is null))
        {
            Console.WriteLine($"{failed.BenchmarkCase.DisplayInfo} gave nothing; see {summary.LogFilePath}");
        }
    }

    /// <summary>The middle value; of an even number the mean of the two in the middle.</summary>
    public static double Middle(IEnumerable<double> values)
    {
        var sorted = values.Order().ToArray();
        return (sorted[(sorted.Length - 1) / 2] + sorted[sorted.Length / 2]) / 2;
    }

    private static string Time(double ns) => ns switch
    {
        < 1e4 => string.Create(CultureInfo.InvariantCulture, $"{ns:F0} ns"),
        < 1e7 => string.Create(CultureInfo.InvariantCulture, $"{ns / 1e3:F1} µs"),
        _ => string.Create(CultureInfo.InvariantCulture, $"{ns / 1e6:F2} ms"),
    };

    private static string Bytes(long? bytes) => bytes switch
    {
        null => "?",
        < 10_000 => string.Create(CultureInfo.InvariantCulture, $"{bytes} B"),
        _ => string.Create(CultureInfo.InvariantCulture, $"{bytes / 1024.0:F0} KiB"),
    };
}
