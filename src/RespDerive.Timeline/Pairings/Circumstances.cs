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
    /// <summary>One circumstance: its value, the readings it rests on, and flags.</summary>
    public sealed record Finding(double Value, IReadOnlyList<Reading> Readings);

    /// <summary>Kinds, and windows around the anchor, that telling a circumstance needs.</summary>
    public static IEnumerable<(Kind Kind, Span Span)> Reads(Kind circumstance, TimeSpan settingMaxAge)
    {
        var setting = Reach.InForce(settingMaxAge);
        if (circumstance == Kinds.FiO2Changed)
        {
            return Oxygen.Select(kind => (kind, setting));
        }

        if (circumstance == Kinds.PeepLowered || circumstance == Kinds.PeepRaised)
        {
            return EndExpiratory.Select(kind => (kind, setting));
        }

        if (circumstance == Kinds.PatientEffort)
        {
            return Effort.Reads(settingMaxAge);
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

        return circumstance.IsCoded && circumstance.Origin == Origin.Circumstance ? [(circumstance, setting)] : [];
    }

    /// <summary>Tells a circumstance at an anchor; null when the timeline does not say.</summary>
    public static Finding? Tell(Kind circumstance, Reading anchor, Slice slice, Policy policy)
    {
        if (circumstance == Kinds.FiO2Changed)
        {
            return Since(SettingChanges.LastStep(Oxygen, step => SettingChanges.IsStep(step, SettingChanges.OxygenStep), anchor.At, slice, policy), anchor);
        }

        if (circumstance == Kinds.PeepLowered)
        {
            return Since(SettingChanges.LastStep(EndExpiratory, step => step < 0 && SettingChanges.IsStep(step, SettingChanges.PeepStep), anchor.At, slice, policy), anchor);
        }

        if (circumstance == Kinds.PeepRaised)
        {
            return Since(SettingChanges.LastStep(EndExpiratory, step => step > 0 && SettingChanges.IsStep(step, SettingChanges.PeepStep), anchor.At, slice, policy), anchor);
        }

        if (circumstance == Kinds.PatientEffort)
        {
            return Effort.Tell(anchor, slice, policy);
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
        && SettingChanges.LastStep(Oxygen, step => SettingChanges.IsStep(step, SettingChanges.OxygenStep), anchor.At, slice, policy) is { EarlierKnown: false };

    private static Finding? Since(SettingChanges.Change change, Reading anchor) =>
        change.At is { } at ? new Finding((anchor.At - at).TotalMinutes, change.Readings) : null;
}
