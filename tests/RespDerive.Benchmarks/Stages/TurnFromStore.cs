using BenchmarkDotNet.Attributes;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks.Stages;

/// <summary>A turn as the service takes it, on a store that holds a day of the patient: open, read, look up, work out. Without the commit.</summary>
public class TurnFromStore
{
    private TemporaryStore _temporary = null!;
    private long _patient;

    [GlobalSetup]
    public async Task SetUpAsync()
    {
        _temporary = new TemporaryStore();
        await _temporary.AppendAsync(Day.Made.Messages.Where(message => !Day.Made.IsOfMinute(message)));
        _patient = _temporary.Store.PatientNumber(Ward.Source, Day.Made.Messages[^1].Patient)!.Value;
        await _temporary.TakeAllAsync(_patient);
        await _temporary.AppendAsync(Day.Made.Messages.Where(Day.Made.IsOfMinute));
    }

    [GlobalCleanup]
    public async Task CleanUpAsync() => await _temporary.DisposeAsync();

    [Benchmark(Description = "turn, a minute of the devices")]
    public TurnChanges Minute() => _temporary.Work(_patient).Changes;

    [Benchmark(Description = "turn, a minute of the devices corrected 12 h later")]
    public TurnChanges Late()
    {
        using var history = _temporary.Store.History(_patient);
        return Turn.Run(Ward.Site.Evaluator, history, Day.Made.Noon, null);
    }

    [Benchmark(Description = "opening a turn, part of each")]
    public TurnInput? Open() => _temporary.Store.OpenTurn(_patient);
}
