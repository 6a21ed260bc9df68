using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Gathers the roots of one call along the whole chain, and remembers why what is absent is absent.</summary>
internal sealed class Gathering(Slice slice, Policy policy, Catalogue catalogue, Reading anchor)
{
    private readonly List<(Root Root, UsedInput Used)> _roots = [];
    private readonly List<(string Input, Choice Choice)> _looked = [];

    /// <summary>Withheld codes of slots that could not be filled.</summary>
    public SortedSet<string> Reasons { get; } = new(StringComparer.Ordinal);

    /// <summary>Slots that found nothing at all.</summary>
    public List<Slot> Missing { get; } = [];

    /// <summary>What gates looked at.</summary>
    public List<(Kind Kind, IReadOnlyList<Reading> Readings)> Evidence { get; } = [];

    /// <summary>Flags of readings and pairings used.</summary>
    public SortedSet<string> Flags { get; } = new(StringComparer.Ordinal);

    /// <summary>Results of other definitions that were computed inside the chain.</summary>
    public List<Kind> Chained { get; } = [];

    /// <summary>Readings used, gate evidence left out.</summary>
    public List<Reading> Readings { get; } = [];

    /// <summary>True when sex or age took part.</summary>
    public bool PersonUsed { get; private set; }

    public Roots Roots => new(_roots.Select(entry => entry.Root));

    public IReadOnlyList<UsedInput> Used => [.. _roots.Select(entry => entry.Used)];

    /// <summary>What pairing looked at and could not use.</summary>
    public IEnumerable<(string Input, Choice Choice)> Looked => _looked;

    public void Gather(Definition definition)
    {
        foreach (var slot in definition.Result.Needs)
        {
            Fill(slot, anchor);
        }

        foreach (var kind in definition.Watched.Where(kind => !_roots.Any(entry => entry.Root.Kind == kind)))
        {
            Watch(kind);
        }
    }

    private void Fill(Slot slot, Reading at)
    {
        if (slot.Options.Any(option => option.Terms.All(term => term.AnyOf.Any(kind => _roots.Any(entry => entry.Root.Kind == kind)))))
        {
            return;
        }

        var refusedSetPeep = false;
        foreach (var option in slot.Options)
        {
            if (option.Flag == Physiology.Flags.PeepNotTotal && !policy.AcceptSetPeep)
            {
                refusedSetPeep = true;
                continue;
            }

            var (filled, reasons) = Try(option, slot, at);
            if (filled)
            {
                return;
            }

            if (reasons.Count > 0)
            {
                Reasons.UnionWith(reasons);
                return;
            }
        }

        Reasons.Add(refusedSetPeep ? Withheld.NoPeepTotal : slot.Missing);
        Missing.Add(slot);
    }

    /// <summary>Fills one option, or leaves everything as it was. Reasons are given only when the option is the one that counts and cannot be filled.</summary>
    private (bool Filled, IReadOnlyList<string> Reasons) Try(Option option, Slot slot, Reading at)
    {
        var (roots, readings, chained) = (_roots.Count, Readings.Count, Chained.Count);
        var flags = Flags.ToArray();
        var reasons = new List<string>();
        foreach (var term in option.Terms)
        {
            if (Constant(term, slot, reasons) || Personal(term))
            {
                continue;
            }

            var derived = term.AnyOf.Count == 1 && term.AnyOf[0].Formula is not null ? catalogue.Find(term.AnyOf[0].Key) : null;
            var choice = PairingRules.Choose(term.Pairing, derived?.Calling.Anchors ?? term.AnyOf, at, slice, policy);
            _looked.Add((slot.Name, choice));
            if (choice.Blocked is { } code)
            {
                reasons.Add(code);
            }
            else if (!choice.Found)
            {
                Undo();
                if (derived is null || slot.Options.Count > 1)
                {
                    return (false, []);
                }

                Missing.AddRange(derived.Result.Needs.Where(inner => inner.Kinds.Intersect(derived.Calling.Anchors).Any()));
                return (false, MissingOf(derived));
            }
            else if (derived is null)
            {
                Add(choice);
            }
            else
            {
                var before = Reasons.ToArray();
                foreach (var inner in derived.Result.Needs)
                {
                    Fill(inner, choice.Readings[0]);
                }

                var missing = Reasons.Except(before, StringComparer.Ordinal).ToArray();
                Reasons.ExceptWith(missing);
                reasons.AddRange(missing);
                Chained.Add(term.AnyOf[0]);
            }
        }

        if (reasons.Count == 0)
        {
            return (true, []);
        }

        Undo();

        // A chained definition that merely lacks something leaves room for the next option; a reading that blocks does not.
        var last = ReferenceEquals(option, slot.Options[^1]);
        return (false, last || reasons.Any(code => code is not (Withheld.InputMissing or Withheld.NoPlateau)) ? reasons : []);

        void Undo()
        {
            _roots.RemoveRange(roots, _roots.Count - roots);
            Readings.RemoveRange(readings, Readings.Count - readings);
            Chained.RemoveRange(chained, Chained.Count - chained);
            Flags.Clear();
            Flags.UnionWith(flags);
        }
    }

    /// <summary>What a chained definition lacks when it has no anchor: its anchor.</summary>
    private static string[] MissingOf(Definition derived) =>
        [derived.Result.Needs.FirstOrDefault(slot => slot.Kinds.Intersect(derived.Calling.Anchors).Any())?.Missing ?? Withheld.InputMissing];

