using System.Security.Cryptography;
using System.Text;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

/// <summary>Values whose details do not matter to a test.</summary>
internal static class Some
{
    public static readonly DateTimeOffset Start = new(2026, 3, 1, 8, 0, 0, TimeSpan.Zero);

    public static DateTimeOffset At(double minutes) => Start.AddMinutes(minutes);

    public static Kind? Kind(string key) => Kinds.Find(key) ?? Events.All.FirstOrDefault(kind => kind.Key == key);

    public static ResourceKey Key(string reference) => reference.Split('/') is [var type, var id] ? new("ehr", type, id) : throw new ArgumentException(reference);

    /// <summary>Version n of a resource, sent in minute n.</summary>
    public static Arrival Arrival(string reference, int version = 1, string? patient = "Patient/a", string? content = null, params string[] references)
    {
        var body = Encoding.UTF8.GetBytes(content ?? $"{reference} {version}");
        return new Arrival
        {
            Key = Key(reference),
            Version = $"{version}",
            Order = new VersionOrder(At(version), version, Digest(body)),
            Patient = patient,
            Body = body,
            Arrived = At(1000),
            References = references,
        };
    }

    public static Arrival Unordered(string reference, string content) =>
        Arrival(reference, content: content) is var arrival ? arrival with { Order = new VersionOrder(null, null, arrival.Order.Digest) } : null!;

    public static string Digest(byte[] body) => Convert.ToHexStringLower(SHA256.HashData(body));

    public static string Text(ResourceBody? body) => body is null ? "none" : body.Gone ? "gone" : Encoding.UTF8.GetString(body.Body.Span);

    public static Reading Reading(string reference, Kind kind, DateTimeOffset at, double value = 1, string part = "") => new()
    {
        Id = new ReadingId(Key(reference), part),
        Version = "1",
        Kind = kind,
        Value = value,
        At = at,
        AtText = at.ToString("O"),
        Patient = "Patient/a",
    };

    public static Outcome Outcome(string name, DateTimeOffset at, double? value, string? withheld = null, string definition = "pf-ratio") => new()
    {
        Identity = NameBasedUuid.Of(NameBasedUuid.Site("test"), name),
        Definition = definition,
        Revision = 1,
        Source = "ehr",
        Patient = "Patient/a",
        Anchor = new UsedReading(Key($"Observation/{name}"), "", "1", "", at, value ?? 0),
        AnchorReference = $"Observation/{name}/_history/1",
        At = at,
        AtText = at.ToString("O"),
        Value = value,
        Published = value is { } number ? (decimal)number : null,
        Unit = value is null ? null : "mm[Hg]",
        Withheld = withheld,
    };

    public static OutcomeChange Change(Outcome now) => new(now.Identity, null, now);
}

/// <summary>A store in its own temporary folder.</summary>
internal sealed class TemporaryStore : IAsyncDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("store-").FullName;

    public TemporaryStore() => Store = Store.Open(Path, Some.Kind);

    public string Path => System.IO.Path.Combine(_folder, "store.db");

    public Store Store { get; private set; }

    public async Task ReopenAsync(Func<string, Kind?>? kinds = null)
    {
        await Store.DisposeAsync();
        Store = Store.Open(Path, kinds ?? Some.Kind);
    }

    public async Task<IReadOnlyList<Appended>> AppendAsync(params Arrival[] arrivals) => await Store.AppendAsync(arrivals);

    public async Task<long> PatientAsync(string reference = "Patient/a")
    {
        await AppendAsync(Some.Arrival(reference, patient: reference));
        return Store.PatientNumber("ehr", reference)!.Value;
    }

    /// <summary>Closes everything that is open, as a turn that finds nothing would.</summary>
    public async Task SettleAsync()
    {
        foreach (var patient in Store.PatientsWithOpenRows(int.MaxValue))
        {
            var turn = Store.OpenTurn(patient)!;
            Assert.True(await Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo, new TurnChanges(), Some.Start));
        }
    }

    public async Task<bool> CommitAsync(long patient, TurnChanges changes, double minute = 0)
    {
        var turn = Store.OpenTurn(patient)!;
        return await Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo, changes, Some.At(minute));
    }

    public async Task CommitOutcomesAsync(long patient, double minute, params Outcome[] outcomes) =>
        Assert.True(await CommitAsync(patient, new TurnChanges { Outcomes = [.. outcomes.Select(Some.Change)] }, minute));

    /// <summary>Holds the writer in a transaction, so that what is written meanwhile goes into one transaction together.</summary>
    public async Task<(Task Blocked, TaskCompletionSource Gate)> BlockAsync()
    {
        var (started, gate) = (new TaskCompletionSource(), new TaskCompletionSource());
        var blocked = Store.WriteAsync(_ =>
        {
            started.SetResult();
            gate.Task.GetAwaiter().GetResult();
            return 0;
        });
        await started.Task;
        return (blocked, gate);
    }

    public async ValueTask DisposeAsync()
    {
        await Store.DisposeAsync();
        Directory.Delete(_folder, recursive: true);
    }
}
