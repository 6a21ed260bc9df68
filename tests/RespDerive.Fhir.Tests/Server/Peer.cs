using Hl7.Fhir.Model;
using Microsoft.Extensions.Time.Testing;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Tests.Writing;
using WireMock.RequestBuilders;
using WireMock.ResponseBuilders;
using WireMock.Server;
using Task = System.Threading.Tasks.Task;

namespace RespDerive.Fhir.Tests.Server;

/// <summary>A server on the loopback that answers as told, and our client of it.</summary>
internal sealed class Peer : IDisposable
{
    public static readonly DateTimeOffset Now = new(2026, 3, 4, 5, 0, 0, TimeSpan.Zero);
    public const string Json = "application/fhir+json";
    private readonly HttpClient _http = new(FhirServer.Handler());

    public Peer()
    {
        Wire = WireMockServer.Start();
        Base = Wire.Url + "/fhir";
        _http.DefaultRequestHeaders.Authorization = new("Bearer", "secret");
        Fhir = new FhirServer(_http, new Uri(Base), new FakeTimeProvider(Now));
    }

    public WireMockServer Wire { get; }

    public string Base { get; }

    public FhirServer Fhir { get; }

    public static Observation Result => Samples.Renderer().Observation(Samples.PfRatio, Samples.First);

    public static Bundle Transaction => Samples.Renderer().Transaction(Samples.PfRatio, Samples.First);

    public IEnumerable<WireMock.IRequestMessage> Requests => Wire.LogEntries.Select(entry => entry.RequestMessage!);

    public Peer Answer(string method, string path, int status, string? body = null, string type = Json, params (string Name, string Value)[] headers)
    {
        var response = Response.Create().WithStatusCode(status).WithHeader("Content-Type", type);
        response = body is null ? response : response.WithBody(body);
        foreach (var (name, value) in headers)
        {
            response = response.WithHeader(name, value);
        }

        Wire.Given(Request.Create().WithPath(path).UsingMethod(method)).RespondWith(response);
        return this;
    }

    /// <summary>A search with its own answer for each value of one parameter.</summary>
    public Peer Page(string parameter, string value, string body)
    {
        Wire.Given(Request.Create().WithPath("/fhir/Observation").WithParam(parameter, value).UsingGet())
            .RespondWith(Response.Create().WithStatusCode(200).WithHeader("Content-Type", Json).WithBody(body));
        return this;
    }

    public static string Searchset(string entries, string? next = null) =>
        $$"""{"resourceType":"Bundle","type":"searchset","link":[{"relation":"self","url":"x"}{{(next is null ? "" : $$""",{"relation":"next","url":"{{next}}"}""")}}],"entry":[{{entries}}]}""";

    public static string Entry(string id, string version = "1") =>
        $$$"""{"fullUrl":"x/Observation/{{{id}}}","resource":{"resourceType":"Observation","id":"{{{id}}}","meta":{"versionId":"{{{version}}}"}},"search":{"mode":"match"}}""";

    public async Task<List<SearchPage>> SearchAsync(string query)
    {
        var pages = new List<SearchPage>();
        await foreach (var page in Fhir.SearchAsync(query, TestContext.Current.CancellationToken))
        {
            pages.Add(page);
        }

        return pages;
    }

    public void Dispose()
    {
        _http.Dispose();
        Wire.Dispose();
    }
}
