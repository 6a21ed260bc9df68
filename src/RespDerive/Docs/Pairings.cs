using System.Globalization;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Docs;

/// <summary>Pairing rules in words.</summary>
internal static class Pairings
{
    /// <summary>How one slot is filled, best first.</summary>
    public static string Of(Slot slot) => string.Join("; else ", slot.Options.Select(Of));

    private static string Of(Option option) =>
        string.Join(" + ", option.Terms.Select(Of)) + (option.Flag is { } flag ? $" (flag `{flag}`)" : "");

    private static string Of(Term term) => string.Join(" or ", term.AnyOf.Select(kind => $"`{kind.Key}`")) + Words(term.Pairing, term.AnyOf);

    private static string Words(Pairing pairing, IReadOnlyList<Kind> kinds) => pairing switch
    {
        Pairing.AnchorItself when kinds.All(kind => kind.Formula is not null) => ", computed at the anchor",
        Pairing.AnchorItself => ", the anchor itself",
        Pairing.InForce => ", the setting in force",
        Pairing.SinceChange since => $", at most {Minutes(since.MaxAge)} old and not older than the last change of {string.Join(" or ", since.ChangeOf.Select(kind => $"`{kind.Key}`"))}",
        Pairing.Nearest near => $", nearest within {Window(near.Before, near.After)}",
        Pairing.SameSample => ", of the same sample",
        Pairing.SameManoeuvre same => $", of the same breath or manoeuvre (at most ±{Minutes(same.Within)})",
        Pairing.MedianOver median => $", median over {Window(median.Before, median.After)}{(median.AtLeast > 1 ? string.Create(CultureInfo.InvariantCulture, $" of at least {median.AtLeast}") : "")}",
        Pairing.Standing => ", standing property",
        Pairing.Site site when kinds is [{ Assumed: { } assumed }] => string.Create(CultureInfo.InvariantCulture, $", of the site or assumed {assumed}") + (site.ReadingWithin > TimeSpan.Zero ? $", else read within {Minutes(site.ReadingWithin)}" : ""),
        Pairing.Site site => ", of the site" + (site.ReadingWithin > TimeSpan.Zero ? $", else read within {Minutes(site.ReadingWithin)}" : ""),
        Pairing.ByHand => ", by hand only",
        _ => "",
    };

    private static string Window(TimeSpan before, TimeSpan after) => before == after ? $"±{Minutes(before)}" : $"−{Number(before)} to {(after > TimeSpan.Zero ? "+" : "")}{Minutes(after)}";

    /// <summary>A stretch of time in the unit people say it in.</summary>
    public static string Minutes(TimeSpan span) => span >= TimeSpan.FromHours(2)
        ? string.Create(CultureInfo.InvariantCulture, $"{span.TotalHours:0.##} h")
        : Number(span) + " min";

    private static string Number(TimeSpan span) => span.TotalMinutes.ToString("0.##", CultureInfo.InvariantCulture);
}
