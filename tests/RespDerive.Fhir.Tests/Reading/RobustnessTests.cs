using System.Text;
using System.Text.Json.Nodes;
using CsCheck;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class RobustnessTests
{
    private static readonly string[] Seeds =
    [
        Observation(Loinc("59408-5"), Quantity("94", "%"), Category("vital-signs") + "," + OfMetric + "," + OfSpecimen + """
            ,"component":[{"code":{"coding":[{"system":"http://loinc.org","code":"3150-0"}]},"valueQuantity":{"value":40,"system":"http://unitsofmeasure.org","code":"%"}}]
            """),
        Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), OfSpecimen),
        Observation(Loinc("20124-4"), "\"valueCodeableConcept\":{\"text\":\"vc\"}"),
        Specimen("BLDA", Collected("2031-05-06T10:10:00Z")),
        Metric("setting"),
        "{\"resourceType\":\"Patient\",\"id\":\"p1\",\"gender\":\"male\",\"birthDate\":\"1970-01-01\",\"link\":[{\"other\":{\"reference\":\"Patient/2\"},\"type\":\"replaced-by\"}]}",
        "{\"resourceType\":\"Encounter\",\"id\":\"e1\",\"status\":\"finished\",\"subject\":{\"reference\":\"Patient/p1\"},\"period\":{\"end\":\"2031-05-06T10:10:00Z\"}}",
        "{\"resourceType\":\"DiagnosticReport\",\"id\":\"r1\",\"status\":\"final\",\"result\":[{\"reference\":\"Observation/o1\"}],\"specimen\":[{\"reference\":\"Specimen/s1\"}]}",
        "{\"resourceType\":\"Procedure\",\"id\":\"v\",\"status\":\"completed\",\"code\":{\"coding\":[{\"system\":\"http://snomed.info/sct\",\"code\":\"40617009\"}]},\"performedPeriod\":{\"end\":\"2031-05-06T09:00:00Z\"}}",
    ];

    private static readonly string[] Strange =
    [
        "null", "true", "7", "-1e400", "\"\"", "\"text\"", "[]", "{}", "[[[[]]]]", "\"\\ud800\"", "\"0001-01-01T00:00:00+14:00\"", "\"9999-12-31T23:59:60-14:00\"",
        "{\"reference\":\"#\"}", "{\"reference\":\"/\"}", "{\"coding\":[{\"code\":\"\"}]}", "{\"\\ud800\":1}", "[null,7,{}]",
    ];

    private static readonly Gen<byte[]> Mutated = Gen.Select(Gen.Int[0, Seeds.Length - 1], Gen.Int[0, 3], Gen.Int[0, 10_000], Gen.Int[0, Strange.Length - 1], Gen.Int[0, 10_000])
        .Select((seed, how, where, strange, bytes) => how switch
        {
            0 => Cut(Seeds[seed], where),
            1 => Spoilt(Seeds[seed], where, bytes),
            2 => Encoding.UTF8.GetBytes(Swapped(Seeds[seed], (where, Strange[strange]), (bytes, Strange[(strange + 5) % Strange.Length]))),
            _ => Encoding.UTF8.GetBytes(Swapped(Seeds[seed], (where, Deep(where % 120)))),
        });

    [Fact]
    public void Reading_never_throws_whatever_arrives() => Mutated.Sample(bytes =>
    {
        if (FactReader.Read(bytes, "ehr", Base, null, Arrived) is { Facts: { } facts })
        {
            var set = new InMemoryResourceSet();
            set.Add(facts);
            new ReadingRules(Codes, new ReadingOptions { ResultIdentifierSystem = "urn:mine" }).Read(facts, set);
        }
    }, iter: 20_000);

    [Fact]
    public void A_bundle_with_one_bad_entry_loses_only_that_entry() => Gen.Select(Gen.Int[0, 3], Gen.Int[0, Strange.Length - 3], Gen.Bool).Sample((place, strange, whole) =>
    {
        var entries = Enumerable.Range(0, 4).Select(i => i != place ? $"{{\"resource\":{Seeds[i]}}}"
            : whole ? Strange[strange] : $"{{\"resource\":{Strange[strange]}}}");
        using var stream = new MemoryStream(Encoding.UTF8.GetBytes($"{{\"resourceType\":\"Bundle\",\"entry\":[{string.Join(',', entries)}]}}"));

        var read = ResourceFile.Read(stream).ToBlockingEnumerable().Where(item => item.Refused is null)
            .Select(item => FactReader.Read(item.Utf8, "ehr", Base, item.FullUrl, Arrived, item.Links).Facts).OfType<ResourceFacts>().ToList();

        Assert.Equal(3, read.Count);
    });

    private static byte[] Cut(string json, int where) => Encoding.UTF8.GetBytes(json)[..(where % json.Length)];

    private static byte[] Spoilt(string json, int where, int value)
    {
        var bytes = Encoding.UTF8.GetBytes(json);
        bytes[where % bytes.Length] = (byte)(value & 255);
        return bytes;
    }

    private static string Deep(int depth) => string.Concat(Enumerable.Repeat("{\"a\":[", depth)) + string.Concat(Enumerable.Repeat("]}", depth));

    /// <summary>Puts something strange in the place of some elements, or takes them away.</summary>
    private static string Swapped(string json, params (int Where, string Strange)[] swaps)
    {
        var root = JsonNode.Parse(json)!;
        for (var i = 0; i < swaps.Length; i++)
        {
            var places = new List<(JsonObject Parent, string Name)>();
            Collect(root, places);
            var (parent, name) = places[swaps[i].Where % places.Count];
            if (swaps[i].Where % 5 == 0 && places.Count > 1)
            {
                parent.Remove(name);
            }
            else
            {
                parent[name] = $"@@{i}@@";
            }
        }

        return swaps.Select((swap, i) => ($"\"@@{i}@@\"", swap.Strange)).Aggregate(root.ToJsonString(), (text, swap) => text.Replace(swap.Item1, swap.Strange, StringComparison.Ordinal));
    }

    private static void Collect(JsonNode? node, List<(JsonObject, string)> places)
    {
        if (node is JsonObject members)
        {
            foreach (var (name, child) in members)
            {
                places.Add((members, name));
                Collect(child, places);
            }
        }
        else if (node is JsonArray items)
        {
            foreach (var item in items)
            {
                Collect(item, places);
            }
        }
    }
}
