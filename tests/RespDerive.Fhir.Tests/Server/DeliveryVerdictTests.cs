using System.Text;
using CsCheck;
using RespDerive.Fhir.Server;

namespace RespDerive.Fhir.Tests.Server;

public sealed class DeliveryVerdictTests
{
    private static ServerAnswer Of(int status, string body = "", string? retryAfter = null, string? rateLimit = null) =>
        DeliveryVerdict.Of(status, Encoding.UTF8.GetBytes(body), retryAfter, rateLimit, Peer.Now);

    /// <summary>Statuses: RFC 9110 section 15, RFC 6585 (429), RFC 8470 (425); FHIR R4 http.html for 409, 410, 412 and 422.</summary>
    [Theory]
    [InlineData(301, typeof(ServerAnswer.Parked))]
    [InlineData(400, typeof(ServerAnswer.Parked))]
    [InlineData(401, typeof(ServerAnswer.Retry))]
    [InlineData(403, typeof(ServerAnswer.Parked))]
    [InlineData(404, typeof(ServerAnswer.Parked))]
    [InlineData(405, typeof(ServerAnswer.Parked))]
    [InlineData(408, typeof(ServerAnswer.Retry))]
    [InlineData(409, typeof(ServerAnswer.Conflict))]
    [InlineData(410, typeof(ServerAnswer.Gone))]
    [InlineData(412, typeof(ServerAnswer.Conflict))]
    [InlineData(413, typeof(ServerAnswer.Parked))]
    [InlineData(422, typeof(ServerAnswer.Parked))]
    [InlineData(425, typeof(ServerAnswer.Retry))]
    [InlineData(429, typeof(ServerAnswer.Retry))]
    [InlineData(500, typeof(ServerAnswer.Retry))]
    [InlineData(503, typeof(ServerAnswer.Retry))]
    [InlineData(504, typeof(ServerAnswer.Retry))]
    public void Each_status_has_its_verdict(int status, Type verdict) => Assert.IsType(verdict, Of(status));

    [Theory]
    [InlineData("0", null, 0)]
    [InlineData("Wed, 04 Mar 2026 04:00:00 GMT", null, 0)]
    [InlineData("Wed, 04 Mar 2026 05:01:00 GMT", null, 60)]
    [InlineData("-5", null, null)]
    [InlineData("soon", "\"a\";r=0;t=9", 9)]
    [InlineData(null, "\"a\";r=12;t=9", null)]
    [InlineData(null, "\"a\";r=0", null)]
    [InlineData(null, "nonsense", null)]
    public void Waiting_time_is_read_or_not_told(string? retryAfter, string? rateLimit, int? seconds) =>
        Assert.Equal(seconds is { } told ? TimeSpan.FromSeconds(told) : null, DeliveryVerdict.Wait(retryAfter, rateLimit, Peer.Now));

    [Fact]
    public void A_parked_text_tells_code_and_place_and_nothing_else()
    {
        const string outcome = """
            {"resourceType":"OperationOutcome","issue":[
              {"severity":"warning","code":"informational","diagnostics":"Ada"},
              {"severity":"error","code":"business-rule","diagnostics":"Patient Ada Example has died","details":{"text":"Ada Example"},"expression":["Observation.where(id='Ada')"],"location":["Observation.subject"]},
              {"severity":"fatal","code":"Ada Example!","expression":["Observation.component[2].value[x]"]}]}
            """;
        Assert.Equal(new ServerAnswer.Parked("business-rule", "HTTP 422: business-rule at Observation.subject; unspecified at Observation.component[2].value[x]"), Of(422, outcome));
    }

    [Fact]
    public void No_body_makes_it_fail_or_leak() => Gen.Select(Gen.Int[300, 599], Gen.String).Sample((status, body) =>
    {
        var text = Of(status, body) is ServerAnswer.Parked parked ? parked.Text : "";
        return body.Length < 4 || !text.Contains(body, StringComparison.Ordinal);
    });

    [Theory]
    [InlineData("""{"resourceType":"OperationOutcome","issue":7}""")]
    [InlineData("""{"resourceType":"OperationOutcome","issue":[7,{"severity":3},{"severity":"error","expression":[1]}]}""")]
    [InlineData("""["OperationOutcome"]""")]
    public void A_malformed_outcome_is_no_failure(string body) => Assert.IsType<ServerAnswer.Parked>(Of(422, body));
}
