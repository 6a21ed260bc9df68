using System.Collections.Frozen;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Fhir;

/// <summary>A value in the terms of its kind, or the code that says why it cannot be one.</summary>
internal readonly record struct Converted(double Value, string? Refused, decimal? Given, string? GivenUnit, string? Flag = null);

/// <summary>From a value as sent to the canonical unit of its kind. What is not exactly understood is refused.</summary>
internal sealed class Quantities(CodedMap values, bool fio2PercentRepair)
{
    /// <summary>Spellings of units without a system; every other unit must be a UCUM code.</summary>
    private static readonly FrozenDictionary<string, string> Aliases = new Dictionary<string, string>(StringComparer.Ordinal)
    {
        ["mmHg"] = "mm[Hg]",
        ["mm Hg"] = "mm[Hg]",
        ["cmH2O"] = "cm[H2O]",
        ["cm H2O"] = "cm[H2O]",
        ["cmH₂O"] = "cm[H2O]",
        ["bpm"] = "/min",
        ["breaths/min"] = "/min",
        ["insp/min"] = "/min",
        ["°C"] = "Cel",
        ["°F"] = "[degF]",
        ["in"] = "[in_i]",
        ["lb"] = "[lb_av]",
        ["lbs"] = "[lb_av]",
    }.ToFrozenDictionary(StringComparer.Ordinal);

    public Converted Convert(Kind kind, ValueFact? value, string? absent)
    {
        if (absent is not null || value is null or QuantityFact { Number: null, Exact: true } or ConceptFact { Codes.Count: 0, Text: null })
        {
            return new(double.NaN, Withheld.ValueAbsent, null, null);
        }

        return (kind.IsCoded, value) switch
        {
            (true, ConceptFact concept) => Coded(kind, concept),
            (false, QuantityFact quantity) => Quantity(kind, quantity),
            _ => new(double.NaN, Withheld.ValueNotExact, null, null),
        };
    }

    private Converted Coded(Kind kind, ConceptFact concept)
    {
        var given = concept.Text ?? concept.Codes[0].Code;
        return values.Find(kind, concept) is { } index ? new(index, null, null, given) : new(double.NaN, Withheld.InputInvalid, null, given);
    }

    private Converted Quantity(Kind kind, QuantityFact quantity)
    {
        var sent = quantity.Code ?? quantity.Unit;
        if (!quantity.Exact || quantity.Number is not { } number)
        {
            return new(double.NaN, Withheld.ValueNotExact, quantity.Number, sent);
        }

        if (Unit(quantity, kind.Unit!) is not { } unit || !Ucum.TryConvert(number, unit, kind.Unit!, out var converted))
        {
            return new(double.NaN, Withheld.UnitUnknown, number, sent);
        }

        string? flag = null;
        if (fio2PercentRepair && unit == "%" && kind.RangeCode == Withheld.Fio2UnitImplausible && number is >= 0.2m and <= 1.0m)
        {
            (converted, flag) = (number, ReadingFlags.Fio2PercentRepaired);
        }

        var canonical = (double)converted;
        return canonical >= kind.Least && canonical <= kind.Greatest
            ? new(canonical, null, number, sent, flag)
            : new(double.NaN, kind.RangeCode, number, sent);
    }

    /// <summary>The UCUM code; without one, the unit for people where it is itself a UCUM code, or, without a system, an alias.</summary>
    private static string? Unit(QuantityFact quantity, string wanted)
    {
        if (quantity.System is not (null or CodeSystems.Ucum))
        {
            return null;
        }

        if (quantity.System is not null && quantity.Code is not null)
        {
            return quantity.Code;
        }

        var sent = quantity.Code ?? quantity.Unit;
        return sent is null ? null
            : Ucum.TryConvert(0m, sent, wanted, out _) ? sent
            : quantity.System is null ? Aliases.GetValueOrDefault(sent) : null;
    }
}

/// <summary>Flags that only reading sets.</summary>
public static class ReadingFlags
{
    /// <summary>An oxygen fraction was sent as a percentage; the site's switch had it read as a fraction.</summary>
    public const string Fio2PercentRepaired = "fio2-percent-repaired";
}
