using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Service.Operations;

namespace RespDerive.Service.Intake;

/// <summary>
/// Polls every criterion: first-class intake where the source sends no notifications, and the net under notifications where it does.
/// One that the server refuses backs off by itself and does not keep the others waiting.
/// </summary>
internal sealed class Poller(Searches searches, SourceServer source, IOptions<ServiceOptions> options, TimeProvider time, ILogger<Poller> logger) : Loop(time, logger)
{
    private static readonly TimeSpan LongestBackOff = TimeSpan.FromMinutes(5);
    private static readonly TimeSpan Rest = TimeSpan.FromHours(1);
    private readonly Dictionary<string, (DateTimeOffset Due, int Failures, bool Read)> _state = new(StringComparer.Ordinal);
    private readonly TimeProvider _time = time;

    /// <summary>True once every criterion was read.</summary>
    public bool HasPolled { get; private set; }

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        var intake = options.Value.Intake;
        if (!source.IsConfigured || (intake.PollEvery == TimeSpan.Zero && HasPolled))
        {
            HasPolled = true;
            return Rest;
        }

        foreach (var criterion in intake.Searches)
        {
            var state = _state.GetValueOrDefault(criterion);
            if (state.Due <= _time.GetUtcNow() && !(state.Read && intake.PollEvery == TimeSpan.Zero))
            {
                _state[criterion] = await PollAsync(criterion, state.Failures, cancel) is { } wait
                    ? (_time.GetUtcNow() + wait, state.Failures + 1, state.Read)
                    : (_time.GetUtcNow() + intake.PollEvery, 0, true);
            }
        }

        HasPolled = intake.Searches.All(criterion => _state[criterion].Read);
        var next = intake.Searches.Select(criterion => _state[criterion]).Where(state => !state.Read || intake.PollEvery > TimeSpan.Zero)
            .Select(state => state.Due - _time.GetUtcNow()).DefaultIfEmpty(Rest).Min();
        return next > TimeSpan.Zero ? next : TimeSpan.Zero;
    }

    /// <summary>Null when it was read, else how long to leave it alone.</summary>
    private async Task<TimeSpan?> PollAsync(string criterion, int failures, CancellationToken cancel)
    {
        try
        {
            await searches.PollAsync(criterion, cancel);
            return null;
        }
        catch (SearchFailedException exception)
        {
            // Without the rest of the criterion, which may name a patient.
            var (type, answer) = (criterion.Split('?')[0], exception.Answer as ServerAnswer.Parked);
            logger.LogError("Poller failed to read {Type}: {Answer} {Text}", type, answer?.Code ?? exception.Answer.GetType().Name, answer?.Text ?? "and tries again");
            var wait = BackOff.After(failures, LongestBackOff, criterion);
            return (exception.Answer as ServerAnswer.Retry)?.After is { } asked && asked > wait ? asked : wait;
        }
    }
}
