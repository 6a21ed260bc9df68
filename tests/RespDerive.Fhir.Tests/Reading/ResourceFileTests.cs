using System.Text;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class ResourceFileTests
{
    private const string Patient = "{\"resourceType\":\"Patient\",\"id\":\"1\"}";

    private static async Task<List<(long, int?, string?)>> Places(string text) =>
        [.. (await Items(text)).Select(item => (item.Line, item.Entry, item.Refused))];

    private static async Task<List<FiledResource>> Items(string text)
    {
        using var stream = new MemoryStream(Encoding.UTF8.GetBytes(text));
        var items = new List<FiledResource>();
        await foreach (var item in ResourceFile.Read(stream, TestContext.Current.CancellationToken))
        {
            items.Add(item);
        }

        return items;
    }

    [Fact]
    public async Task Lines_are_read_one_by_one_and_a_bad_one_is_told_in_its_place() =>
        Assert.Equal([(1, null, null), (3, null, Refusals.NotJson), (4, null, null)], await Places($"\uFEFF{Patient}\r\n\n{{broken\n{Patient}"));

    [Fact]
    public async Task A_bad_first_line_loses_only_itself() =>
        Assert.Equal([(1, null, Refusals.NotJson), (2, null, null)], await Places($"{{\"resourceType\":\"Pati\n{Patient}\n"));

    [Fact]
    public async Task A_document_over_many_lines_is_one_resource() =>
        Assert.Equal([(1, null, null)], await Places("{\n  \"resourceType\": \"Patient\",\n  \"id\": \"1\"\n}\n"));

    [Fact]
    public async Task A_bundle_is_taken_apart_on_one_line_or_on_many()
    {
        const string bundle = "{\"resourceType\":\"Bundle\",\n\"entry\":[\n{\"fullUrl\":\"urn:uuid:1\",\"resource\":" + Patient + "},\n7,\n{\"request\":{\"method\":\"DELETE\"}},{\"resource\":\"x\"}]}";
        (long, int?, string?)[] places = [(1, 0, null), (1, 1, Refusals.NotFhir), (1, 3, Refusals.NotFhir)];

        Assert.Equal(places, await Places(bundle));
        Assert.Equal([.. places, (2, null, null)], await Places(bundle.Replace("\n", "", StringComparison.Ordinal) + "\n" + Patient));
    }

    [Fact]
    public async Task Within_a_bundle_a_urn_means_the_resource_it_addresses()
    {
        var items = await Items("""
            {"resourceType":"Bundle","entry":[{"fullUrl":"urn:uuid:aa","resource":{"resourceType":"Patient","id":"p9"} },
             {"fullUrl":"urn:uuid:bb","resource":{"resourceType":"Observation","id":"o9","subject":{"reference":"urn:uuid:aa"} } }]}
            """);

        var facts = FactReader.Read(items[1].Utf8, "ehr", "", items[1].FullUrl, Arrived, items[1].Links).Facts!;

        Assert.Equal(("Patient/p9", "Observation/o9"), (facts.Patient, facts.Key.Reference));
    }

    [Fact]
    public async Task A_line_longer_than_a_chunk_is_whole()
    {
        var longLine = "{\"resourceType\":\"Patient\",\"id\":\"1\",\"x\":\"" + new string('y', 200_000) + "\"}";

        Assert.Equal([(1, null, null), (2, null, null)], await Places(longLine + "\n" + Patient));
    }

    [Fact]
    public async Task An_empty_file_is_empty() => Assert.Empty(await Places("\n \r\n"));
}
