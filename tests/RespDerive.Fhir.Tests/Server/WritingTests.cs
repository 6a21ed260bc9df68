using System.Text;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Tests.Writing;

namespace RespDerive.Fhir.Tests.Server;

public sealed class WritingTests : IDisposable
{
    private const string IfNoneExist = "identifier=a%7Cb";
    private readonly Peer _peer = new();

    public void Dispose() => _peer.Dispose();

    private Task<ServerAnswer> CreateAsync(string? ifNoneExist = IfNoneExist) => _peer.Fhir.CreateAsync(Peer.Result, ifNoneExist, TestContext.Current.CancellationToken);

    private Task<ServerAnswer> UpdateAsync(string? version = "3")
    {
        var observation = Samples.Renderer().Observation(Samples.PfRatio, Samples.Second);
        return _peer.Fhir.UpdateAsync(observation, version, TestContext.Current.CancellationToken);
    }

    [Fact]
    public async Task Id_and_version_come_from_the_body()
    {
        _peer.Answer("POST", "/fhir/Observation", 201, """{"resourceType":"Observation","id":"x1","meta":{"versionId":"4"}}""", Peer.Json, ("Location", _peer.Base + "/Observation/other"));
        Assert.Equal(new ServerAnswer.Delivered("x1", "4"), await CreateAsync());
        Assert.Equal(IfNoneExist, Assert.Single(_peer.Requests).Headers!["If-None-Exist"][0]);
    }

    [Theory]
    [InlineData("{base}/Observation/x1/_history/4", null, "4")]
    [InlineData("{base}/Observation/x1", "W/\"9\"", "9")]
    [InlineData("Observation/x1/_history/4", null, "4")]
    [InlineData("/fhir/Observation/x1", null, null)]
    public async Task Without_a_body_they_come_from_Location_and_ETag(string location, string? etag, string? version)
    {
        (string, string)[] headers = [("Location", location.Replace("{base}", _peer.Base, StringComparison.Ordinal)), .. etag is null ? [] : new[] { ("ETag", etag) }];
        _peer.Answer("POST", "/fhir/Observation", 201, null, Peer.Json, headers);
        Assert.Equal(new ServerAnswer.Delivered("x1", version), await CreateAsync());
    }

    [Fact]
    public async Task Without_either_the_identifier_is_looked_up()
    {
        _peer.Answer("POST", "/fhir/Observation", 201).Page("identifier", "https://respderive.example/fhir/result|" + Samples.PfRatio.Identity, Peer.Searchset(Peer.Entry("found", "2")));
        Assert.Equal(new ServerAnswer.Delivered("found", "2"), await CreateAsync());
    }

    [Fact]
    public async Task Found_twice_is_a_conflict_and_not_at_all_is_unknown()
    {
        _peer.Answer("POST", "/fhir/Observation", 201).Answer("GET", "/fhir/Observation", 200, Peer.Searchset(""));
        Assert.IsType<ServerAnswer.Unknown>(await CreateAsync());
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset(Peer.Entry("a") + "," + Peer.Entry("b")));
        Assert.IsType<ServerAnswer.Conflict>(await CreateAsync());
    }

    [Fact]
    public async Task A_conditional_create_that_found_one_says_so()
    {
        _peer.Answer("POST", "/fhir/Observation", 200, """{"resourceType":"Observation","id":"x1","meta":{"versionId":"4"}}""");
        Assert.Equal(new ServerAnswer.Delivered("x1", "4", Existed: true), await CreateAsync());
        Assert.Equal(new ServerAnswer.Delivered("x1", "4"), await CreateAsync(null));
    }

    [Fact]
    public async Task An_update_carries_the_version_we_wrote()
    {
        _peer.Answer("PUT", "/fhir/Observation/9001", 200, null, Peer.Json, ("ETag", "W/\"4\""));
        Assert.Equal(new ServerAnswer.Delivered("9001", "4"), await UpdateAsync());
        var request = Assert.Single(_peer.Requests);
        Assert.Equal("W/\"3\"", request.Headers!["If-Match"][0]);
        Assert.StartsWith("application/fhir+json", request.Headers!["Content-Type"][0], StringComparison.Ordinal);
        R4Validation.Strict(Encoding.UTF8.GetBytes(request.Body!));
    }

    [Theory]
    [InlineData(412, typeof(ServerAnswer.Conflict))]
    [InlineData(409, typeof(ServerAnswer.Conflict))]
    [InlineData(410, typeof(ServerAnswer.Gone))]
    [InlineData(404, typeof(ServerAnswer.Gone))]
    [InlineData(422, typeof(ServerAnswer.Parked))]
    [InlineData(500, typeof(ServerAnswer.Retry))]
    public async Task An_update_may_be_refused(int status, Type verdict)
    {
        _peer.Answer("PUT", "/fhir/Observation/9001", status);
        Assert.IsType(verdict, await UpdateAsync());
    }

    [Theory]
    [InlineData("Retry-After", "120", 120)]
    [InlineData("Retry-After", "Wed, 04 Mar 2026 05:00:30 GMT", 30)]
    [InlineData("RateLimit", "\"fhir\";r=0;t=43", 43)]
    public async Task A_rate_limit_tells_how_long_to_wait(string header, string value, int seconds)
    {
        _peer.Answer("POST", "/fhir/Observation", 429, null, Peer.Json, (header, value));
        Assert.Equal(new ServerAnswer.Retry(TimeSpan.FromSeconds(seconds), MayBeWritten: false), await CreateAsync());
    }

    [Fact]
    public async Task A_server_that_is_down_is_asked_again_after_a_look()
    {
        _peer.Answer("POST", "/fhir/Observation", 503);
        Assert.Equal(new ServerAnswer.Retry(null, MayBeWritten: true), await CreateAsync());
    }

    [Fact]
    public async Task No_connection_means_nothing_was_written()
    {
        _peer.Wire.Stop();
        Assert.Equal(new ServerAnswer.Retry(null, MayBeWritten: false), await CreateAsync());
    }

    [Fact]
    public async Task A_connection_lost_after_sending_means_that_it_may_be_written()
    {
        using var http = new HttpClient(new Broken());
        var fhir = new FhirServer(http, new Uri(_peer.Base), TimeProvider.System);
        Assert.Equal(new ServerAnswer.Retry(null, MayBeWritten: true), await fhir.CreateAsync(Peer.Result, null, TestContext.Current.CancellationToken));
    }

    [Fact]
    public async Task The_callers_cancellation_is_no_verdict()
    {
        using var cancel = new CancellationTokenSource();
        await cancel.CancelAsync();
        await Assert.ThrowsAnyAsync<OperationCanceledException>(() => _peer.Fhir.CreateAsync(Peer.Result, null, cancel.Token));
    }

    [Fact]
    public async Task An_HTML_page_is_parked_without_its_text()
    {
        _peer.Answer("POST", "/fhir/Observation", 400, "<html>Ada Example, born 1970</html>", "text/html");
        Assert.Equal(new ServerAnswer.Parked("http-400", "HTTP 400 without an OperationOutcome"), await CreateAsync());
    }

    private sealed class Broken : HttpMessageHandler
    {
        protected override Task<HttpResponseMessage> SendAsync(HttpRequestMessage request, CancellationToken cancellationToken) =>
            throw new HttpRequestException(HttpRequestError.ResponseEnded);
    }
}
