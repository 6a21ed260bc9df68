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
        // Invariant obs-6: no dataAbsentReason beside a value.
        var both = Samples.Renderer().Observation(Samples.PfRatio, Samples.First);
        both.DataAbsentReason = new CodeableConcept("http://terminology.hl7.org/CodeSystem/data-absent-reason", "error", "Error", null);
        Assert.Contains("obs-6", Assert.ThrowsAny<Exception>(() => r4.Accepts(both)).Message, StringComparison.Ordinal);
    }

    /// <summary>The validator does not look at displays, so they are compared with the code systems published with R4.</summary>
    [Fact]
    public async System.Threading.Tasks.Task Standard_codes_have_the_display_of_their_code_system()
    {
        var renderer = Samples.Renderer(options => options with { ProcedureCategory = true });
        Edition[] editions = [Samples.First, Samples.Second, Samples.Retraction];
        Resource[] written = [renderer.Policy(Samples.Policy), renderer.Definition(Catalogue.Shipped.All[0]), .. editions.Select(edition => renderer.Transaction(Samples.PfRatio, edition))];
        var codings = written.SelectMany(Codings).Where(coding => coding.System.StartsWith("http://terminology.hl7.org/", StringComparison.Ordinal)).ToList();
        Assert.Equal(5, codings.Select(coding => coding.System).Distinct().Count());
        foreach (var coding in codings)
        {
            Assert.Equal(await r4.DisplayAsync(coding.System, coding.Code), coding.Display);
        }
    }

    private static IEnumerable<Coding> Codings(Base element) =>
        element is Coding coding ? [coding] : element.EnumerateElements().Select(member => member.Value).SelectMany(value => value switch
        {
            Base one => Codings(one),
            System.Collections.IEnumerable many and not string => many.OfType<Base>().SelectMany(Codings),
            _ => [],
        });
}
