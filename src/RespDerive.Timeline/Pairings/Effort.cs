using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Evidence that the patient breathes, or does not breathe, on top of the ventilator around a plateau.</summary>
internal static class Effort
{
    /// <summary>Breaths per minute above the set rate that show triggering.</summary>
    private const double Triggered = 2;

    private const double No = 0;
    private const double Yes = 1;
    private static readonly Span Near = new(Reach.EffortWindow, Reach.EffortWindow, default);
    private static readonly double Spontaneous = Kinds.Mode.Codes.ToList().IndexOf("spontaneous");

    /// <summary>What is looked at; the set rate is that in force at each reading of the total rate.</summary>
    public static IEnumerable<(Kind Kind, Span Span)> Reads(TimeSpan settingMaxAge)
    {
        var inForce = Reach.InForce(settingMaxAge);
        return
        [
            (Kinds.RateSpontaneous, Near), (Kinds.RateTotal, Near),
            (Kinds.RateSet, new Span(inForce.Before, Reach.EffortWindow, inForce.Back + Reach.EffortWindow)),
            (Kinds.Mode, inForce), (Kinds.PressureSupportSet, inForce),
        ];
    }

    /// <summary>Effort, no effort, or null when there is no evidence either way.</summary>
    public static Circumstances.Finding? Tell(Reading anchor, Slice slice, Policy policy)
    {
        var from = anchor.At.Minus(Reach.EffortWindow);
        var to = anchor.At.Plus(Reach.EffortWindow);
        IReadOnlyList<Reading> passive = [];
        foreach (var rate in slice.Between(Kinds.RateSpontaneous, from, to))
        {
            if (rate.Usable && rate.Value > 0)
            {
                return new(Yes, [rate]);
            }

            passive = rate.Usable ? Nearer(passive, [rate], anchor) : passive;
        }

        foreach (var total in slice.Between(Kinds.RateTotal, from, to))
        {
            if (total.Usable && InForceReadings.At([Kinds.RateSet], total.At, slice, policy) is { Usable: true } set)
            {
                if (total.Value >= set.Value + Triggered)
                {
                    return new(Yes, [total, set]);
                }

                passive = Nearer(passive, [total, set], anchor);
            }
        }

        if (InForceReadings.At([Kinds.Mode], anchor.At, slice, policy) is { Usable: true } mode && mode.Value.Equals(Spontaneous))
        {
            return new(Yes, [mode]);
        }

        if (InForceReadings.At([Kinds.PressureSupportSet], anchor.At, slice, policy) is { Usable: true, Value: > 0 } support
            && InForceReadings.At([Kinds.RateSet], anchor.At, slice, policy) is not { Usable: true, Value: > 0 })
        {
            return new(Yes, [support]);
        }

        return passive.Count > 0 ? new(No, passive) : null;
    }

    /// <summary>Of the evidence against effort the closest in time is named, so that a stream does not change it with every reading.</summary>
    private static IReadOnlyList<Reading> Nearer(IReadOnlyList<Reading> kept, IReadOnlyList<Reading> found, Reading anchor) =>
        kept.Count == 0 || (found[0].At - anchor.At).Duration() < (kept[0].At - anchor.At).Duration() ? found : kept;
}
