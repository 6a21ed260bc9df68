using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class ProvenanceTests
{
    private static readonly Vocabulary Words = Samples.Renderer().Words;

    private static Provenance Rendered(Outcome outcome, Edition? edition = null, Func<RenderOptions, RenderOptions>? change = null) =>
        Samples.Renderer(change).Provenance(outcome, edition ?? Samples.First, "Observation/9001");

    [Fact]
    public void Target_has_no_version_and_carries_the_revision()
    {
        var target = Assert.Single(Rendered(Samples.PfRatio, Samples.Second).Target);
        Assert.Equal("Observation/9001", target.Reference);
        Assert.Equal(2, ((PositiveInt)target.GetExtension(Words.ResultRevision)!.Value!).Value);
    }

    [Fact]
    public void Activity_is_create_update_or_nullify()
    {
        // Codes of http://terminology.hl7.org/CodeSystem/v3-DataOperation
        Edition[] editions = [Samples.First, Samples.Second, Samples.Retraction];
        Assert.Equal(["CREATE", "UPDATE", "NULLIFY"], editions.Select(edition => Rendered(Samples.PfRatio, edition).Activity.Coding[0].Code));
    }

    [Fact]
    public void Sources_carry_version_and_the_value_used_at_full_precision()
    {
        var outcome = Samples.PfRatio with { Inputs = [Samples.PfRatio.Inputs[0] with { Readings = [Samples.Reading("gas-31-po2", 90.00753066110619, "2", part: "2703-7")] }] };
        var entity = Assert.Single(Rendered(outcome).Entity);
        Assert.Equal(Provenance.ProvenanceEntityRole.Source, entity.Role);
        Assert.Equal("2", ((FhirString)entity.GetExtension(Words.InputVersion)!.Value!).Value);
        var used = entity.GetExtension(Words.ValueUsed)!;
        Assert.Equal("pao2", ((Code)used.GetExtension("kind")!.Value!).Value);
        Assert.Equal("2703-7", ((FhirString)used.GetExtension("part")!.Value!).Value);
        Assert.Equal(90.0075306611062m, ((Quantity)used.GetExtension("value")!.Value!).Value);
    }

    [Fact]
    public void Two_components_of_one_resource_are_one_entity_with_two_values()
    {
        var outcome = Samples.DrivingPressure with
        {
            Inputs = [Samples.DrivingPressure.Inputs[0], Samples.DrivingPressure.Inputs[1] with { Readings = [Samples.Reading("hold-4", 12, part: "peep")] }],
        };
        Assert.Equal(2, Assert.Single(Rendered(outcome).Entity).GetExtensions(Words.ValueUsed).Count());
    }

    [Fact]
    public void A_reading_that_only_a_gate_looked_at_is_evidence_and_no_entity()
    {
        var provenance = Rendered(Samples.PfRatio);
        var evidence = Assert.Single(provenance.GetExtensions(Words.GateEvidence));
        Assert.Equal("Observation/gas-31-pco2/_history/1", ((ResourceReference)evidence.Value!).Reference);
        Assert.DoesNotContain(provenance.Entity, entity => entity.What.Reference.Contains("pco2", StringComparison.Ordinal));
    }

    [Fact]
    public void The_person_is_a_source_where_sex_or_age_was_used()
    {
        var person = Rendered(Samples.PredictedBodyWeight).Entity.Single(entity => entity.What.Type == "Patient");
        Assert.Equal("Patient/ada-1/_history/8", person.What.Reference);
        Assert.Equal("sex", ((Code)person.GetExtension(Words.ValueUsed)!.GetExtension("kind")!.Value!).Value);
    }

    [Fact]
    public void A_revision_names_the_version_before()
    {
        Assert.DoesNotContain(Rendered(Samples.PfRatio).Entity, entity => entity.Role == Provenance.ProvenanceEntityRole.Revision);
        var revision = Rendered(Samples.PfRatio, Samples.Second).Entity.Single(entity => entity.Role == Provenance.ProvenanceEntityRole.Revision);
        Assert.Equal("Observation/9001/_history/3", revision.What.Reference);
    }

    [Fact]
    public void Policy_names_the_definition_revision_and_the_site_policy() =>
        Assert.Equal([Words.Definition("pf-ratio") + "|1", $"{Words.Policy}|{Samples.Policy.Hash}"], Rendered(Samples.PfRatio).Policy);

    [Fact]
    public void A_retraction_says_why()
    {
        var reason = (Coding)Rendered(Samples.PfRatio, Samples.Retraction).GetExtension(Words.WithheldReason)!.Value!;
        Assert.Equal(Withheld.NotArterial, reason.Code);
        Assert.Null(Rendered(Samples.PfRatio, Samples.Second).GetExtension(Words.WithheldReason));
    }

    [Fact]
    public void The_software_acts_for_the_organisation_where_one_is_configured()
    {
        var agent = Assert.Single(Rendered(Samples.PfRatio, null, options => options with { Organization = "Organization/4", OmitDevice = true }).Agent);
        Assert.Equal(("assembler", "Device/17", "Organization/4"), (agent.Type.Coding[0].Code, agent.Who.Reference, agent.OnBehalfOf.Reference));
    }

    [Fact]
    public void The_id_is_the_same_for_a_resend_and_another_for_other_content()
    {
        static string Id(Outcome outcome, Edition edition) => ((FhirString)Rendered(outcome, edition).GetExtension(Words.ProvenanceId)!.Value!).Value!;
        Assert.Equal(Id(Samples.PfRatio, Samples.First), Id(Samples.PfRatio, Samples.First));
        Assert.NotEqual(Id(Samples.PfRatio, Samples.First), Id(Samples.PfRatio, Samples.Second with { Recorded = Samples.Recorded, Status = EditionStatus.Final }));
        Assert.NotEqual(Id(Samples.PfRatio, Samples.First), Id(Samples.PfRatio with { Published = 146m }, Samples.First));
    }

    [Fact]
    public void With_our_own_ids_the_id_is_the_resource_id()
    {
        var provenance = Rendered(Samples.PfRatio, null, options => options with { UsePutIds = true });
        Assert.Equal(provenance.Id, ((FhirString)provenance.GetExtension(Words.ProvenanceId)!.Value!).Value);
    }
}
