using System.Text;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>From method and path to the interaction (R4 RESTful API, "Summary"). Refusals become OperationOutcomes here.</summary>
internal sealed class Router(Reading reading, Writing writing, Searching searching, Func<FhirAnswer> capability)
{
    /// <summary>What an InvalidOperationException of a JSON node means.</summary>
    public static Refusal WrongKind => Refusal.Malformed("an element has the wrong JSON type");

    /// <summary>Answers everything below the base except Bundles.</summary>
    public FhirAnswer Answer(FhirRequest request)
    {
        try
        {
            return Route(request);
        }
        catch (Refusal refusal)
        {
            return FhirAnswer.Error(refusal);
        }
        catch (InvalidOperationException)
        {
            return FhirAnswer.Error(WrongKind);
        }
    }

    public FhirAnswer ReadOnly(FhirRequest request) =>
        request.Method == "GET" ? Route(request) : throw Refusal.BadRequest("only GET is read-only");

    private FhirAnswer Route(FhirRequest request)
    {
        var path = request.Segments;
        if (path is ["metadata"])
        {
            return request.Method == "GET" ? capability() : NotAllowed("GET");
        }
        if (path.Length == 0)
        {
            return NotAllowed("POST");
        }
        if (!ResourceRules.IsType(path[0]))
        {
            throw Refusal.NotFound($"resource type '{path[0]}'");
        }
        return (request.Method, path) switch
        {
            ("GET", [var type]) => searching.Search(request, type),
            ("POST", [var type, "_search"]) => searching.Search(request, type, Encoding.UTF8.GetString(request.Body)),
            ("POST", [var type]) => writing.Create(request, type),
            ("PUT", [var type]) => writing.ConditionalUpdate(request, type),
            ("GET", [var type, var id]) => reading.Read(request, type, id),
            ("PUT", [var type, var id]) => writing.Update(request, type, id),
            ("DELETE", [var type, var id]) => writing.Delete(type, id, request.IfMatch),
            ("GET", [var type, var id, "_history"]) => reading.History(type, id),
            ("GET", [var type, var id, "_history", var version]) => reading.ReadVersion(type, id, version),
            (_, [_]) => NotAllowed("GET, POST, PUT"),
            (_, [_, "_search"]) => NotAllowed("POST"),
            (_, [_, _]) => NotAllowed("GET, PUT, DELETE"),
            (_, [_, _, "_history", ..]) => NotAllowed("GET"),
            _ => throw Refusal.NotFound(request.Path),
        };
    }

    private static FhirAnswer NotAllowed(string allow) => FhirAnswer.Error(405, "not-supported", $"allowed here: {allow}") with { Allow = allow };
}
