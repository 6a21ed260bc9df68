using System.Globalization;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>The pure core: a slice and a policy in, outcomes out. Same readings and policy, same outcomes, on any machine at any time.</summary>
public sealed class Evaluator
{
    private readonly Dictionary<string, Reach> _reaches;
    private readonly Guid _site;

    /// <summary>An evaluator of one catalogue for one site.</summary>
    /// <param name="catalogue">Definitions.</param>
    /// <param name="policies">Policies of the site.</param>
    /// <param name="site">Name of the site; part of every result's identity.</param>
    public Evaluator(Catalogue catalogue, PolicyBook policies, string site)
    {
        (Catalogue, Policies, _site) = (catalogue, policies, NameBasedUuid.Site(site));
        Called = [.. catalogue.All.Where(definition => !definition.ByHandOnly)];
        _reaches = Called.ToDictionary(definition => definition.Key, definition => new Reach(definition, catalogue, policies.LongestSetting), StringComparer.Ordinal);
    }

    /// <summary>Definitions.</summary>
    public Catalogue Catalogue { get; }

    /// <summary>Policies.</summary>
    public PolicyBook Policies { get; }

    /// <summary>Definitions that a record can call for.</summary>
    internal IReadOnlyList<Definition> Called { get; }

    internal Reach ReachOf(Definition definition) => _reaches[definition.Key];

    /// <summary>Outcomes of a definition for all its calls in a range of event time.</summary>
    public IReadOnlyList<Outcome> Evaluate(Definition definition, Slice slice, DateTimeOffset from, DateTimeOffset to, bool explain = false) =>
        [.. Calls.In(definition, slice, from, to)
            .Where(call => Policies.At(call.Anchor.At).Runs(definition))
            .Select(call => Evaluate(definition, call, slice, explain))];

    private Outcome Evaluate(Definition definition, Call call, Slice slice, bool explain)
    {
        var anchor = call.Anchor;
        var policy = Policies.At(anchor.At);
        var blank = Blank(definition, call, policy);
        if (anchor.Refused is { } refusal)
        {
            return blank with
            {
                Withheld = refusal,
                Considered = explain ? [Story.Tell(anchor.Kind.Name, anchor, refusal)] : [],
            };
        }

        var gathering = new Gathering(slice, policy, Catalogue, anchor);
        gathering.Gather(definition);
        var roots = gathering.Roots;
        var computed = gathering.Reasons.Count == 0 ? Computation.Of(definition, roots) : new Computation();
        var withheld = gathering.Reasons.Concat(gathering.Reasons.Count > 0 ? Computation.Tripped(definition, roots) : [])
            .Append(computed.Withheld).OfType<string>().MinBy(Withheld.Rank);
        var readings = gathering.Readings;
        var outcome = blank with
        {
            Preliminary = anchor.Preliminary || readings.Any(reading => reading.Preliminary),
            InputCorrected = anchor.Corrected || readings.Any(reading => reading.Corrected),
            Person = gathering.PersonUsed && slice.Person is { } person
                ? new UsedReading(person.Resource, "", person.Version, person.Base, anchor.At, double.NaN) : null,
            Inputs = Shared(gathering.Used, computed.Shares),
        };
        if (withheld is not null)
        {
            return outcome with { Withheld = withheld, Missing = explain ? [.. gathering.Missing.Select(slot => slot.Name)] : [], Considered = explain ? Story.Of(gathering, slice, definition, anchor, withheld) : [] };
        }

        // A band is a code: the number it was taken from has the unit and the uncertainty.
        var number = computed.Placement is null;
        return outcome with
        {
            Value = number ? computed.Value : null,
            Published = number ? computed.Published : null,
            Unit = definition.Result.Unit,
            Uncertainty = number ? computed.Uncertainty : null,
            Code = computed.Placement?.Code,
            SiteTolerance = roots.All.Any(root => policy.Tolerances.ContainsKey(root.Kind.Key)),
            SharedOffsetShare = computed.Shares.Where(share => share.Transducer is not null).Sum(share => share.Fraction),
            Flags = [.. computed.Flags.Union(gathering.Flags, StringComparer.Ordinal).Order(StringComparer.Ordinal)],
            Variant = computed.Variant,
            Intermediates = [.. gathering.Chained.Distinct().Select(kind => new Intermediate(kind.Key, roots[kind], kind.Unit!))],
        };
    }

    private Outcome Blank(Definition definition, Call call, Policy policy)
    {
        var anchor = call.Anchor;
        var resource = anchor.Id.Resource;
        return new Outcome
        {
            Identity = call.Quarter is { } quarter
                ? NameBasedUuid.Of(_site, definition.Key, resource.Source, anchor.Patient, "quarter", quarter.UtcDateTime.ToString("O", CultureInfo.InvariantCulture))
                : NameBasedUuid.Of(_site, definition.Key, resource.Source, anchor.Patient, resource.Type, resource.Id, anchor.Id.Part),
            Definition = definition.Key,
            Revision = definition.Revision,
            Source = resource.Source,
            Patient = anchor.Patient,
            Encounter = anchor.Encounter,
            Anchor = Gathering.Use(anchor),
            AnchorReference = anchor.VersionedReference,
            At = anchor.At,
            AtText = anchor.AtText,
            Policy = policy.Hash,
        };
    }

    private static UsedInput[] Shared(IReadOnlyList<UsedInput> used, IReadOnlyList<Share> shares) =>
        [.. used.Select(input => input with
        {
            Share = shares.Where(share => share.Transducer is null && share.Kind.Key == input.Kind).Sum(share => share.Fraction),
        })];
}
