using RespDerive.Fhir.Server;
using RespDerive.Fhir.Tests.Writing;

namespace RespDerive.Fhir.Tests.Server;

public sealed class TransactionAnswerTests : IDisposable
{
    private const string Stored = """{"response":{"status":"201 Created","location":"Observation/x1/_history/1","etag":"W/\"1\""}}""";
    private const string Traced = """{"response":{"status":"201","location":"{base}/Provenance/p1"}}""";
    private readonly Peer _peer = new();

    public void Dispose() => _peer.Dispose();

    private Task<TransactionAnswer> AnswerAsync(int status, string body, string type = Peer.Json)
    {
        _peer.Answer("POST", "/fhir", status, body.Replace("{base}", _peer.Base, StringComparison.Ordinal), type);
        return _peer.Fhir.TransactAsync(Peer.Transaction, TestContext.Current.CancellationToken);
    }

    private static string Response(params string[] entries) => $$"""{"resourceType":"Bundle","type":"transaction-response","entry":[{{string.Join(',', entries)}}]}""";

    [Fact]
    public async Task All_stored_is_delivered()
    {
        var answer = await AnswerAsync(200, Response(Stored, Traced));
        Assert.Equal(new ServerAnswer.Delivered("x1", "1"), answer.Whole);
        Assert.Equal([new ServerAnswer.Delivered("x1", "1"), new ServerAnswer.Delivered("p1", null)], answer.Entries);
    }

    [Fact]
    public async Task A_failed_entry_inside_a_200_is_seen()
    {
        var answer = await AnswerAsync(200, Response("""{"response":{"status":"412 Precondition Failed"}}""", Traced));
        Assert.IsType<ServerAnswer.Conflict>(answer.Whole);
        Assert.IsType<ServerAnswer.Conflict>(answer.Entries[0]);
        Assert.Equal(new ServerAnswer.Delivered("p1", null), answer.Entries[1]);
    }

    [Fact]
    public async Task A_refused_second_entry_does_not_hide_behind_the_first()
    {
        var answer = await AnswerAsync(200, Response(Stored,
            """{"response":{"status":"422","outcome":{"resourceType":"OperationOutcome","issue":[{"severity":"error","code":"invariant","diagnostics":"Ada","expression":["Provenance.entity[0].what"]}]}}}"""));
        Assert.Equal(new ServerAnswer.Parked("invariant", "HTTP 422: invariant at Provenance.entity[0].what"), answer.Whole);
        Assert.Equal(new ServerAnswer.Delivered("x1", "1"), answer.Entries[0]);
    }

    [Fact]
    public async Task An_entry_that_was_there_already_is_told_from_a_new_one()
    {
        var answer = await AnswerAsync(200, Response("""{"response":{"status":"200"},"resource":{"resourceType":"Observation","id":"old","meta":{"versionId":"5"}}}""", Traced));
        Assert.Equal(new ServerAnswer.Delivered("old", "5", Existed: true), answer.Entries[0]);
    }

    [Fact]
    public async Task An_entry_without_an_id_is_looked_up_by_identifier()
    {
        _peer.Page("identifier", "https://respderive.example/fhir/result|" + Samples.PfRatio.Identity, Peer.Searchset(Peer.Entry("found", "2")));
        var answer = await AnswerAsync(200, Response("""{"response":{"status":"200"}}""", """{"response":{"status":"201"}}"""));
        Assert.Equal(new ServerAnswer.Delivered("found", "2"), answer.Entries[0]);
        Assert.IsType<ServerAnswer.Unknown>(answer.Entries[1]);
        Assert.IsType<ServerAnswer.Unknown>(answer.Whole);
    }

    [Theory]
    [InlineData("")]
    [InlineData("<html/>")]
    [InlineData("{\"resourceType\":\"OperationOutcome\"}")]
    [InlineData("{\"resourceType\":\"Bundle\",\"entry\":[{\"response\":{\"status\":\"201\"}}]}")]
    public async Task A_200_that_does_not_answer_each_entry_is_unknown(string body) => Assert.IsType<ServerAnswer.Unknown>((await AnswerAsync(200, body)).Whole);

    [Theory]
    [InlineData(400, typeof(ServerAnswer.Parked))]
    [InlineData(409, typeof(ServerAnswer.Conflict))]
    [InlineData(502, typeof(ServerAnswer.Retry))]
    public async Task A_refused_transaction_has_one_answer(int status, Type verdict)
    {
        var answer = await AnswerAsync(status, "<html/>", "text/html");
        Assert.IsType(verdict, answer.Whole);
        Assert.Empty(answer.Entries);
    }

    [Fact]
    public async Task An_entry_without_a_status_is_unknown()
    {
        _peer.Answer("GET", "/fhir/Observation", 200, Peer.Searchset(""));
        Assert.IsType<ServerAnswer.Unknown>((await AnswerAsync(200, Response("{}", Traced))).Entries[0]);
    }
}
