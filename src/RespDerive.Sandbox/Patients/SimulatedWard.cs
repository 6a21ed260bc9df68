using System.Net.Http.Headers;
using System.Text;

namespace RespDerive.Sandbox.Patients;

/// <summary>How the ward is played against an endpoint.</summary>
public sealed class WardOptions
{
    public int Seed { get; init; } = 1;

    public int Beds { get; init; } = Scenario.Patients;

    /// <summary>Simulated time that is already in the record at the start; sent as fast as the endpoint takes it.</summary>
    public TimeSpan BackHistory { get; init; } = TimeSpan.FromHours(3);

    /// <summary>Simulated time that is played live.</summary>
    public TimeSpan Live { get; init; } = TimeSpan.FromHours(6);

    /// <summary>Simulated minutes per real minute, at least 1, while live.</summary>
    public double TimeScale { get; init; } = 60;

    public TimeProvider Clock { get; init; } = TimeProvider.System;

    /// <summary>Told of each message after the endpoint accepted it.</summary>
    public Action<ScenarioEvent>? Filed { get; init; }
}

/// <summary>
/// Sends the scenario to a FHIR endpoint over HTTP, in filing order. Simulated time lies in the past and reaches
/// the present exactly when the live part ends, so nothing is ever dated in the future.
/// </summary>
public static class SimulatedWard
{
    private const int Attempts = 5;

    /// <summary>The scenario that <see cref="RunAsync"/> plays when started at this instant.</summary>
    public static Scenario ScenarioAt(DateTimeOffset start, WardOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        return Scenario.Play(options.Seed, LiveFrom(start, options) - options.BackHistory, options.BackHistory + options.Live, options.Beds);
    }

    /// <summary>Plays the ward to its end; throws <see cref="HttpRequestException"/> when the endpoint keeps refusing.</summary>
    public static async Task<Scenario> RunAsync(string baseUrl, WardOptions options, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(options);
        ArgumentOutOfRangeException.ThrowIfLessThan(options.TimeScale, 1);
        var start = options.Clock.GetUtcNow();
        var scenario = ScenarioAt(start, options);
        var liveFrom = LiveFrom(start, options);
        using var http = new HttpClient();
        foreach (var message in scenario.Events)
        {
            var due = start + ((message.FilingTime - liveFrom) / options.TimeScale);
            var wait = due - options.Clock.GetUtcNow();
            if (wait > TimeSpan.Zero)
            {
                await Task.Delay(wait, options.Clock, cancel).ConfigureAwait(false);
            }
            await Send(http, baseUrl, message, options.Clock, cancel).ConfigureAwait(false);
            options.Filed?.Invoke(message);
        }
        return scenario;
    }

    private static DateTimeOffset LiveFrom(DateTimeOffset start, WardOptions options) => start - options.Live + (options.Live / options.TimeScale);

    private static async Task Send(HttpClient http, string baseUrl, ScenarioEvent message, TimeProvider clock, CancellationToken cancel)
    {
        var body = Encoding.UTF8.GetBytes(message.Json.ToJsonString());
        for (var attempt = 1; ; attempt++)
        {
            try
            {
                using var content = new ByteArrayContent(body) { Headers = { ContentType = new MediaTypeHeaderValue("application/fhir+json") } };
                using var response = await http.PutAsync($"{baseUrl}/{message.Type}/{message.Id}", content, cancel).ConfigureAwait(false);
                response.EnsureSuccessStatusCode();
                return;
            }
            catch (HttpRequestException) when (attempt < Attempts)
            {
                await Task.Delay(TimeSpan.FromMilliseconds(100 * attempt), clock, cancel).ConfigureAwait(false);
            }
        }
    }
}
