using System.Diagnostics.Metrics;

namespace RespDerive.Service.Tests;

/// <summary>What one of our counters adds up to with a label, over all services of this run.</summary>
internal sealed class Counted : IDisposable
{
    private readonly MeterListener _listener = new();
    private long _sum;

    public Counted(string name, string? label = null)
    {
        _listener.InstrumentPublished = (instrument, listener) =>
        {
            if (instrument.Meter.Name == "RespDerive" && instrument.Name == name)
            {
                listener.EnableMeasurementEvents(instrument);
            }
        };
        _listener.SetMeasurementEventCallback<long>((_, by, labels, _) =>
        {
            if (label is null || labels.ToArray().Any(one => one.Value?.ToString() == label))
            {
                Interlocked.Add(ref _sum, by);
            }
        });
        _listener.Start();
    }

    public long Sum => Interlocked.Read(ref _sum);

    public void Dispose() => _listener.Dispose();
}
