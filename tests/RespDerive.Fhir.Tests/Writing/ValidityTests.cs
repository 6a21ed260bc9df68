using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Tests.Writing;

/// <summary>Everything we write is valid R4, by the published R4 definitions.</summary>
[Collection(nameof(R4Validation))]
public sealed class ValidityTests(R4Validation r4)
{
    public static TheoryData<string> Definitions => [.. Catalogue.Shipped.All.Select(definition => definition.Key)];

    [Theory, MemberData(nameof(Definitions))]
    public void Every_definition_renders_to_valid_resources(string key)
    {
        var definition = Catalogue.Shipped.Find(key)!;
        var outcome = Samples.Synthetic(definition);
        var renderer = Samples.Renderer();
        r4.Accepts(renderer.Observation(outcome, Samples.First));
        r4.Accepts(renderer.Observation(outcome, Samples.Retraction));
        r4.Accepts(renderer.Provenance(outcome, Samples.First, "Observation/9001"));
        r4.Accepts(renderer.Definition(definition));
    }

    [Fact]
    public void Every_sample_and_way_of_writing_is_valid()
    {
        Outcome[] outcomes = [Samples.PfRatio, Samples.DrivingPressure, Samples.AaGradient, Samples.PredictedBodyWeight];
        Edition[] editions = [Samples.First, Samples.First with { Status = EditionStatus.Preliminary }, Samples.Second, Samples.Retraction];
        Func<RenderOptions, RenderOptions>[] ways =
        [
            options => options,
            options => options with { DeviceId = null },
            options => options with { UsePutIds = true, DeviceId = null },
            options => options with { TargetHoldsInputs = false, OmitDevice = true, ProcedureCategory = true, Organization = "Organization/1" },
        ];
        foreach (var (outcome, edition, way) in outcomes.SelectMany(outcome => editions.SelectMany(edition => ways.Select(way => (outcome, edition, way)))))
        {
            var renderer = Samples.Renderer(way);
            r4.Accepts(renderer.Transaction(outcome, edition, renderer.Policy(Samples.Policy)));
        }
    }

    [Fact]
    public void Device_and_policy_are_valid()
    {
        r4.Accepts(Samples.Renderer().Device());
        r4.Accepts(Samples.Renderer().Policy(Samples.Policy));
    }

    [Fact]
    public void The_validator_does_refuse_what_is_not_R4()
    {
        var wrong = Samples.Renderer().Observation(Samples.PfRatio, Samples.First);
        wrong.DataAbsentReason = new CodeableConcept(Vocabulary.Ucum, "error");
        Assert.ThrowsAny<Exception>(() => r4.Accepts(wrong));
    }
}
