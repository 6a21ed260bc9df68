using System.Globalization;
using System.Text.Json;
using System.Text.RegularExpressions;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary>A computation asked for, as words of a command line or as a JSON object.</summary>
internal static partial class ComputeRequest
{
    private const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;

    /// <summary>A definition by key or alias.</summary>
    /// <exception cref="UnusableRequestException">No such definition; the message lists near ones.</exception>
    public static Definition Definition(Catalogue catalogue, string key) => catalogue.Find(key) ?? throw new UnusableRequestException(
        NearNames.To(key, catalogue.All.SelectMany(definition => definition.Aliases.Prepend(definition.Key))) is { Count: > 0 } near
            ? $"There is no definition '{key}'. Near: {string.Join(", ", near)}."
            : $"There is no definition '{key}'. The command 'catalogue' lists them.");

    /// <summary>One word of the command line: <c>name=90 mm[Hg]</c>, <c>name=0.4</c>, <c>name=male</c>, <c>name=missing</c>.</summary>
    /// <exception cref="UnusableRequestException">No name, or no value.</exception>
    public static Given Word(string word)
    {
        var at = word.IndexOf('=', StringComparison.Ordinal);
        var (name, value) = at > 0 ? (word[..at].Trim(), word[(at + 1)..].Trim()) : ("", "");
        if (name.Length == 0 || value.Length == 0)
        {
            throw new UnusableRequestException($"'{word}' is not of the form name=value.");
        }

        var number = Number().Match(value);
        if (!number.Success)
        {
            return new Given(name, null, null, value == "null" ? "missing" : value);
        }

        return decimal.TryParse(number.ValueSpan, Style, CultureInfo.InvariantCulture, out var parsed)
            ? new Given(name, parsed, value[number.Length..].Trim() is { Length: > 0 } unit ? unit : null, null)
            : throw new UnusableRequestException($"{name}: '{number.Value}' has too many digits.");
    }

    /// <summary>One member of <c>inputs</c>: a bare number, word, truth value or null, or an object with value and unit.</summary>
    /// <exception cref="UnusableRequestException">Anything else.</exception>
    public static Given Member(JsonProperty member)
    {
        if (member.Value.ValueKind != JsonValueKind.Object)
        {
            return Bare(member.Name, member.Value, null, null);
        }

        // An unknown member (such as "units") would silently change the meaning of the number.
        if (member.Value.EnumerateObject().FirstOrDefault(part => part.Name is not ("value" or "unit" or "transducer")) is { Value.ValueKind: not JsonValueKind.Undefined } odd)
        {
            throw new UnusableRequestException($"{member.Name}: '{odd.Name}' is not one of value, unit, transducer.");
        }

        return member.Value.TryGetProperty("value", out var value)
            ? Bare(member.Name, value, Text(member, "unit"), Text(member, "transducer"))
            : throw new UnusableRequestException($"{member.Name} has no value.");
    }

    private static Given Bare(string name, JsonElement value, string? unit, string? transducer) => value.ValueKind switch
    {
        JsonValueKind.Number when value.TryGetDecimal(out var number) => new Given(name, number, unit, null, transducer),
        JsonValueKind.String => new Given(name, null, null, value.GetString()),
        JsonValueKind.True => new Given(name, null, null, "true"),
        JsonValueKind.False => new Given(name, null, null, "false"),
        JsonValueKind.Null => new Given(name, null, null, "missing"),
        _ => throw new UnusableRequestException($"{name}: the value is neither a number nor a word."),
    };

    private static string? Text(JsonProperty member, string name) => !member.Value.TryGetProperty(name, out var part) || part.ValueKind == JsonValueKind.Null
        ? null
        : part.ValueKind == JsonValueKind.String ? part.GetString() : throw new UnusableRequestException($"{member.Name}: the {name} is not a text.");

    [GeneratedRegex(@"^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?", RegexOptions.CultureInvariant)]
    private static partial Regex Number();
}