    /// <summary>Constants of the policy or the definition.</summary>
    private bool Constant(Term term, Slot slot, List<string> reasons)
    {
        if (term.Pairing is not Pairing.Site || term.AnyOf.Count != 1)
        {
            return false;
        }

        var kind = term.AnyOf[0];
        if (kind == Kinds.BarometricPressure)
        {
            return StationPressure(slot, reasons);
        }

        var value = kind == Kinds.RespiratoryQuotient ? policy.RespiratoryQuotient : kind.Assumed;
        if (value is { } known)
        {
            AddConstant(kind, known, null);
        }

        return value is not null;
    }

    private bool StationPressure(Slot slot, List<string> reasons)
    {
        if (_roots.Any(entry => entry.Root.Kind == Kinds.BarometricPressure))
        {
            return true;
        }

        var pressure = SitePressure.Of(policy, anchor, slice);
        if (pressure is null)
        {
            return false;
        }

        if (pressure.Reading is null)
        {
            AddConstant(Kinds.BarometricPressure, pressure.Value, pressure.Tolerance);
        }
        else if (pressure.Reading.Refused is { } code)
        {
            reasons.Add(code);
            _looked.Add((slot.Name, Choice.Of(pressure.Reading)));
        }
        else
        {
            Add(Choice.Of(pressure.Reading));
        }

        return true;
    }

    private bool Personal(Term term)
    {
        if (!term.AnyOf.Contains(Kinds.Sex))
        {
            return false;
        }

        PersonUsed = true;
        var sex = Kinds.Sex.Codes.ToList().IndexOf(slice.Person?.Sex ?? "unknown");
        AddCoded(Kinds.Sex, sex, [], gateOnly: false);
        return true;
    }

    private void Watch(Kind kind)
    {
        if (kind == Kinds.Age)
        {
            PersonUsed = true;
            var (age, certain) = Ages.At(slice.Person?.BirthDate, anchor.At);
            if (!certain)
            {
                Flags.Add(Physiology.Flags.AgeUnconfirmed);
            }
            else
            {
                _roots.Add((new Root(kind, age), new UsedInput { Kind = kind.Key, Value = age, Unit = kind.Unit, GateOnly = true }));
            }

            return;
        }

        if (kind == Kinds.BarometricPressure && SitePressure.Of(policy, anchor, slice) is { Reading: not { Usable: false } } pressure)
        {
            IReadOnlyList<Reading> behind = pressure.Reading is null ? [] : [pressure.Reading];
            _roots.Add((new Root(kind, pressure.Value, null, pressure.Reading is null, pressure.Tolerance),
                Describe(kind, pressure.Value, behind) with { GateOnly = true, Assumed = pressure.Reading is null }));
            return;
        }

        if (Circumstances.SettlingUnknown(kind, anchor, slice, policy))
        {
            Flags.Add(Physiology.Flags.SettlingUnknown);
        }

        if (Circumstances.Tell(kind, anchor, slice, policy) is { } finding)
        {
            Evidence.Add((kind, finding.Readings));
            _roots.Add((new Root(kind, finding.Value, Tolerance: SiteTolerance(kind)), Describe(kind, finding.Value, finding.Readings) with { GateOnly = true }));
        }
    }

    private void Add(Choice choice)
    {
        var kind = choice.Kind!;
        if (_roots.Any(entry => entry.Root.Kind == kind))
        {
            return;
        }

        var device = choice.Readings[0].Device;
        var transducer = kind.Tolerance.Zero && choice.Readings.All(reading => reading.Device == device) ? device : null;
        _roots.Add((new Root(kind, choice.Value, transducer, Tolerance: SiteTolerance(kind)), Describe(kind, choice.Value, choice.Readings)));
        Readings.AddRange(choice.Readings);
        Flags.UnionWith(choice.Flags);
        Flags.UnionWith(choice.Readings.SelectMany(reading => reading.Flags));
        if (choice.Readings.Any(slice.Contradicted))
        {
            Flags.Add(Physiology.Flags.ConflictingSource);
        }
    }

    private void AddConstant(Kind kind, double value, Tolerance? tolerance)
    {
        if (!_roots.Any(entry => entry.Root.Kind == kind))
        {
            _roots.Add((new Root(kind, value, null, true, SiteTolerance(kind) ?? tolerance), new UsedInput { Kind = kind.Key, Value = value, Unit = kind.Unit, Assumed = true }));
        }
    }

    private void AddCoded(Kind kind, int code, IReadOnlyList<Reading> readings, bool gateOnly) =>
        _roots.Add((new Root(kind, code), Describe(kind, code, readings) with { GateOnly = gateOnly }));

    private Tolerance? SiteTolerance(Kind kind) => policy.Tolerances.GetValueOrDefault(kind.Key);

    private UsedInput Describe(Kind kind, double value, IReadOnlyList<Reading> readings) => new()
    {
        Kind = kind.Key,
        Value = value,
        Unit = kind.Unit,
        Code = kind.IsCoded ? kind.Codes[(int)value] : null,
        Readings = [.. readings.Select(Use)],
        GapMinutes = readings.Count == 0 || kind.Origin == Origin.Demographic ? null : readings.Select(reading => (reading.At - anchor.At).TotalMinutes).MinBy(Math.Abs),
    };

    /// <summary>A reading as results name it.</summary>
    public static UsedReading Use(Reading reading) =>
        new(reading.Id.Resource, reading.Id.Part, reading.Version, reading.Base, reading.At, reading.Value);
}
