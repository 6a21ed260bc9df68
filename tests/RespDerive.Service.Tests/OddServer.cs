using System.Text.Json.Nodes;
using WireMock;
using WireMock.Server;
using WireMock.Types;
using WireMock.Util;

namespace RespDerive.Service.Tests;

/// <summary>A FHIR server that takes our Device and one result, and answers transactions as a test tells it to.</summary>
internal sealed class OddServer : IDisposable
{
    private readonly WireMockServer _server = WireMockServer.Start();
    private readonly Lock _gate = new();
    private readonly Queue<Func<JsonObject, ResponseMessage>> _answers = new();
    private readonly List<JsonObject> _transactions = [];
    private readonly List<JsonObject> _provenances = [];
    private JsonObject? _held;
    private int _version;

    public OddServer()
    {
        On("POST", "/fhir/Device", request => Json(201, Landed(Body(request), "device", 1)));
        On("POST", "/fhir", request => Transact(Body(request)));
        On("GET", "/fhir/Observation", _ => Json(200, Page(Held is { } held ? [held] : [])));
        On("GET", "/fhir/Observation/one", _ => Held is { } held ? Json(200, held) : Text(404, "nothing"));
        On("GET", "/fhir/Provenance", _ => Json(200, Page(Provenances)));
        On("POST", "/fhir/Provenance", request =>
        {
            var provenance = Landed(Body(request), "apart", 1);
            lock (_gate)
            {
                _provenances.Add(provenance);
            }

            return Json(201, provenance);
        });
    }

    public string BaseUrl => _server.Url + "/fhir";

    /// <summary>Every transaction sent.</summary>
    public IReadOnlyList<JsonObject> Transactions
    {
        get { lock (_gate) { return [.. _transactions]; } }
    }

    /// <summary>Provenances sent apart from a transaction.</summary>
    public IReadOnlyList<JsonObject> Provenances
    {
        get { lock (_gate) { return [.. _provenances.Select(one => one.DeepClone().AsObject())]; } }
    }

    /// <summary>The result as the server has it.</summary>
    public JsonObject? Held
    {
        get { lock (_gate) { return _held?.DeepClone().AsObject(); } }
    }

    /// <summary>How the next transaction is answered; afterwards all goes well.</summary>
    public void Next(Func<JsonObject, ResponseMessage> answer)
    {
        lock (_gate)
        {
            _answers.Enqueue(answer);
        }
    }

    /// <summary>Keeps the Observation of a transaction and says how it landed.</summary>
    public JsonObject Keep(JsonObject transaction)
    {
        lock (_gate)
        {
            _held = Landed(transaction["entry"]![0]!["resource"]!.DeepClone().AsObject(), "one", ++_version);
            return Done("Observation/one", _version);
        }
    }

    public static JsonObject Done(string reference, int version) => new()
    {
        ["response"] = new JsonObject { ["status"] = "201 Created", ["location"] = $"{reference}/_history/{version}", ["etag"] = $"W/\"{version}\"" },
    };

    public static JsonObject Failed(string status) => new() { ["response"] = new JsonObject { ["status"] = status } };

    public static JsonObject Response(params JsonNode[] entries) => new() { ["resourceType"] = "Bundle", ["type"] = "transaction-response", ["entry"] = new JsonArray(entries) };

    public static JsonObject Page(IEnumerable<JsonObject> resources) => new()
    {
        ["resourceType"] = "Bundle",
        ["type"] = "searchset",
        ["entry"] = new JsonArray([.. resources.Select(resource => new JsonObject { ["resource"] = resource.DeepClone() })]),
    };

    public static ResponseMessage Json(int status, JsonNode json) => Message(status, json.ToJsonString(), "application/fhir+json");

    public static ResponseMessage Text(int status, string text) => Message(status, text, "text/html");

    public void On(string method, string path, Func<IRequestMessage, ResponseMessage> answer) =>
        _server.Given(WireMock.RequestBuilders.Request.Create().WithPath(path).UsingMethod(method)).RespondWith(WireMock.ResponseBuilders.Response.Create().WithCallback(answer));

    public void Dispose() => _server.Dispose();

    private ResponseMessage Transact(JsonObject transaction)
    {
        Func<JsonObject, ResponseMessage>? planned;
        lock (_gate)
        {
            _transactions.Add(transaction);
            _answers.TryDequeue(out planned);
        }

        return planned is not null ? planned(transaction)
            : Json(200, Response([Keep(transaction), .. transaction["entry"]!.AsArray().Skip(1).Select((entry, i) => Done($"{entry!["resource"]!["resourceType"]}/with{i}", 1))]));
    }

    private static JsonObject Body(IRequestMessage request) => JsonNode.Parse(request.Body!)!.AsObject();

    private static JsonObject Landed(JsonObject resource, string id, int version)
    {
        resource["id"] = id;
        resource["meta"] = new JsonObject { ["versionId"] = version.ToString(System.Globalization.CultureInfo.InvariantCulture) };
        return resource;
    }

    private static ResponseMessage Message(int status, string body, string type) => new()
    {
        StatusCode = status,
        Headers = new Dictionary<string, WireMockList<string>> { ["Content-Type"] = new(type) },
        BodyData = new BodyData { DetectedBodyType = BodyType.String, BodyAsString = body },
    };
}
