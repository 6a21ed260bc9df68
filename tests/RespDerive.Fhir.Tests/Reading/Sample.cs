using System.Text;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Tests;

/// <summary>Small invented resources, and short ways to read them.</summary>
internal static class Sample
{
    public const string Base = "https://ehr.example/fhir";
    public static readonly DateTimeOffset Arrived = new(2031, 5, 6, 12, 0, 0, TimeSpan.Zero);
    public static readonly CodeMap Codes = new();

    public static ResourceFacts Facts(string json, string? fullUrl = null) =>
        FactReader.Read(Encoding.UTF8.GetBytes(json), "ehr", Base, fullUrl, Arrived) is { Facts: { } facts } ? facts
            : throw new InvalidOperationException("refused: " + json);

    public static ReadResult Read(string json, params string[] others) => Read(new ReadingOptions(), json, others);

    public static ReadResult Read(ReadingOptions options, string json, params string[] others) => Read(options, Codes, json, others);

    public static ReadResult Read(ReadingOptions options, CodeMap codes, string json, params string[] others)
    {
        var set = new InMemoryResourceSet();
        foreach (var other in others)
        {
            set.Add(Facts(other));
        }

        return new ReadingRules(codes, options).Read(Facts(json), set);
    }

    public static Reading One(string json, params string[] others) => Assert.Single(Read(json, others).Readings);

    /// <summary>An Observation; <paramref name="more"/> adds or, by name, replaces elements.</summary>
    public static string Observation(string coding, string value, string more = "", string status = "final", string effective = "\"effectiveDateTime\":\"2031-05-06T10:00:00Z\"") =>
        $$"""
        {"resourceType":"Observation","id":"o1","meta":{"versionId":"3","lastUpdated":"2031-05-06T11:00:00Z"},"status":"{{status}}",
         "code":{"coding":[{{coding}}]},"subject":{"reference":"Patient/p1"}{{After(effective)}}{{After(value)}}{{After(more)}}}
        """;

    public static string Loinc(string code) => Coding(CodeSystems.Loinc, code);

    public static string Coding(string system, string code) => $$"""{"system":"{{system}}","code":"{{code}}"}""";

    public static string Quantity(string number, string unit, string system = CodeSystems.Ucum) =>
        $$"""
        "valueQuantity":{"value":{{number}},"unit":"{{unit}}","system":"{{system}}","code":"{{unit}}"}
        """.Trim();

    public static string Unsystematic(string number, string unit) => $$"""
        "valueQuantity":{"value":{{number}},"unit":"{{unit}}"}
        """.Trim();

    public static string Category(string code) =>
        $$"""
        "category":[{"coding":[{"system":"http://terminology.hl7.org/CodeSystem/observation-category","code":"{{code}}"}]}]
        """.Trim();

    public static string Specimen(string type, string collection = "", string status = "available") =>
        $$"""{"resourceType":"Specimen","id":"s1","meta":{"versionId":"1"},"status":"{{status}}","type":{"coding":[{"system":"http://terminology.hl7.org/CodeSystem/v2-0487","code":"{{type}}"}]},"subject":{"reference":"Patient/p1"}{{After(collection)}}}""";

    public static string Collected(string time) => $$"""
        "collection":{"collectedDateTime":"{{time}}"}
        """.Trim();

    public static string Metric(string category) =>
        $$"""{"resourceType":"DeviceMetric","id":"m1","meta":{"versionId":"1"},"type":{"text":"x"},"category":"{{category}}","source":{"reference":"Device/v1"} }""";

    public const string OfMetric = "\"device\":{\"reference\":\"DeviceMetric/m1\"}";
    public const string OfSpecimen = "\"specimen\":{\"reference\":\"Specimen/s1\"}";

    private static string After(string more) => more.Length == 0 ? "" : "," + more;
}
