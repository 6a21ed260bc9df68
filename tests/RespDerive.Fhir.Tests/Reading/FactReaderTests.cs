using System.Text;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class FactReaderTests
{
    private static string? Refused(string text) => FactReader.Read(Encoding.UTF8.GetBytes(text), "ehr", Base, null, Arrived).Refused;

    [Theory]
    [InlineData("", Refusals.NotJson)]
    [InlineData("{\"resourceType\":\"Observation\"", Refusals.NotJson)]
    [InlineData("{\"resourceType\":\"Observation\",}", Refusals.NotJson)]
    [InlineData("[]", Refusals.NotFhir)]
    [InlineData("{\"resourceType\":7}", Refusals.NotFhir)]
    [InlineData("{\"resourceType\":\"Medication\",\"id\":\"1\"}", Refusals.TypeNotRead)]
    [InlineData("{\"resourceType\":\"Observation\"}", Refusals.NoIdentity)]
    [InlineData("{\"resourceType\":\"Observation\",\"id\":7}", Refusals.NoIdentity)]
    public void What_cannot_be_followed_is_refused_in_a_word(string text, string refused) => Assert.Equal(refused, Refused(text));

    [Fact]
    public void A_byte_order_mark_is_tolerated() => Assert.Null(Refused("\uFEFF{\"resourceType\":\"Patient\",\"id\":\"1\"}"));

    [Fact]
    public void An_address_stands_for_a_missing_id()
    {
        var facts = Facts("{\"resourceType\":\"Patient\"}", "urn:uuid:0d1a");

        Assert.Equal(("urn:uuid:0d1a", "urn:uuid:0d1a"), (facts.Key.Id, facts.Patient));
    }

    [Fact]
    public void White_space_does_not_change_the_digest_and_content_does()
    {
        var digest = Facts("{\"resourceType\":\"Patient\",\"id\":\"1\"}").Order.Digest;

        Assert.Equal(digest, Facts("{ \"resourceType\" : \"Patient\",\n\"id\":\"1\" }").Order.Digest);
        Assert.NotEqual(digest, Facts("{\"resourceType\":\"Patient\",\"id\":\"1\",\"gender\":\"male\"}").Order.Digest);
        Assert.Equal(digest[..16], Facts("{\"resourceType\":\"Patient\",\"id\":\"1\"}").Version);
    }

    [Theory]
    [InlineData("7", 7L)]
    [InlineData("W/7", null)]
    [InlineData("a1", null)]
    public void Only_a_numeric_version_takes_part_in_the_order(string version, long? number)
    {
        var facts = Facts("{\"resourceType\":\"Patient\",\"id\":\"1\",\"meta\":{\"versionId\":\"" + version + "\",\"lastUpdated\":\"2031-05-06T10:00:00.1234567+02:00\"}}");

        Assert.Equal((number, version), (facts.Order.Number, facts.Version));
        Assert.Equal(new DateTimeOffset(2031, 5, 6, 8, 0, 0, TimeSpan.Zero).AddTicks(1234567), facts.Order.LastUpdated);
    }

    [Theory]
    [InlineData("Patient/p1", "Patient/p1")]
    [InlineData("Patient/p1/_history/4", "Patient/p1")]
    [InlineData("https://ehr.example/fhir/Patient/p1", "Patient/p1")]
    [InlineData("https://ehr.example/fhir/Patient/p1/_history/2", "Patient/p1")]
    [InlineData("https://elsewhere.example/Patient/p1", "https://elsewhere.example/Patient/p1")]
    [InlineData("urn:uuid:5", "urn:uuid:5")]
    [InlineData("Group/g1", null)]
    [InlineData("#p", null)]
    public void A_patient_is_known_by_one_key(string reference, string? key) =>
        Assert.Equal(key, Facts("{\"resourceType\":\"Observation\",\"id\":\"1\",\"subject\":{\"reference\":\"" + reference + "\"}}").Patient);

    [Fact]
    public void A_logical_or_contained_patient_is_known_by_its_identifier()
    {
        Assert.Equal("identifier:urn:mrn|12", Facts("""
            {"resourceType":"Observation","id":"1","subject":{"type":"Patient","identifier":{"system":"urn:mrn","value":"12"} } }
            """).Patient);
        Assert.Equal("identifier:urn:mrn|12", Facts("""
            {"resourceType":"Observation","id":"1","contained":[{"resourceType":"Patient","id":"p","identifier":[{"system":"urn:mrn","value":"12"}]}],"subject":{"reference":"#p"} }
            """).Patient);
        Assert.Null(Facts("""
            {"resourceType":"Observation","id":"1","subject":{"type":"Group","identifier":{"system":"urn:mrn","value":"12"} } }
            """).Patient);
    }

    [Fact]
    public void References_of_another_server_stay_with_that_server()
    {
        var facts = Facts("{\"resourceType\":\"Observation\",\"id\":\"1\",\"subject\":{\"reference\":\"Patient/p1\"}}", "https://other.example/r4/Observation/1");

        Assert.Equal("https://other.example/r4/Patient/p1", facts.Patient);
        Assert.Equal(("https://other.example/r4/Observation/1", "https://other.example/r4"), (facts.Key.Reference, facts.Base));
    }

    [Fact]
    public void Without_a_base_the_address_of_the_entry_gives_it()
    {
        var facts = FactReader.Read(Encoding.UTF8.GetBytes("{\"resourceType\":\"Observation\",\"id\":\"1\",\"subject\":{\"reference\":\"https://other.example/r4/Patient/p1\"}}"),
            "ehr", "", "https://other.example/r4/Observation/1", Arrived).Facts!;

        Assert.Equal(("Observation/1", "Patient/p1", "https://other.example/r4"), (facts.Key.Reference, facts.Patient, facts.Base));
    }

    [Fact]
    public void Each_reference_is_listed_once()
    {
        var facts = Facts(Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), OfSpecimen + "," + OfMetric
            + ",\"encounter\":{\"reference\":\"Encounter/e1\"},\"hasMember\":[{\"reference\":\"Observation/2\"},{\"reference\":\"Observation/2\"}]"));

        Assert.Equal(["DeviceMetric/m1", "Encounter/e1", "Observation/2", "Patient/p1", "Specimen/s1"], facts.References.Order(StringComparer.Ordinal));
    }

    [Fact]
    public void One_bad_element_does_not_sink_the_others()
    {
        var facts = Facts("""
            {"resourceType":"Observation","id":"1","status":{"a":1},"category":"x","code":{"coding":{"system":"http://loinc.org","code":"2703-7"} },
             "subject":{"reference":"Patient/p1"},"effectiveDateTime":7,"component":[3,null,{"code":[]}],"specimen":[],"identifier":"y","meta":[1]}
            """);

        var observation = Assert.IsType<ObservationFacts>(facts.Content);
        Assert.Equal(("Patient/p1", null), (facts.Patient, observation.Status));
        Assert.Equal(new CodeFact(CodeSystems.Loinc, "2703-7"), Assert.Single(observation.Own.Codes));
    }

    [Fact]
    public void Half_a_character_in_a_note_does_not_sink_the_resource() =>
        Assert.Equal(80, One(Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), "\"note\":[{\"text\":\"\\ud83d \\\" { \"}]")).Value);

    [Fact]
    public void White_space_inside_a_text_is_content() =>
        Assert.NotEqual(Facts("{\"resourceType\":\"Patient\",\"id\":\"1\",\"x\":\"a\\\"b c\"}").Order.Digest, Facts("{\"resourceType\":\"Patient\",\"id\":\"1\",\"x\":\"a\\\"bc\"}").Order.Digest);

    [Theory]
    [InlineData("\"gender\":\"female\"", "female")]
    [InlineData("\"gender\":\"other\"", "unknown")]
    [InlineData("\"gender\":\"male\",\"extension\":[{\"url\":\"http://hl7.org/fhir/us/core/StructureDefinition/us-core-birthsex\",\"valueCode\":\"F\"}]", "female")]
    [InlineData("\"gender\":\"male\",\"extension\":[{\"url\":\"http://hl7.org/fhir/us/core/StructureDefinition/us-core-birthsex\",\"valueCode\":\"UNK\"}]", "male")]
    [InlineData("\"gender\":\"male\",\"extension\":[{\"url\":\"http://hl7.org/fhir/StructureDefinition/patient-sexParameterForClinicalUse\",\"extension\":[{\"url\":\"value\",\"valueCodeableConcept\":{\"coding\":[{\"code\":\"female-typical\"}]}}]}]", "female")]
    [InlineData("\"birthDate\":\"1960\"", "unknown")]
    public void The_sex_for_formulas_is_the_one_stated_for_clinical_use_then_at_birth_then_administrative(string more, string sex) =>
        Assert.Equal(sex, Read("{\"resourceType\":\"Patient\",\"id\":\"1\"," + more + "}").Person!.Sex);

    [Theory]
    [InlineData("1960", "1960")]
    [InlineData("1960-02", "1960-02")]
    [InlineData("1960-02-30", null)]
    [InlineData("02/1960", null)]
    public void A_birth_date_is_kept_as_sent_when_it_is_one(string sent, string? kept) =>
        Assert.Equal(kept, Read("{\"resourceType\":\"Patient\",\"id\":\"1\",\"birthDate\":\"" + sent + "\"}").Person!.BirthDate);
}
