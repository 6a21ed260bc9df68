using System.Diagnostics;
using System.Net.Http.Headers;
using RespDerive.Sandbox.Patients;

namespace RespDerive.Benchmarks.EndToEnd;

/// <summary>
/// The ward as a load: many beds, each minute of each bed after the one before, so that turns stay as small as they are on a ward.
/// A client owns some beds and sends its next message when the last one is answered.
/// </summary>
internal sealed class Load
{
    public const int Beds = 120;
    private const int Clients = 12;
    private static readonly TimeSpan Played = TimeSpan.FromMinutes(60);
    private readonly Message[] _standing;
    private readonly Message[][] _shares;

    public Load()
    {
        var all = Ward.Play(Played, Beds);
        _standing = [.. all.Where(message => message.Type != "Observation" || message.Kind == WardEventKind.Standing)];
        var known = _standing.ToHashSet();
        _shares = [.. all.Where(message => !known.Contains(message)).GroupBy(message => message.Patient)
            .Select((bed, number) => (bed, number)).GroupBy(entry => entry.number % Clients)
            .Select(share => share.SelectMany(entry => entry.bed).OrderBy(message => message.Filed).ToArray())];
    }

    /// <summary>What the record knows before: people, encounters, devices, specimens.</summary>
    public async Task SendStandingAsync(string address)
    {
        using var http = new HttpClient();
        foreach (var message in _standing)
        {
            await SendAsync(http, address, message, CancellationToken.None);
        }
    }

    /// <summary>Sends Observations until the time is up or all are sent; how many were taken.</summary>
    public async Task<int> SendAsync(string address, TimeSpan duration)
    {
        var start = Stopwatch.GetTimestamp();
        using var http = new HttpClient(new SocketsHttpHandler { MaxConnectionsPerServer = Clients });
        var sent = await Task.WhenAll(_shares.Select(share => Task.Run(async () =>
        {
            var count = 0;
            foreach (var message in share.TakeWhile(_ => Stopwatch.GetElapsedTime(start) < duration))
            {
                await SendAsync(http, address, message, CancellationToken.None);
                count++;
            }

            return count;
        })));
        return sent.Sum();
    }

    private static async Task SendAsync(HttpClient http, string address, Message message, CancellationToken cancel)
    {
        using var content = new ByteArrayContent(message.Body) { Headers = { ContentType = new MediaTypeHeaderValue("application/fhir+json") } };
        using var answer = await http.PutAsync($"{address}/{message.Type}/{message.Id}", content, cancel);
        answer.EnsureSuccessStatusCode();
    }
}
