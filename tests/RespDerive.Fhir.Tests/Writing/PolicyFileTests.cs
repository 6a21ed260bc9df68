using System.Text;
using RespDerive.Fhir.Writing;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class PolicyFileTests
{
    private static PolicyBook Read(string json)
    {
        using var file = new MemoryStream(Encoding.UTF8.GetBytes(json));
        return PolicyFile.Read(file);
    }

    private static IReadOnlyList<string> Errors(string json) => Assert.Throws<PolicyFileException>(() => Read(json)).Errors;

    [Fact]
    public void An_empty_file_is_the_defaults()
    {
        var policy = Assert.Single(Read("{}").All);
        Assert.Equal((null, 0.8, true), (policy.PressureMmHg, policy.RespiratoryQuotient, policy.AcceptSetPeep));
        Assert.Equal(64, policy.Hash.Length);
    }

    [Fact]
    public void The_hash_does_not_depend_on_order_spacing_or_units()
    {
        // UCUM: m[Hg] is 133.322 kPa, so 750 mm[Hg] is exactly 99.9915 kPa.
        var one = Read("""{"pressure": 750, "acceptSetPeep": false, "tolerances": {"pao2": {"as": "deviation", "relative": 0.03, "source": "QC 2026"}}}""").All[0];
        var other = Read("""
            {"tolerances": {"pao2": {"source": "QC 2026", "relative": 0.030, "as": "deviation", "absolute": 0}},
             "acceptSetPeep":false, // as agreed
             "pressure": {"unit": "kPa", "value": 99.9915}, }
            """).All[0];
        Assert.Equal(one.Hash, other.Hash);
    }

    [Fact]
    public void Every_setting_moves_the_hash()
    {
        string[] files =
        [
            "{}", """{"pressure": 750}""", """{"pressure": 751}""", """{"altitude": 750}""", """{"respiratoryQuotient": 0.85}""", """{"acceptSetPeep": false}""",
            """{"definitions": ["pf-ratio"]}""", """{"definitions": []}""", """{"sources": {"ehr": {"settings": "on-change"}}}""", """{"sources": {"ehr": {"settings": "periodic"}}}""",
            """{"tolerances": {"pao2": {"as": "limit", "absolute": 3, "source": "a"}}}""", """{"tolerances": {"pao2": {"as": "deviation", "absolute": 3, "source": "a"}}}""",
            """{"validFrom": "2026-01-01T00:00:00Z"}""",
        ];
        Assert.Equal(files.Length, files.Select(file => Read(file).All[0].Hash).Distinct().Count());
    }

    [Fact]
    public void The_document_of_a_policy_is_a_policy_file_that_means_the_same()
    {
        var policy = Read("""{"altitude": 1609, "definitions": ["pf-ratio", "aa-gradient"], "sources": {"ehr": {"settings": {"value": 90, "unit": "min"}}}, "tolerances": {"peep": {"as": "limit", "absolute": 1, "relative": 0.02, "sharedZero": true, "source": "bench test"}}}""").All[0];
        using var document = new MemoryStream(PolicyDocument.Of(policy));
        Assert.Equal(policy.Hash, PolicyFile.Read(document).All[0].Hash);
        Assert.Equal(1.5, policy.TimingOf("ehr").SettingMaxAge.TotalHours);
    }

    [Fact]
    public void Later_policies_repeat_only_what_changes()
    {
        var book = Read("""{"pressure": 760, "acceptSetPeep": false, "policies": [{"validFrom": "2026-05-01T00:00:00+02:00", "altitude": 200}]}""");
        var before = book.At(new DateTimeOffset(2026, 4, 30, 21, 59, 59, TimeSpan.Zero));
        var after = book.At(new DateTimeOffset(2026, 4, 30, 22, 0, 0, TimeSpan.Zero));
        Assert.Equal((760d, null, false), (before.PressureMmHg, before.AltitudeMetres, before.AcceptSetPeep));
        Assert.Equal((null, 200d, false), (after.PressureMmHg, after.AltitudeMetres, after.AcceptSetPeep));
    }

    [Fact]
    public void All_faults_are_told_at_once_with_their_place()
    {
        var errors = Errors("""
            {"presure": 760, "respiratoryQuotient": 8, "acceptSetPeep": "no", "definitions": ["pf-ratio", "no-such", "minimum-work-rate"],
             "tolerances": {"po3": {"as": "limit", "source": "x"}, "pao2": {"as": "sigma", "relativ": 1}}, "sources": {"ehr": {"settings": "sometimes"}},
             "policies": [{"pressure": {"value": 1013, "unit": "psi"}}, {"validFrom": "2026-05-01"}, {"validFrom": "2026-05-01T00:00:00Z", "pressure": 760, "altitude": 3}]}
            """);
        string[] places =
        [
            "presure: unknown", "respiratoryQuotient: must be 0.6 to 1.2", "acceptSetPeep: must", "definitions[1]: no such", "definitions[2]: minimum-work-rate is computed by hand only", "tolerances.po3: not", "tolerances.pao2.relativ: unknown",
            "tolerances.pao2.as: must", "tolerances.pao2.source: missing", "sources.ehr.settings: must", "policies[0].pressure: unit must", "policies[0].validFrom: missing",
            "policies[1].validFrom: must", "policies[2].pressure: give",
        ];
        Assert.All(places, place => Assert.Contains(errors, error => error.StartsWith(place, StringComparison.Ordinal)));
        Assert.Equal(places.Length, errors.Count);
    }

    [Theory]
    [InlineData("")]
    [InlineData("[]")]
    [InlineData("{\"pressure\": 760, \"pressure\": 750}")]
    [InlineData("{\"pressure\": ")]
    [InlineData("{\"pressure\": {}}")]
    [InlineData("{\"pressure\": null}")]
    [InlineData("{\"policies\": {}}")]
    [InlineData("{\"policies\": [7]}")]
    [InlineData("{\"validFrom\": \"2026-01-01T00:00:00\"}")]
    [InlineData("{\"sources\": {\"ehr\": 3}}")]
    [InlineData("{\"tolerances\": 3}")]
    public void A_broken_file_is_refused_with_a_reason(string file) => Assert.NotEmpty(Errors(file));

    [Fact]
    public void The_worked_example_of_the_documentation_is_read()
    {
        var page = File.ReadAllText(Path.Combine(Root(), "docs", "policy.md"));
        var example = page[(page.IndexOf("```json", StringComparison.Ordinal) + 7)..];
        var book = Read(example[..example.IndexOf("```", StringComparison.Ordinal)]);
        Assert.Equal(2, book.All.Count);
        Assert.Equal((520d, null), (book.All[0].AltitudeMetres, book.All[0].PressureMmHg));
        Assert.Null(book.All[1].AltitudeMetres);
        Assert.Equal(715.56, book.All[1].PressureMmHg!.Value, 0.01); // 95.4 kPa / 0.133322
        Assert.Equal(12, book.All[0].TimingOf("ehr").SettingMaxAge.TotalHours);
    }

    private static string Root([System.Runtime.CompilerServices.CallerFilePath] string here = "") => Path.GetFullPath(Path.Combine(Path.GetDirectoryName(here)!, "../../.."));
}
