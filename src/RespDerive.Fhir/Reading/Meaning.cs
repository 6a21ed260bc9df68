using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Fhir;

/// <summary>What a value is: a kind, refused or not; or nothing for us, with the reason.</summary>
internal readonly record struct Meant(Kind? Kind, string? Refused, string? Ignored, string? Key)
{
    public static Meant As(Key key, string? refused = null) => key.Kind is { } kind
        ? new(kind, refused, null, key.Name) : new(null, null, Refusals.NotUsed, key.Name);

    public static Meant Not(string reason, string? key = null) => new(null, null, reason, key);
}

/// <summary>What stands around a value and helps to say what it is.</summary>
/// <param name="Laboratory">Its category is laboratory, or it has a specimen.</param>
/// <param name="VitalSign">Its category is vital-signs.</param>
/// <param name="Sample">Key of the blood the specimen is: arterial-blood…; null when unknown.</param>
/// <param name="Metric">Category of the DeviceMetric; null when there is none.</param>
internal readonly record struct Surroundings(bool Laboratory, bool VitalSign, string? Sample, string? Metric);

/// <summary>From the codes of a value, and what stands around it, to what it is.</summary>
internal sealed class Meaning(CodeMap codes)
{
    /// <summary>Key of the code that stands on arterial saturations and, by the vital-signs profile of FHIR R4, on every SpO2.</summary>
    public const string Saturation = "sao2";

    public const string ArterialBlood = "arterial-blood";

    public Meant Of(PartFacts part, Surroundings around)
    {
        var unit = part.Value is QuantityFact quantity ? quantity.Code ?? quantity.Unit : null;
        var names = part.Codes.Select(code => codes.OfSite(code, unit)).OfType<string>().Distinct().ToList();
        var siteSaidSo = names.Count > 0;
        names = siteSaidSo ? names : [.. part.Codes.Select(codes.OfTables).OfType<string>().Distinct()];
        if (names.Count == 0)
        {
            return Meant.Not(Refusals.CodeNotMapped);
        }

        var keys = Exact([.. names.Select(Keys.Find).OfType<Key>()]);
        if (keys.Count == 0)
        {
            return Meant.Not(Refusals.NotUsed);
        }

        if (keys.Count > 1)
        {
            // Two codes that contradict each other: known to be for us, but not what.
            return Meant.As(keys.Find(candidate => candidate.Kind is not null) ?? keys[0], Withheld.InputInvalid);
        }

        var key = ByMetric(keys[0], around.Metric, out var misplaced);
        if (misplaced)
        {
            return Meant.As(key, Withheld.InputInvalid);
        }

        if (key.Name == Saturation && !siteSaidSo)
        {
            if (around.VitalSign)
            {
                return Meant.As(Keys.Find("spo2")!);
            }

            if (!around.Laboratory && around.Sample != ArterialBlood)
            {
                return Meant.Not(Refusals.CodeAmbiguous, key.Name);
            }
        }

        return BySample(key, around.Sample);
    }

    /// <summary>Which blood a specimen is; null when its type does not say.</summary>
    public string? Sample(SpecimenFacts specimen)
    {
        var samples = specimen.Types.Select(codes.Of).Where(key => key is ArterialBlood or "venous-blood" or "capillary-blood").Distinct().ToList();
        return samples.Count == 1 ? samples[0] : null;
    }

    private static Key ByMetric(Key key, string? metric, out bool misplaced)
    {
        var other = metric switch { "setting" => key.WhenSetting, "measurement" => key.WhenMeasurement, _ => "" };
        misplaced = metric == "setting" && other.Length == 0 && key.Kind?.Origin == Origin.Measurement;
        return other.Length == 0 ? key : Keys.Find(other)!;
    }

    private static Meant BySample(Key key, string? sample)
    {
        if (key.WhenArterial.Length > 0)
        {
            return sample == ArterialBlood ? Meant.As(Keys.Find(key.WhenArterial)!) : Meant.As(key, Withheld.NotArterial);
        }

        return key.IsArterial && sample is not null and not ArterialBlood ? Meant.As(key, Withheld.NotArterial) : Meant.As(key);
    }

    /// <summary>Without the keys that only say less exactly what another one says.</summary>
    private static List<Key> Exact(List<Key> keys) =>
        [.. keys.Where(key => !keys.Exists(other => other != key && other.Broader.Contains(key.Name)))];
}
