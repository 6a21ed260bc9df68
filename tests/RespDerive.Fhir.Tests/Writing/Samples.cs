using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Tests.Writing;

/// <summary>Outcomes of an invented patient.</summary>
internal static class Samples
{
    public const string Origin = "https://ehr.example/fhir";
    public static readonly DateTimeOffset At = new(2026, 3, 4, 6, 12, 0, TimeSpan.FromHours(1));
    public static readonly DateTimeOffset Recorded = new(2026, 3, 4, 5, 20, 7, 250, TimeSpan.Zero);
    public static readonly Policy Policy = PolicyDocument.WithHash(new Policy { PressureMmHg = 747 });

    public static readonly RenderOptions Options = new() { Site = "north-wing", SoftwareVersion = "0.1.0", DeviceId = "17" };

    public static ResultRenderer Renderer(Func<RenderOptions, RenderOptions>? change = null) => new(Catalogue.Shipped, change is null ? Options : change(Options));

    public static Edition First => new() { Status = EditionStatus.Final, Recorded = Recorded };

    public static Edition Second => new() { Status = EditionStatus.Corrected, Recorded = Recorded.AddHours(1), Revision = 2, ServerId = "9001", PreviousVersion = "3" };

    public static Edition Retraction => Second with { Status = EditionStatus.EnteredInError, Withheld = Withheld.NotArterial };

    public static UsedReading Reading(string id, double value, string version = "1", int minutes = 0, string part = "", string type = "Observation") =>
        new(new ResourceKey("ehr", type, id), part, version, Origin, At.AddMinutes(minutes), value);

    public static Outcome PfRatio => new()
    {
        Identity = new Guid("5d0c7a52-8f0e-5b7e-9f0a-2a6c1b3d4e5f"),
        Definition = "pf-ratio",
        Revision = 1,
        Source = "ehr",
        Patient = "Patient/ada-1",
        Encounter = "Encounter/stay-7",
        Anchor = Reading("gas-31-po2", 72.5, "2"),
        AnchorReference = "Observation/gas-31-po2/_history/2",
        At = At,
        AtText = "2026-03-04T06:12:00+01:00",
        Value = 145,
        Published = 145m,
        Unit = "mm[Hg]",
        Uncertainty = 9.81234,
        Inputs =
        [
            new UsedInput { Kind = "pao2", Value = 72.5, Unit = "mm[Hg]", Readings = [Reading("gas-31-po2", 72.5, "2")], GapMinutes = 0, Share = 0.6 },
            new UsedInput { Kind = "fio2-set", Value = 0.5, Unit = "1", Readings = [Reading("vent-88", 0.5, "5", -14)], GapMinutes = -14, Share = 0.4 },
            new UsedInput { Kind = "paco2", Value = 46, Unit = "mm[Hg]", Readings = [Reading("gas-31-pco2", 46)], GapMinutes = 0, GateOnly = true },
        ],
        Policy = Policy.Hash,
    };

    public static Outcome DrivingPressure => PfRatio with
    {
        Identity = new Guid("0b0f6c5e-2f1a-5c33-8a51-7e2d90a1c4b6"),
        Definition = "driving-pressure",
        Anchor = Reading("hold-4", 26, "1", part: "plateau"),
        AnchorReference = "Observation/hold-4/_history/1#plateau",
        Value = 14,
        Published = 14m,
        Unit = "cm[H2O]",
        Uncertainty = 2.0412,
        Flags = [Flags.PassivityUnconfirmed, Flags.PeepNotTotal],
        Variant = "peep-not-total",
        SiteTolerance = true,
        Inputs =
        [
            new UsedInput { Kind = "plateau-pressure", Value = 26, Unit = "cm[H2O]", Readings = [Reading("hold-4", 26, "1", part: "plateau")], GapMinutes = 0 },
            new UsedInput { Kind = "peep-set", Value = 12, Unit = "cm[H2O]", Readings = [Reading("vent-90", 12, "1", -3)], GapMinutes = -3 },
        ],
    };

    public static Outcome AaGradient => PfRatio with
    {
        Identity = new Guid("c1d6a7d2-6a4b-5f5a-9a3a-9e5d7a0b1c2d"),
        Definition = "aa-gradient",
        Value = 228.1,
        Published = 228m,
        Uncertainty = 24.4,
        Inputs =
        [
            .. PfRatio.Inputs.Select(input => input with { GateOnly = false }),
            new UsedInput { Kind = "barometric-pressure", Value = 747, Unit = "mm[Hg]", Assumed = true },
            new UsedInput { Kind = "water-vapour-pressure", Value = 47, Unit = "mm[Hg]", Assumed = true },
            new UsedInput { Kind = "respiratory-quotient", Value = 0.8, Unit = "1", Assumed = true },
        ],
        Intermediates = [new Intermediate("alveolar-po2", 300.6251234567, "mm[Hg]")],
    };

    public static Outcome PredictedBodyWeight => PfRatio with
    {
        Definition = "predicted-body-weight",
        Anchor = Reading("height-1", 170),
        Value = 66.0,
        Published = 66m,
        Unit = "kg",
        Uncertainty = 0.53,
        Person = new UsedReading(new ResourceKey("ehr", "Patient", "ada-1"), "", "8", Origin, At, double.NaN),
        Inputs =
        [
            new UsedInput { Kind = "height", Value = 170, Unit = "cm", Readings = [Reading("height-1", 170)], GapMinutes = 0 },
            new UsedInput { Kind = "sex", Value = 1, Code = "male" },
            new UsedInput { Kind = "age", Value = 54, Unit = "a", GateOnly = true },
        ],
    };

    /// <summary>An outcome of any definition, from its first worked example that can be computed.</summary>
    public static Outcome Synthetic(Definition definition)
    {
        var (inputs, computation) = definition.Vectors.Select(vector => Computed(definition, vector)).First(pair => pair.Computation.Withheld is null);
        return PfRatio with
        {
            Identity = NameBasedUuid.Of(NameBasedUuid.Site("north-wing"), definition.Key),
            Definition = definition.Key,
            Revision = definition.Revision,
            Anchor = Reading("anchor", inputs[0].Value),
            Value = computation.Placement is null ? computation.Value : null,
            Published = computation.Placement is null ? computation.Published : null,
            Unit = definition.Result.Unit,
            Uncertainty = computation.Placement is null ? computation.Uncertainty : null,
            Code = computation.Placement?.Code,
            Flags = computation.Flags,
            Variant = computation.Variant,
            Inputs = inputs,
        };
    }

    private static (List<UsedInput> Inputs, Computation Computation) Computed(Definition definition, Vector vector)
    {
        var computed = ByHand.Compute(definition, vector.Inputs);
        return ([.. computed.Inputs.Select(Input)], computed.Computation);
    }

    private static UsedInput Input(HandInput input) => new()
    {
        Kind = input.Kind.Key,
        Value = input.Value,
        Unit = input.Kind.Unit,
        Code = input.Code,
        Readings = input.Assumed ? [] : [Reading(input.Kind.Key, input.Value)],
        Assumed = input.Assumed,
        GateOnly = input.CheckedOnly,
    };
}
