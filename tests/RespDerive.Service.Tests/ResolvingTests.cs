using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>References resolve in the service as they do in files.</summary>
public sealed class ResolvingTests : IDisposable
{
    private const string Ward = "https://ward.example/fhir";
    private static readonly DateTimeOffset Analysed = TimeProvider.System.GetUtcNow().AddMinutes(-30);
    private readonly OddServer _server = new();

    public void Dispose() => _server.Dispose();

    [Fact]
    public async Task Specimen_named_by_its_identifier_is_found_early_or_late()
    {
        await using var alone = await Alone.StartAsync(_server);
        await alone.TellAsync([.. ChangedOxygen(), Named(Gas("Patient/p"))]);
        await Until.True(() => alone.Ratio() == 100, "the value without a time of collection");

        await alone.TellAsync(Known(Some.Specimen("blood", "p", Analysed.AddMinutes(-40))));
        await Until.True(() => alone.Ratio() == 200, "the value at the collection");

        // Without the identifier it is no longer the one named.
        var other = Some.Specimen("blood", "p", Analysed.AddMinutes(-40));
        other["meta"] = new JsonObject { ["lastUpdated"] = Some.Time(TimeProvider.System.GetUtcNow()) };
        await alone.TellAsync(other);
        await Until.True(() => alone.Ratio() == 100, "the value without it again");

        static JsonObject Named(JsonObject gas)
        {
            gas["specimen"] = new JsonObject { ["identifier"] = Identifier() };
            return gas;
        }

        static JsonObject Known(JsonObject specimen)
        {
            specimen["identifier"] = new JsonArray(Identifier());
            return specimen;
        }

        static JsonObject Identifier() => new() { ["system"] = "urn:ward:sample", ["value"] = "17" };
    }

    [Fact]
    public async Task URNs_of_a_Bundle_stand_for_its_entries_and_only_there()
    {
        await using var alone = await Alone.StartAsync(_server);
        await alone.TellAsync(ChangedOxygen());
        await alone.TellAsync(Bundle("p", Analysed.AddMinutes(-40)), Bundle("other", Analysed));
        await Until.True(() => alone.Ratio() == 200, "the value at the collection");
        await alone.SettledAsync();
        Assert.Equal(200, alone.Ratio());

        // The same URNs again, as careless senders number them.
        static JsonObject Bundle(string patient, DateTimeOffset collected)
        {
            var (gas, blood) = (Gas("urn:uuid:1"), Some.Specimen($"blood-{patient}", patient, collected));
            gas["id"] = $"gas-{patient}";
            gas["specimen"] = new JsonObject { ["reference"] = "urn:uuid:2" };
            return Entries(("urn:uuid:1", Some.Patient(patient)), ("urn:uuid:2", blood), ("urn:uuid:3", gas));
        }
    }

    [Fact]
    public async Task Resources_of_another_server_refer_to_that_server()
    {
        await using var alone = await Alone.StartAsync(_server);
        var gas = Gas("Patient/p");
        gas["specimen"] = new JsonObject { ["reference"] = "Specimen/blood" };
        await alone.TellAsync(Entries([.. ChangedOxygen().Append(Some.Specimen("blood", "p", Analysed.AddMinutes(-40))).Append(gas)
            .Select(one => ($"{Ward}/{one["resourceType"]}/{one["id"]}", one))]));
        await Until.True(() => alone.Ratio() == 200, "the value at the collection");
        var outcome = Assert.Single(alone.Store.Outcomes(new Storage.OutcomeFilter { Definition = "pf-ratio" })).Current!;
        Assert.Equal($"{Ward}/Patient/p", outcome.Patient);
        Assert.StartsWith($"{Ward}/Observation/gas", outcome.AnchorReference, StringComparison.Ordinal);
    }

    private static JsonObject[] ChangedOxygen() =>
        [Some.Patient("p"), Some.FiO2("before", "p", 40, Analysed.AddMinutes(-120)), Some.FiO2("after", "p", 80, Analysed.AddMinutes(-25))];

    /// <summary>Analysed after the oxygen was changed; where its draw is known, that was before.</summary>
    private static JsonObject Gas(string patient)
    {
        var gas = Some.Gas("gas", "p", 80, Analysed);
        gas["subject"] = new JsonObject { ["reference"] = patient };
        return gas;
    }

    private static JsonObject Entries(params (string Url, JsonObject Resource)[] entries) => new()
    {
        ["resourceType"] = "Bundle",
        ["type"] = "collection",
        ["entry"] = new JsonArray([.. entries.Select(entry => new JsonObject { ["fullUrl"] = entry.Url, ["resource"] = entry.Resource })]),
    };
}
