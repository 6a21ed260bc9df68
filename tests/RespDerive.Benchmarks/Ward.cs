using System.Text;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Sandbox.Patients;
using RespDerive.Service;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks;

/// <summary>One message of the invented ward as it comes in.</summary>
internal sealed record Message(WardEventKind Kind, DateTimeOffset At, DateTimeOffset Filed, string Patient, string Type, string Id, byte[] Body);

/// <summary>The invented ward, always the same, and the site it lies in.</summary>
internal static class Ward
{
    public const string Source = "ehr";
    public const string Base = "https://ehr.example/fhir";

    public static DateTimeOffset Start { get; } = new(2026, 3, 2, 0, 0, 0, TimeSpan.Zero);

    public static PolicyBook Policies { get; } = new(PolicyDocument.WithHash(new Policy { PressureMmHg = 760 }));

    public static Site Site { get; } = new(Options(), Catalogue.Shipped, Policies);

    /// <summary>Messages in filing order.</summary>
    public static IReadOnlyList<Message> Play(TimeSpan duration, int beds = 1) =>
        [.. Scenario.Play(seed: 1, Start, duration, beds).Events.Select(one =>
            new Message(one.Kind, one.EventTime, one.FilingTime, one.Patient, one.Type, one.Id, Encoding.UTF8.GetBytes(one.Json.ToJsonString())))];

    private static ServiceOptions Options() => new() { Site = "ward-alder", Source = { Name = Source, Address = new Uri(Base) } };
}
