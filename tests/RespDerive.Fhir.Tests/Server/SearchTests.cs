using RespDerive.Fhir.Server;

namespace RespDerive.Fhir.Tests.Server;

public sealed class SearchTests : IDisposable
{
    private readonly Peer _peer = new();

    public void Dispose() => _peer.Dispose();

    private async Task<ServerAnswer> Failure(string query) => (await Assert.ThrowsAsync<SearchFailedException>(() => _peer.SearchAsync(query))).Answer;

    [Fact]
    public async Task Pages_are_followed_to_the_end_also_below_the_base_without_a_path()
    {
        _peer.Page("page", "1", Peer.Searchset(Peer.Entry("a") + "," + Peer.Entry("b"), _peer.Base + "/Observation?page=2"))
            .Page("page", "2", Peer.Searchset("", _peer.Base + "?state=3"));
        _peer.Answer("GET", "/fhir", 200, Peer.Searchset(Peer.Entry("c")));
        var pages = await _peer.SearchAsync("Observation?page=1");
        Assert.Equal([2, 0, 1], pages.Select(page => page.Entries.Count));
        Assert.Equal([true, true, false], pages.Select(page => page.HasNext));
        Assert.All(_peer.Requests, request => Assert.Equal("no-cache", request.Headers!["Cache-Control"][0]));
    }

    [Fact]
    public async Task A_resource_is_handed_on_byte_for_byte_and_a_bad_one_does_not_sink_the_page()
    {
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset("""{"resource":{"resourceType":"Observation", "status":"nonsense","valueQuantity":{"value":7.40}}},{"resource":7},{"resource":{"resourceType":"OperationOutcome"},"search":{"mode":"outcome"}}"""));
        var entry = Assert.Single(Assert.Single(await _peer.SearchAsync("Observation?code=x")).Entries);
        Assert.Equal("""{"resourceType":"Observation", "status":"nonsense","valueQuantity":{"value":7.40}}""", System.Text.Encoding.UTF8.GetString(entry.Resource));
    }

    [Fact]
    public async Task A_next_link_to_another_host_is_refused_and_gets_no_credentials()
    {
        using var other = new Peer();
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset(Peer.Entry("a"), other.Base + "/Observation?page=2"));
        Assert.Equal("foreign-link", Assert.IsType<ServerAnswer.Parked>(await Failure("Observation?code=x")).Code);
        Assert.Empty(other.Requests);
    }

    [Theory]
    [InlineData("/admin/Observation?page=2")]
    [InlineData("/fhirther/Observation?page=2")]
    [InlineData("/fhir/../admin?page=2")]
    public async Task A_next_link_beside_the_base_is_refused_too(string path)
    {
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset(Peer.Entry("a"), _peer.Wire.Url + path));
        Assert.Equal("foreign-link", Assert.IsType<ServerAnswer.Parked>(await Failure("Observation?code=x")).Code);
        Assert.Single(_peer.Requests);
    }

    [Fact]
    public async Task A_circle_of_next_links_ends()
    {
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset("", _peer.Base + "/Observation?code=x"));
        Assert.Equal("paging-loop", Assert.IsType<ServerAnswer.Parked>(await Failure("Observation?code=x")).Code);
    }

    [Fact]
    public async Task An_expired_page_means_to_search_again()
    {
        _peer.Page("page", "1", Peer.Searchset("", _peer.Base + "/Observation?page=2"));
        Assert.IsType<ServerAnswer.Retry>(await Failure("Observation?page=1"));
    }

    [Theory]
    [InlineData("<html>maintenance</html>", "not-json")]
    [InlineData("{\"resourceType\":\"OperationOutcome\"}", "not-a-bundle")]
    public async Task A_page_that_is_no_Bundle_is_no_empty_result(string body, string code)
    {
        _peer.Answer("GET", "/fhir/Observation", 200, body);
        Assert.Equal(code, Assert.IsType<ServerAnswer.Parked>(await Failure("Observation?code=x")).Code);
    }

    [Fact]
    public async Task The_exception_tells_no_address()
    {
        var exception = await Assert.ThrowsAsync<SearchFailedException>(() => _peer.SearchAsync("Observation?patient=ada-1"));
        Assert.DoesNotContain("ada-1", exception.ToString(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("http://127.0.0.2/Observation?x=1")]
    [InlineData("Observation")]
    [InlineData("../Observation?x=1")]
    public async Task A_query_is_a_type_and_parameters(string query) => await Assert.ThrowsAsync<ArgumentException>(() => _peer.SearchAsync(query));

    [Fact]
    public async Task Find_tells_every_match_of_an_identifier()
    {
        _peer.Page("identifier", "https://r.example/result|abc", Peer.Searchset(Peer.Entry("a", "3") + "," + Peer.Entry("b")));
        Assert.Equal([new("a", "3"), new("b", "1")], await _peer.Fhir.FindAsync("Observation", "https://r.example/result", "abc", TestContext.Current.CancellationToken));
    }

    [Fact]
    public async Task Our_own_Provenances_are_told_from_those_of_others()
    {
        var words = new RespDerive.Fhir.Writing.Vocabulary("https://r.example");
        var ours = $$$"""
            {"url":"{{{words.ProvenanceId}}}","valueString":"one"},{"url":"{{{words.ContentDigest}}}","valueString":"abc"}
            """;
        _peer.Answer("GET", "/fhir/Provenance", 200, Peer.Searchset($$$"""
            {"resource":{"resourceType":"Provenance","id":"theirs","extension":[{"url":"other","valueString":"one"}]}},
            {"resource":{"resourceType":"Provenance","id":"p1","extension":[{{{ours}}}],
             "target":[{"reference":"Observation/1","extension":[{"url":"other"},{"url":"{{{words.ResultRevision}}}","valuePositiveInt":3}]}]}},
            {"resource":{"resourceType":"Provenance","id":"p2","extension":[{{{ours}}}]}}
            """));
        Assert.Equal([new("p1", "one", "abc", 3), new("p2", "one", "abc", 0)],
            await _peer.Fhir.OwnProvenancesAsync("Observation/1", words, TestContext.Current.CancellationToken));
        Assert.Equal("Observation/1", _peer.Requests.First().Query!["target"][0]);
    }
}
