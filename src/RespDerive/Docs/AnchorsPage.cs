using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Docs;

/// <summary>Which reading calls for a value, what it is paired with, and how often it may call.</summary>
internal static class AnchorsPage
{
    public static string Of(Catalogue catalogue) => new Markdown("Anchors and companions")
        .Paragraph("The anchor is the reading that calls for a value and gives it its time; a companion is any other input. "
            + "Out of context a definition is not called for: no value and no withheld record.")
        .Table(["Definition", "Anchor", "Companions", "Called for", "Cadence", "Decimals"], catalogue.All.Where(definition => definition.Calling.Anchors.Count > 0).Select(Row))
        .Paragraph("Never called for by the record, only computed by hand: "
            + (catalogue.All.Where(definition => definition.Calling.Anchors.Count == 0).Select(Link).ToArray() is { Length: > 0 } never ? string.Join(", ", never) : "none") + ".")
        .ToString();

    /// <summary>In what context a definition is called for.</summary>
    public static string Context(Calling calling)
    {
        var context = new List<string>();
        if (calling.OnlyWith.Count > 0)
        {
            context.Add($"only with {Evidence(calling.OnlyWith)} in the last {Pairings.Minutes(calling.Recent)}");
        }

        if (calling.NotWith.Count > 0)
        {
            context.Add($"not with {Keys(calling.NotWith)} within ±{Pairings.Minutes(calling.Around)}");
        }

        return context.Count == 0 ? "always" : string.Join("; ", context);
    }

    /// <summary>How often an anchor may call.</summary>
    public static string Cadence(Calling calling) => calling.Cadence == Physiology.Inputs.Cadence.QuarterHour ? "15 min" : "each; 15 min if streamed";

    /// <summary>The anchors, best first.</summary>
    public static string Anchors(Calling calling) => string.Join(", else ", calling.Anchors.Select(kind => $"`{kind.Key}`"));

    private static string[] Row(Definition definition) =>
    [
        Link(definition), Anchors(definition.Calling), Companions(definition), Context(definition.Calling), Cadence(definition.Calling),
        definition.Decimals.ToString(System.Globalization.CultureInfo.InvariantCulture),
    ];

    private static string Companions(Definition definition)
    {
        var companions = definition.Result.Needs.Where(slot => !slot.Kinds.Intersect(definition.Calling.Anchors).Any()).Select(Pairings.Of).ToList();
        var watched = definition.Watched.Except(definition.Result.Needs.SelectMany(slot => slot.Kinds)).ToArray();
        if (watched.Length > 0)
        {
            companions.Add($"gates and flags only: {Keys(watched)}");
        }

        return string.Join("<br>", companions);
    }

    /// <summary>The many signs of ventilation in a few words.</summary>
    private static string Evidence(IReadOnlyList<Kind> kinds) => Slots.Ventilated.All(kinds.Contains)
        ? string.Join(" or ", kinds.Except(Slots.Ventilated).Select(kind => $"`{kind.Key}`").Append("a ventilator setting or measurement"))
        : string.Join(" or ", kinds.Select(kind => $"`{kind.Key}`"));

    private static string Link(Definition definition) => $"[{definition.Key}](derived/{definition.Key}.md)";

    private static string Keys(IEnumerable<Kind> kinds) => string.Join(", ", kinds.Select(kind => $"`{kind.Key}`"));
}
