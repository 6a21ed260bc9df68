using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>How far around an anchor an evaluation looks for one kind.</summary>
/// <param name="Before">Every reading this long before the anchor.</param>
/// <param name="After">Every reading this long after the anchor.</param>
/// <param name="Back">Beyond <paramref name="Before"/>: the last reading only, not older than this before the anchor.</param>
internal readonly record struct Span(TimeSpan Before, TimeSpan After, TimeSpan Back)
{
    public Span Or(Span other) => new(Max(Before, other.Before), Max(After, other.After), Max(Back, other.Back));

    /// <summary>Seen from an anchor that itself lies anywhere inside <paramref name="outer"/>.</summary>
    public Span Within(Span outer) => new(Before.And(outer.Before), After.And(outer.After), Back.And(outer.Before));

    private static TimeSpan Max(TimeSpan a, TimeSpan b) => a > b ? a : b;
}

/// <summary>
/// The one bounding window of each use of an input. A change of a reading dirties the anchors within it, and a slice loaded for an anchor
/// holds everything within it: what an evaluation may look at is exactly what is declared here.
/// </summary>
internal sealed class Reach
{
    /// <summary>Readings of one sample or panel are looked for this far to both sides.</summary>
    public static readonly TimeSpan SampleWindow = TimeSpan.FromHours(1);

    /// <summary>Evidence of effort is looked for this far to both sides.</summary>
    public static readonly TimeSpan EffortWindow = TimeSpan.FromMinutes(5);

    /// <summary>Raised PEEP counts as settling for this long.</summary>
    public static readonly TimeSpan SettlingWindow = TimeSpan.FromMinutes(60);

    private static readonly TimeSpan CopyWindow = TimeSpan.FromMinutes(2);
    private readonly Dictionary<Kind, Span> _spans = [];
    private readonly TimeSpan _settingMaxAge;

    /// <param name="definition">The definition.</param>
    /// <param name="catalogue">Definitions it may be chained to.</param>
    /// <param name="settingMaxAge">Longest validity of any setting under any policy of the site.</param>
    public Reach(Definition definition, Catalogue catalogue, TimeSpan settingMaxAge)
    {
        _settingMaxAge = settingMaxAge;
        var here = default(Span);
        foreach (var anchor in definition.Calling.Anchors)
        {
            // The quarter of an hour an anchor stands in decides whether it calls.
            Add(anchor, new Span(TimeSpan.FromMinutes(15), TimeSpan.FromMinutes(15), default), here);
        }

        foreach (var kind in definition.Calling.OnlyWith)
        {
            Add(kind, new Span(default, default, definition.Calling.Recent), here);
        }

        foreach (var kind in definition.Calling.NotWith)
        {
            Add(kind, new Span(definition.Calling.Around, definition.Calling.Around, default), here);
        }

        Needs(definition.Result.Needs, here, catalogue);
        Watched(definition, here);
        _spans.Remove(Kinds.Sex);
    }

    /// <summary>Windows by kind.</summary>
    public IReadOnlyDictionary<Kind, Span> Spans => _spans;

    /// <summary>True when sex or age takes part.</summary>
    public bool Person { get; private set; }

    private void Needs(IReadOnlyList<Slot> needs, Span outer, Catalogue catalogue)
    {
        foreach (var term in needs.SelectMany(slot => slot.Options).SelectMany(option => option.Terms))
        {
            var span = Of(term.Pairing);
            foreach (var kind in term.AnyOf)
            {
                if (kind == Kinds.Sex)
                {
                    Person = true;
                }

                if (term.Pairing is Pairing.SinceChange since)
                {
                    foreach (var setting in since.ChangeOf)
                    {
                        Add(setting, Of(new Pairing.InForce()), outer);
                    }
                }

                if (kind.Formula is null)
                {
                    Add(kind, span, outer);
                }
                else if (catalogue.Find(kind.Key) is { } inner)
                {
                    foreach (var anchor in inner.Calling.Anchors)
                    {
                        Add(anchor, span, outer);
                    }

                    // A standing property is evaluated at the anchor of the whole, so that its own place does not widen the windows.
                    Needs(inner.Result.Needs, term.Pairing is Pairing.Standing ? outer : span.Within(outer), catalogue);
                }
            }
        }
    }

    private void Watched(Definition definition, Span outer)
    {
        foreach (var kind in definition.Watched)
        {
            Person |= kind == Kinds.Age || kind == Kinds.Sex;
            foreach (var (read, span) in Circumstances.Reads(kind, _settingMaxAge))
            {
                Add(read, span, outer);
            }
        }
    }

    private void Add(Kind kind, Span span, Span outer)
    {
        var whole = span.Within(outer);
        var withCopies = new Span(whole.Before.And(CopyWindow), whole.After.And(CopyWindow), whole.Back > TimeSpan.Zero ? whole.Back.And(CopyWindow) : default);
        _spans[kind] = _spans.TryGetValue(kind, out var known) ? known.Or(withCopies) : withCopies;
        if (span.Back > TimeSpan.Zero && !Events.All.Contains(kind))
        {
            foreach (var end in Events.All)
            {
                Add(end, new Span(span.Back, default, default), outer);
            }
        }
    }

    /// <summary>Where a setting in force is looked for: the last one, and its changes of the last hour.</summary>
    public static Span InForce(TimeSpan settingMaxAge) => new(SettlingWindow, default, settingMaxAge);

    private Span Of(Pairing pairing) => pairing switch
    {
        Pairing.AnchorItself => default,
        Pairing.InForce => InForce(_settingMaxAge),
        Pairing.SinceChange since => new(since.MaxAge, default, default),
        Pairing.Nearest nearest => new(nearest.Before, nearest.After, default),
        Pairing.SameSample => new(SampleWindow, SampleWindow, default),
        Pairing.SameManoeuvre => new(SampleWindow, SampleWindow, default),
        Pairing.MedianOver median => new(median.Before, median.After, default),
        Pairing.Standing => new(TimeSpan.MaxValue, TimeSpan.MaxValue, default),
        Pairing.Site site => new(site.ReadingWithin, default, default),
        _ => default,
    };
}
