using System.Text;
using System.Text.Json;
using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class ObservationTests
{
    private static Observation Rendered(Outcome outcome, Edition? edition = null, Func<RenderOptions, RenderOptions>? change = null) =>
        Samples.Renderer(change).Observation(outcome, edition ?? Samples.First);

    [Fact]
    public void Decimals_of_the_definition_are_written_also_when_they_are_zeros()
    {
        var json = Encoding.UTF8.GetString(FhirJson.Bytes(Rendered(Samples.DrivingPressure with { Published = 7m, Value = 7 })));
        Assert.Contains("\"value\":7.0,\"unit\":\"cmH2O\"", json, StringComparison.Ordinal);
    }

    [Fact]
    public void Decimals_survive_reading_and_writing_by_a_standard_library()
    {
        var once = FhirJson.Bytes(Rendered(Samples.DrivingPressure));
        Assert.Equal(once, FhirJson.Bytes(R4Validation.Strict(once)));
    }

    [Fact]
    public void Numbers_are_in_plain_notation()
    {
        var outcome = Samples.PfRatio with { Published = 100m, Value = 1e2, Uncertainty = 1.23e-7 };
        var json = Encoding.UTF8.GetString(FhirJson.Bytes(Rendered(outcome)));
        Assert.Contains("\"valueDecimal\":0.00000012}", json, StringComparison.Ordinal);
        Assert.Contains("\"value\":100,", json, StringComparison.Ordinal);
    }

    [Fact]
    public void Identifier_is_the_identity_in_lower_case()
    {
        var identifier = Assert.Single(Rendered(Samples.PfRatio).Identifier);
        Assert.Equal(("https://respderive.example/fhir/result", "5d0c7a52-8f0e-5b7e-9f0a-2a6c1b3d4e5f"), (identifier.System, identifier.Value));
    }

    [Fact]
    public void Our_own_code_stands_beside_the_standard_one()
    {
        // LOINC 2.68: 50984-4 Horowitz index in Arterial blood; reported in mm[Hg].
        var code = Rendered(Samples.PfRatio).Code;
        Assert.Equal(["50984-4", "pf-ratio", "150656"], code.Coding.Select(coding => coding.Code));
        Assert.Equal("Ratio of arterial oxygen tension to inspired oxygen fraction (PF)", code.Text);
    }

    [Fact]
    public void Without_a_standard_code_ours_stands_alone_in_front() =>
        Assert.Equal("driving-pressure", Rendered(Samples.DrivingPressure).Code.Coding[0].Code);

    [Fact]
    public void Category_is_ours_and_never_vital_signs_or_laboratory()
    {
        Assert.Equal(["derived-respiratory"], Rendered(Samples.PfRatio).Category.SelectMany(category => category.Coding).Select(coding => coding.Code));
        Assert.Equal(["derived-respiratory", "procedure"],
            Rendered(Samples.PfRatio, null, options => options with { ProcedureCategory = true }).Category.SelectMany(category => category.Coding).Select(coding => coding.Code));
    }

    [Theory]
    [InlineData("2026-03-04T06:12:00+01:00", "2026-03-04T06:12:00+01:00")]
    [InlineData("2026-03-04T06:12:00.5+01:00", "2026-03-04T06:12:00.5+01:00")]
    [InlineData("2026-03-04T05:12:00Z", "2026-03-04T05:12:00Z")]
    [InlineData("2026-03-04T06:12:00", "2026-03-04T06:12:00+01:00")]
    [InlineData("2026-03-04 06:12", "2026-03-04T06:12:00+01:00")]
    public void Effective_repeats_the_anchor_as_sent_where_that_is_a_FHIR_dateTime(string sent, string written) =>
        Assert.Equal(written, ((FhirDateTime)Rendered(Samples.PfRatio with { AtText = sent }).Effective!).Value);

    [Fact]
    public void Derived_from_names_each_source_version_once_and_no_gate_evidence()
    {
        var outcome = Samples.PfRatio with { Inputs = [.. Samples.PfRatio.Inputs, Samples.PfRatio.Inputs[0] with { Kind = "po2-unspecified" }] };
        var observation = Rendered(outcome);
        Assert.Equal(["Observation/gas-31-po2/_history/2", "Observation/vent-88/_history/5"], observation.DerivedFrom.Select(reference => reference.Reference));
        Assert.Equal("https://ehr.example/fhir|Observation|gas-31-po2|2", observation.DerivedFrom[0].Identifier.Value);
    }

    [Fact]
    public void All_readings_behind_a_median_are_named()
    {
        var median = new UsedInput { Kind = "mean-airway-pressure", Value = 15, Unit = "cm[H2O]", Readings = [Samples.Reading("m1", 14), Samples.Reading("m2", 15), Samples.Reading("m3", 17)] };
        Assert.Equal(4, Rendered(Samples.PfRatio with { Inputs = [Samples.PfRatio.Inputs[0], median] }).DerivedFrom.Count);
    }

    [Fact]
    public void On_a_server_that_does_not_hold_the_inputs_nothing_is_referenced_literally()
    {
        // The same id there may be another patient.
        var observation = Rendered(Samples.PfRatio, null, options => options with { TargetHoldsInputs = false });
        Assert.All(observation.DerivedFrom.Append(observation.Subject).Append(observation.Encounter), reference => Assert.Null(reference.Reference));
        Assert.Equal("https://ehr.example/fhir|Patient|ada-1", observation.Subject.Identifier.Value);
    }

    [Fact]
    public void A_Bundle_internal_address_is_not_repeated_as_a_reference()
    {
        var outcome = Samples.PfRatio with { Inputs = [Samples.PfRatio.Inputs[0] with { Readings = [Samples.Reading("urn:uuid:1b671a64-40d5-491e-99b0-da01ff1f3341", 72.5)] }] };
        var reference = Assert.Single(Rendered(outcome).DerivedFrom);
        Assert.Null(reference.Reference);
        Assert.Contains("urn:uuid:1b671a64", reference.Identifier.Value, StringComparison.Ordinal);
    }

    [Fact]
    public void Components_tell_the_values_used_with_their_distance_and_what_was_assumed()
    {
        var components = Rendered(Samples.AaGradient).Component;
        Assert.Equal(["alveolar-po2", "pao2", "fio2-set", "paco2", "barometric-pressure", "water-vapour-pressure", "respiratory-quotient"], components.Select(component => component.Code.Coding[0].Code));
        Assert.Equal(300.625m, ((Quantity)components[0].Value!).Value);
        Assert.Equal("Inspired oxygen fraction, set (14 min before)", components[2].Code.Text);
        Assert.Equal(-14m, ((FhirDecimal)components[2].GetExtension("https://respderive.example/fhir/StructureDefinition/gap-minutes")!.Value!).Value);
        Assert.Equal("Barometric pressure (site policy)", components[4].Code.Text);
    }

    [Fact]
    public void A_coded_input_is_a_coded_component()
    {
        var sex = Rendered(Samples.PredictedBodyWeight).Component.Single(component => component.Code.Coding[0].Code == "sex");
        Assert.Equal("sex.male", ((CodeableConcept)sex.Value!).Coding[0].Code);
    }

    [Fact]
    public void A_gate_only_input_is_no_component() =>
        Assert.DoesNotContain(Rendered(Samples.PfRatio).Component, component => component.Code.Coding[0].Code == "paco2");

    [Fact]
    public void Uncertainty_is_the_standard_extension_with_two_digits()
    {
        var extension = Rendered(Samples.DrivingPressure).Value!.GetExtension("http://hl7.org/fhir/StructureDefinition/iso21090-uncertainty");
        Assert.Equal("2.0", ((FhirDecimal)extension!.Value!).Value!.Value.ToString(System.Globalization.CultureInfo.InvariantCulture));
    }

    [Theory]
    [InlineData(true, "site")]
    [InlineData(false, "generic")]
    public void Method_tells_definition_revision_variant_and_basis_of_the_uncertainty(bool site, string basis)
    {
        var method = Rendered(Samples.DrivingPressure with { SiteTolerance = site }).Method;
        Assert.Equal(("driving-pressure.peep-not-total", "1"), (method.Coding[0].Code, method.Coding[0].Version));
        Assert.Equal(basis, ((Code)method.GetExtension("https://respderive.example/fhir/StructureDefinition/uncertainty-basis")!.Value!).Value);
    }

    [Fact]
    public void Flags_stand_in_extensions_and_in_one_note()
    {
        var observation = Rendered(Samples.DrivingPressure);
        Assert.Equal([Flags.PassivityUnconfirmed, Flags.PeepNotTotal], observation.Extension.Select(extension => ((Coding)extension.Value!).Code));
        Assert.Equal(2, observation.Note.Count);
        Assert.StartsWith("Flagged: ", observation.Note[0].Text, StringComparison.Ordinal);
    }

    [Fact]
    public void The_caution_of_the_definition_is_always_there()
    {
        foreach (var definition in Catalogue.Shipped.All)
        {
            var note = Rendered(Samples.Synthetic(definition)).Note[^1].Text!;
            Assert.StartsWith(definition.Caution, note, StringComparison.Ordinal);
            Assert.Contains("diagnosis", note, StringComparison.Ordinal);
            Assert.Contains("no alarm and no order", note, StringComparison.Ordinal);
        }
    }

    [Fact]
    public void A_band_is_posted_as_a_code_in_words_with_its_criterion_as_the_method()
    {
        var band = (Classification)Catalogue.Shipped.Find("ards-oxygenation-band")!;
        var observation = Rendered(Samples.Synthetic(band));
        var value = Assert.IsType<CodeableConcept>(observation.Value);
        Assert.Equal("ards-oxygenation-band.mild", Assert.Single(value.Coding).Code);
        Assert.Equal((band.Text("mild"), band.Text("mild")), (value.Text, value.Coding[0].Display));
        Assert.Equal("ards-oxygenation-band.berlin-2012", observation.Method.Coding[0].Code);
        Assert.DoesNotContain("uncertainty", observation.Method.Text, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void A_retraction_drops_the_number_and_keeps_the_evidence()
    {
        var before = Rendered(Samples.DrivingPressure);
        var after = Rendered(Samples.DrivingPressure, Samples.Retraction);
        Assert.Equal(ObservationStatus.EnteredInError, after.Status);
        Assert.Null(after.Value);
        Assert.Empty(after.Component);
        Assert.Empty(after.Extension);
        Assert.Equal("error", after.DataAbsentReason.Coding[0].Code);
        Assert.True(before.Identifier[0].IsExactly(after.Identifier[0]) && before.Code.IsExactly(after.Code) && before.Subject.IsExactly(after.Subject) && before.Effective!.IsExactly(after.Effective!));
        Assert.Equal(before.DerivedFrom.Select(reference => reference.Reference), after.DerivedFrom.Select(reference => reference.Reference));
        Assert.DoesNotContain("14", JsonDocument.Parse(FhirJson.Bytes(after)).RootElement.GetProperty("note").GetRawText(), StringComparison.Ordinal);
    }

    [Fact]
    public void A_withheld_outcome_cannot_be_published_as_a_value() =>
        Assert.Throws<ArgumentException>(() => Rendered(Samples.PfRatio with { Value = null, Published = null, Withheld = Withheld.InputMissing }));

    [Fact]
    public void Device_is_left_out_where_a_profile_forbids_it() =>
        Assert.Null(Rendered(Samples.PfRatio, null, options => options with { OmitDevice = true }).Device);

    [Fact]
    public void There_is_no_profile() => Assert.Null(Rendered(Samples.PfRatio).Meta);

    [Fact]
    public void The_same_edition_renders_to_the_same_bytes() =>
        Assert.Equal(FhirJson.Bytes(Rendered(Samples.AaGradient)), FhirJson.Bytes(Rendered(Samples.AaGradient)));
}
