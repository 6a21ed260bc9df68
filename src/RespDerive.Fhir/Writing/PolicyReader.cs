using System.Globalization;
using System.Text.Json;
using RespDerive.Fhir.Server;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Writing;

/// <summary>Reads the settings of one policy on top of another, collecting faults instead of stopping at the first.</summary>
internal sealed class PolicyReader(Catalogue catalogue, List<string> errors)
{
    private static readonly Dictionary<string, double> Charting = new(StringComparer.Ordinal) { ["periodic"] = 4, ["on-change"] = 24 };

    public Policy Read(JsonElement json, Policy basis, string at, string? alsoAllowed)
    {
        if (json.ValueKind != JsonValueKind.Object)
        {
            errors.Add($"{at.TrimEnd('.')}: must be an object");
            return basis;
        }

        if (json.TryGetProperty("pressure", out _) && json.TryGetProperty("altitude", out _))
        {
            errors.Add($"{at}pressure: give pressure or altitude, not both");
        }

        var policy = basis;
        foreach (var member in json.EnumerateObject().Where(member => member.Name != alsoAllowed))
        {
            var place = at + member.Name;
            policy = member.Name switch
            {
                "validFrom" => policy with { ValidFrom = Moment(member.Value, place) },
                "pressure" => policy with { PressureMmHg = Within(Kinds.BarometricPressure, member.Value, place), AltitudeMetres = null },
                "altitude" => policy with { AltitudeMetres = Number(member.Value, place, "m", -430, 9000), PressureMmHg = null },
                "respiratoryQuotient" => policy with { RespiratoryQuotient = Within(Kinds.RespiratoryQuotient, member.Value, place) ?? policy.RespiratoryQuotient },
                "acceptSetPeep" => policy with { AcceptSetPeep = Flag(member.Value, place) ?? policy.AcceptSetPeep },
                "definitions" => policy with { Definitions = Keys(member.Value, place) },
                "tolerances" => policy with { Tolerances = Each(member.Value, place, Tolerance, name => Known(name, place)) },
                "sources" => policy with { Sources = Each(member.Value, place, Timing, _ => { }) },
                _ => Unknown(policy, place),
            };
        }

        return policy;
    }

    private Policy Unknown(Policy policy, string place)
    {
        errors.Add($"{place}: unknown key");
        return policy;
    }

    private void Known(string kind, string place)
    {
        if (Kinds.Find(kind) is not { IsCoded: false })
        {
            errors.Add($"{place}.{kind}: not a kind of value that is read");
        }
    }

    private DateTimeOffset? Moment(JsonElement json, string place)
    {
        var text = json.ValueKind == JsonValueKind.String ? json.GetString()! : "";
        // A moment without zone would mean another thing on another machine.
        if (text.Length > 10 && (text.EndsWith('Z') || text[^6] is '+' or '-')
            && DateTimeOffset.TryParse(text, CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out var moment))
        {
            return moment;
        }

        errors.Add($"{place}: must be a date and time with zone, such as 2026-01-01T00:00:00+01:00");
        return null;
    }

    private double? Within(Kind kind, JsonElement json, string place) => Number(json, place, kind.Unit!, kind.Least, kind.Greatest);

    /// <summary>A number in the unit of the setting, or an object of value and UCUM unit.</summary>
    private double? Number(JsonElement json, string place, string unit, double least, double greatest)
    {
        var given = unit;
        if (json.ValueKind == JsonValueKind.Object)
        {
            Only(json, place, "value", "unit");
            given = json.TryGetProperty("unit", out var named) && named.ValueKind == JsonValueKind.String ? named.GetString()! : "";
            json = json.TryGetProperty("value", out var inner) ? inner : default;
        }

        if (json.ValueKind != JsonValueKind.Number || !json.TryGetDecimal(out var number))
        {
            errors.Add($"{place}: must be a number, or an object of value and unit");
            return null;
        }

        if (!Ucum.TryConvert(number, given, unit, out var converted))
        {
            errors.Add($"{place}: unit must be one of {string.Join(", ", Ucum.Alike(unit))}");
            return null;
        }

        if ((double)converted < least || (double)converted > greatest)
        {
            errors.Add(string.Create(CultureInfo.InvariantCulture, $"{place}: must be {least} to {greatest} {unit}"));
            return null;
        }

        return (double)converted;
    }

