using System.Globalization;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Fhir;

/// <summary>When a reading was true of the patient.</summary>
/// <param name="At">The moment; for a refused time the best place on the timeline there is.</param>
/// <param name="Text">As sent, with the site's zone added where none was.</param>
/// <param name="Refused">time-uncertain, or null.</param>
/// <param name="Flags">zone-assumed, time-uncertain.</param>
internal readonly record struct EventTime(DateTimeOffset At, string Text, string? Refused, IReadOnlyList<string> Flags);

/// <summary>The rules of event time for one resource version.</summary>
internal sealed class EventTimes(TimeZoneInfo? zone, TimeSpan allowedFuture, ResourceFacts facts)
{
    private static readonly TimeSpan WideGap = TimeSpan.FromMinutes(60);

    private sealed record Moment(DateTimeOffset At, string Text, bool IsDate, bool ZoneAssumed, bool Sure);

    /// <summary>Time of an Observation's reading.</summary>
    public EventTime Of(ObservationFacts observation, Origin origin, EffectiveFact? collected)
    {
        var effective = Read(Chosen(observation.Effective, origin));
        var drawn = origin == Origin.Laboratory && Read(Chosen(collected, origin)) is { Sure: true, IsDate: false } sure ? sure : null;
        if (drawn is not null && !IsLater(drawn, effective))
        {
            return Settle(drawn, effective is not null && (!effective.Sure || (!effective.IsDate && effective.At - drawn.At > WideGap)));
        }

        if (origin == Origin.Demographic)
        {
            effective ??= Read(observation.Issued);
            return effective is { Sure: true } ? Settle(effective, false) : Refuse(effective);
        }

        return effective is { Sure: true, IsDate: false }
            ? Settle(effective, drawn is not null && drawn.At - effective.At > WideGap)
            : Refuse(effective ?? Read(observation.Issued));
    }

    /// <summary>Time of an event; null when it is not known to the minute.</summary>
    public EventTime? Of(string? text) => Read(text) is { Sure: true, IsDate: false } sure && Settle(sure, false) is { Refused: null } time ? time : null;

    /// <summary>The start of what was drawn, set or is a property; the end of what was measured over a while.</summary>
    private static string? Chosen(EffectiveFact? effective, Origin origin) => effective switch
    {
        null => null,
        { IsPeriod: false } => effective.At,
        _ => origin == Origin.Measurement ? effective.End : effective.Start,
    };

    private static bool IsLater(Moment drawn, Moment? effective) =>
        effective is { Sure: true } && drawn.At > (effective.IsDate ? effective.At.AddDays(1) : effective.At);

    private Moment? Read(string? text)
    {
        if (SentTime.Parse(text) is not { } sent)
        {
            return null;
        }

        if (sent.Offset is { } offset)
        {
            return new(sent.With(offset), text!, false, false, true);
        }

        var assumed = zone?.GetUtcOffset(sent.Local) ?? TimeSpan.Zero;
        if (sent.Precision == Precision.Date)
        {
            return new(sent.With(assumed), text!, true, false, true);
        }

        // In the hour that a change of clocks repeats or skips, the zone does not tell the time either.
        var sure = zone is not null && !zone.IsAmbiguousTime(sent.Local) && !zone.IsInvalidTime(sent.Local);
        return new(sent.With(assumed), text + (sure ? Written(assumed) : ""), false, sure, sure);
    }

    private EventTime Settle(Moment moment, bool uncertain)
    {
        string[] flags = [.. moment.ZoneAssumed ? [Flags.ZoneAssumed] : Array.Empty<string>(), .. uncertain ? [Flags.TimeUncertain] : Array.Empty<string>()];
        var known = facts.Order.LastUpdated ?? facts.Arrived;
        return new(moment.At, moment.Text, moment.At - known > allowedFuture ? Withheld.TimeUncertain : null, flags);
    }

    private EventTime Refuse(Moment? moment) =>
        new(moment?.At ?? facts.Order.LastUpdated ?? facts.Arrived, moment?.Text ?? "", Withheld.TimeUncertain, []);

    private static string Written(TimeSpan offset) =>
        (offset < TimeSpan.Zero ? "-" : "+") + offset.ToString(@"hh\:mm", CultureInfo.InvariantCulture);
}
