namespace RespDerive.Timeline;

/// <summary>When two outcomes of one identity say the same, so that nothing need be published.</summary>
public static class OutcomeComparison
{
    /// <summary>
    /// Same status class, value, unit, uncertainty, flags, root versions, definition revision and policy values used;
    /// of the person the sex and age used, which are among the inputs, not the version: a new address revises nothing;
    /// neither the hash of the policy document nor the software version counts.
    /// </summary>
    public static bool Same(Outcome a, Outcome b) =>
        a.Withheld == b.Withheld
        && a.Revision == b.Revision
        && a.Patient == b.Patient
        && a.Encounter == b.Encounter
        && a.AtText == b.AtText
        && a.AnchorReference == b.AnchorReference
        && (a.Withheld is not null || SameValue(a, b));

    private static bool SameValue(Outcome a, Outcome b) =>
        Nullable.Equals(a.Value, b.Value)
        && a.Published == b.Published
        && a.Unit == b.Unit
        && a.Code == b.Code
        && Nullable.Equals(a.Uncertainty, b.Uncertainty)
        && a.Preliminary == b.Preliminary
        && a.InputCorrected == b.InputCorrected
        && a.Variant == b.Variant
        && a.Person?.Resource == b.Person?.Resource
        && a.Flags.SequenceEqual(b.Flags, StringComparer.Ordinal)
        && Roots(a).SequenceEqual(Roots(b), SameInput);

    /// <summary>What the number rests on; what only a gate looked at may change with every reading of a stream, and says nothing while the gate's answer stays.</summary>
    private static IEnumerable<UsedInput> Roots(Outcome outcome) => outcome.Inputs.Where(input => !input.GateOnly);

    private static readonly IEqualityComparer<UsedInput> SameInput = EqualityComparer<UsedInput>.Create(
        (a, b) => a!.Kind == b!.Kind && a.Value.Equals(b.Value) && a.Assumed == b.Assumed && a.Readings.SequenceEqual(b.Readings),
        input => HashCode.Combine(input.Kind, input.Value));
}