    private bool? Flag(JsonElement json, string place)
    {
        if (json.ValueKind is JsonValueKind.True or JsonValueKind.False)
        {
            return json.GetBoolean();
        }

        errors.Add($"{place}: must be true or false");
        return null;
    }

    private List<string> Keys(JsonElement json, string place)
    {
        var keys = new List<string>();
        if (json.ValueKind != JsonValueKind.Array)
        {
            errors.Add($"{place}: must be a list of definitions");
            return keys;
        }

        foreach (var (item, i) in json.EnumerateArray().Select((item, i) => (item, i)))
        {
            var definition = item.ValueKind == JsonValueKind.String ? catalogue.Find(item.GetString()!) : null;
            if (definition is null)
            {
                errors.Add($"{place}[{i}]: no such definition");
            }
            else if (definition.ByHandOnly)
            {
                errors.Add($"{place}[{i}]: {definition.Key} is computed by hand only and never published");
            }
            else if (!keys.Contains(definition.Key, StringComparer.Ordinal))
            {
                keys.Add(definition.Key);
            }
        }

        return keys;
    }

    private Dictionary<string, T> Each<T>(JsonElement json, string place, Func<JsonElement, string, T?> read, Action<string> check)
        where T : class
    {
        var all = new Dictionary<string, T>(StringComparer.Ordinal);
        if (json.ValueKind != JsonValueKind.Object)
        {
            errors.Add($"{place}: must be an object");
            return all;
        }

        foreach (var member in json.EnumerateObject())
        {
            check(member.Name);
            if (read(member.Value, $"{place}.{member.Name}") is { } value)
            {
                all[member.Name] = value;
            }
        }

        return all;
    }

    private Tolerance? Tolerance(JsonElement json, string place)
    {
        if (!Only(json, place, "as", "absolute", "relative", "sharedZero", "source"))
        {
            return null;
        }

        var form = json.Text("as");
        var source = json.Text("source");
        if (form is not ("limit" or "deviation"))
        {
            errors.Add($"{place}.as: must be \"limit\" (±a) or \"deviation\" (standard deviation)");
        }

        if (string.IsNullOrWhiteSpace(source))
        {
            errors.Add($"{place}.source: missing; name the document or the measurement the figures are from");
        }

        var absolute = json.TryGetProperty("absolute", out var first) ? Number(first, place + ".absolute", "1", 0, 1000) : 0;
        var relative = json.TryGetProperty("relative", out var second) ? Number(second, place + ".relative", "1", 0, 1) : 0;
        var zero = json.TryGetProperty("sharedZero", out var shared) && (Flag(shared, place + ".sharedZero") ?? false);
        return new Tolerance(absolute ?? 0, relative ?? 0, form == "limit", source ?? "", zero);
    }

    private SourceTiming? Timing(JsonElement json, string place)
    {
        if (!Only(json, place, "settings"))
        {
            return null;
        }

        if (!json.TryGetProperty("settings", out var settings))
        {
            return new SourceTiming();
        }

        var hours = settings.ValueKind == JsonValueKind.String
            ? Charting.TryGetValue(settings.GetString()!, out var named) ? named : Refused()
            : Number(settings, place + ".settings", "h", 0.25, 168);
        return hours is { } age ? new SourceTiming { SettingMaxAge = TimeSpan.FromHours(age) } : null;

        double? Refused()
        {
            errors.Add($"{place}.settings: must be \"periodic\", \"on-change\" or hours");
            return null;
        }
    }

    private bool Only(JsonElement json, string place, params ReadOnlySpan<string> names)
    {
        if (json.ValueKind != JsonValueKind.Object)
        {
            errors.Add($"{place}: must be an object");
            return false;
        }

        foreach (var member in json.EnumerateObject())
        {
            if (!names.Contains(member.Name))
            {
                errors.Add($"{place}.{member.Name}: unknown key");
            }
        }

        return true;
    }
}
