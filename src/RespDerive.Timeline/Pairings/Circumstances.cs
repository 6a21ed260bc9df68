using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>
/// What only gates look at, found on the timeline: changes of settings, efforts of the patient, companions of the same sample.
/// A circumstance that cannot be told is left out; a gate then does not trip.
/// </summary>
internal static class Circumstances
{
    private static readonly IReadOnlyList<Kind> Oxygen = [Kinds.FiO2Set, Kinds.FiO2];
    private static readonly IReadOnlyList<Kind> EndExpiratory = [Kinds.PeepSet, Kinds.Peep];
    private static readonly Span Setting = new(Reach.SettlingWindow, default, Reach.SettingWindow);

    /// <summary>One circumstance: its value, the readings it rests on, and flags.</summary>
    public sealed record Finding(double Value, IReadOnlyList<Reading> Readings);

    /// <summary>Kinds, and windows around the anchor, that telling a circumstance needs.</summary>
    public static IEnumerable<(Kind Kind, Span Span)> Reads(Kind circumstance)
    {
        if (circumstance == Kinds.FiO2Changed)
        {
            return Oxygen.Select(kind => (kind, Setting));
        }

        if (circumstance == Kinds.PeepLowered || circumstance == Kinds.PeepRaised)
        {
            return EndExpiratory.Select(kind => (kind, Setting));
        }

        if (circumstance == Kinds.PatientEffort)
        {
            return Effort.Reads;
        }

        if (circumstance == Kinds.PaCO2)
        {
            return [(circumstance, new Span(Reach.SampleWindow, Reach.SampleWindow, default))];
        }

        if (circumstance == Kinds.Peak)
        {
            return [(circumstance, new Span(Reach.SampleWindow, Reach.SampleWindow, default))];
        }

        if (circumstance == Kinds.BarometricPressure)
        {
            return [(circumstance, new Span(TimeSpan.FromHours(6), default, default))];
        }

        return circumstance.IsCoded && circumstance.Origin == Origin.Circumstance ? [(circumstance, Setting)] : [];
    }

    /// <summary>Tells a circumstance at an anchor; null when the timeline does not say.</summary>
    public static Finding? Tell(Kind circumstance, Reading anchor, Slice slice, Policy policy)
    {
        var maxAge = policy.TimingOf(anchor.Id.Resource.Source).SettingMaxAge;
        if (circumstance == Kinds.FiO2Changed)
        {
            return Since(SettingChanges.LastStep(Oxygen, SettingChanges.OxygenStep, anchor.At, slice, maxAge), anchor, _ => true);
        }

        if (circumstance == Kinds.PeepLowered)
        {
            return Since(SettingChanges.LastStep(EndExpiratory, SettingChanges.PeepStep, anchor.At, slice, maxAge), anchor, step => step < 0);
        }

        if (circumstance == Kinds.PeepRaised)
        {
            return Since(SettingChanges.LastStep(EndExpiratory, SettingChanges.PeepStep, anchor.At, slice, maxAge), anchor, step => step > 0);
        }

        if (circumstance == Kinds.PatientEffort)
        {
            return Effort.Tell(anchor, slice, maxAge);
        }

        var choice = circumstance == Kinds.PaCO2 ? PairingRules.Choose(new Pairing.SameSample(), [circumstance], anchor, slice, policy)
            : circumstance == Kinds.Peak ? PairingRules.Choose(new Pairing.SameManoeuvre(TimeSpan.FromMinutes(1)), [circumstance], anchor, slice, policy)
            : circumstance.IsCoded && circumstance.Origin == Origin.Circumstance ? PairingRules.Choose(new Pairing.InForce(), [circumstance], anchor, slice, policy)
            : Choice.Nothing;
        return choice.Found ? new Finding(choice.Value, choice.Readings) : null;
    }

    /// <summary>True when the setting in force is so recent that an earlier change cannot be excluded, and nothing earlier is known.</summary>
    public static bool SettlingUnknown(Kind circumstance, Reading anchor, Slice slice, Policy policy) =>
        circumstance == Kinds.FiO2Changed
        && SettingChanges.LastStep(Oxygen, SettingChanges.OxygenStep, anchor.At, slice, policy.TimingOf(anchor.Id.Resource.Source).SettingMaxAge) is { EarlierKnown: false };

    private static Finding? Since(SettingChanges.Change change, Reading anchor, Func<double, bool> wanted) =>
        change.At is { } at && wanted(change.By) ? new Finding((anchor.At - at).TotalMinutes, change.Readings) : null;
}
