using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Why a value is withheld, told by the readings that were looked at and not used.</summary>
internal static class Story
{
    /// <summary>Readings that block, the nearest ones of what is missing, and what tripped the gate.</summary>
    public static Candidate[] Of(Gathering gathering, Slice slice, Definition definition, Reading anchor, string withheld)
    {
        var blocked = gathering.Looked.Where(looked => looked.Choice.Blocked is not null)
            .SelectMany(looked => looked.Choice.Readings.Select(reading => Tell(looked.Input, reading, looked.Choice.Blocked!)));
        var missing = gathering.Missing
            .SelectMany(slot => slot.Kinds.SelectMany(Leaves).Distinct().Select(kind => (slot, reading: Nearest(slice.Of(kind), anchor))))
            .Where(near => near.reading is not null && near.reading.Id != anchor.Id)
            .Select(near => Tell(near.slot.Name, near.reading!, near.reading!.Refused ?? Withheld.StalePair));
        var gates = definition.Gates.Where(gate => gate.Code == withheld).SelectMany(gate => gate.Reads).Distinct()
            .SelectMany(kind => gathering.Evidence.Where(evidence => evidence.Kind == kind))
            .SelectMany(evidence => evidence.Readings.Select(reading => Tell(evidence.Kind.Name, reading, withheld)));
        return [.. blocked.Concat(missing).Concat(gates).Distinct()];
    }

    /// <summary>One reading and why it was not used.</summary>
    public static Candidate Tell(string input, Reading reading, string reason) =>
        new(input, reading.VersionedReference, reading.AtText, reading.Given, reading.GivenUnit, reason);

    private static IEnumerable<Kind> Leaves(Kind kind) => kind.Formula is null ? [kind] : kind.Needs.SelectMany(slot => slot.Kinds).SelectMany(Leaves);

    private static Reading? Nearest(IReadOnlyList<Reading> readings, Reading anchor) => readings.MinBy(reading => (reading.At - anchor.At).Duration());
}
